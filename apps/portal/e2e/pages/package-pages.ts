import type { Page } from 'playwright-core';
import type { TestFile } from './acts.ts';

/** Overview, evidence, findings, deviations and warrant of one package. */
export class PackagePages {
  readonly state;
  readonly findings;
  readonly stops;
  readonly blockers;
  readonly passwordError;
  readonly signatures;
  readonly granted;
  constructor(private readonly page: Page) {
    this.state = page.locator('main header').first();
    this.findings = page.getByRole('main').getByRole('listitem');
    this.stops = page.getByRole('region', { name: 'Stops submission' }).getByRole('listitem');
    this.blockers = page.getByText('Cannot be signed yet');
    this.passwordError = page.locator('#sign-password-error');
    this.signatures = page.getByRole('main');
    this.granted = page.getByText(/^granted by /);
  }

  async openTab(name: string): Promise<void> {
    const tabs = this.page.getByRole('navigation', { name: 'Parts of the package' });
    await tabs.getByRole('link', { name: new RegExp(`^${name}`) }).click();
  }

  async openFromDesk(part: string): Promise<void> {
    await this.page
      .getByRole('table')
      .getByRole('link', { name: new RegExp(part) })
      .first()
      .click();
  }

  async datePiece(piece: string, madeOn: string, lot: string): Promise<void> {
    await this.page.getByRole('button', { name: `Change piece ${piece}` }).click();
    const dialog = this.page.getByRole('dialog');
    await dialog.getByLabel(/^Made on/).fill(madeOn);
    await dialog.getByLabel(/^Lot or heat/).fill(lot);
    await dialog.getByRole('button', { name: /^Save/ }).click();
    await dialog.waitFor({ state: 'detached' });
  }

  async attach(element: string, file: TestFile): Promise<void> {
    const card = this.page.getByRole('article', { name: element });
    await card.getByRole('button', { name: `Open ${element}` }).click();
    await card.locator('input[type=file]').setInputFiles(file);
    await card
      .getByRole('list', { name: `Files of ${element}` })
      .getByText(file.name)
      .waitFor();
  }

  async askDeviation(facts: {
    lower: string;
    cause: string;
    containment: string;
    pieces: string;
    until: string;
  }): Promise<void> {
    await this.page.getByRole('button', { name: 'Ask for a deviation' }).click();
    await this.page.getByLabel(/^Lowest value asked for/).fill(facts.lower);
    await this.page.getByLabel('Cause', { exact: true }).fill(facts.cause);
    await this.page.getByLabel('Containment', { exact: true }).fill(facts.containment);
    await this.page.getByLabel('Number of pieces').fill(facts.pieces);
    await this.page.getByLabel(/^Until/).fill(facts.until);
    await this.page.getByRole('button', { name: 'Send to the customer' }).click();
    await this.page.getByText('waits for the customer').waitFor();
  }

  async grantDeviation(reason: string): Promise<void> {
    await this.page.getByLabel('Reason of the decision').fill(reason);
    await this.page.getByRole('button', { name: 'Grant', exact: true }).click();
  }

  async stateRun(facts: { on: string; hours: string; pieces: string; mass: string }): Promise<void> {
    await this.page.getByLabel('Run on').fill(facts.on);
    await this.page.getByLabel(/^Length of the run/).fill(facts.hours);
    await this.page.getByLabel('Pieces made').fill(facts.pieces);
    await this.page.getByLabel(/^Mass of one part/).fill(facts.mass);
    await this.page.getByRole('button', { name: 'Save', exact: true }).click();
    await this.page.getByText('Warrant facts saved').waitFor();
  }

  async startSigning(): Promise<void> {
    await this.page.getByRole('button', { name: 'Sign and submit' }).click();
  }

  async giveSignature(password: string): Promise<void> {
    const dialog = this.page.getByRole('dialog');
    await dialog.getByLabel('Your password').fill(password);
    await dialog.getByRole('button', { name: 'Sign and submit' }).click();
  }
}
