import type { Locator, Page } from 'playwright-core';

/** Review workspace and disposition of one package. */
export class ReviewPages {
  readonly marked;
  readonly drawing;
  readonly signed;
  constructor(private readonly page: Page) {
    this.marked = page.getByText(/^\d+ of \d+ marked$/);
    this.drawing = page.locator('main canvas');
    this.signed = page.getByRole('main');
  }

  row(balloon: string): Locator {
    return this.page.getByRole('region', { name: `Balloon ${balloon}`, exact: true });
  }

  async acceptCleanRows(): Promise<void> {
    await this.page.getByRole('button', { name: /^Accept \d+ clean rows?$/ }).click();
    await this.page.getByRole('dialog').getByRole('button', { name: 'Accept them' }).click();
    await this.page.getByRole('dialog').waitFor({ state: 'detached' });
  }

  async showDrawing(): Promise<void> {
    await this.page.keyboard.press('d');
  }

  /** How many points of the page shown are dark: none as long as nothing is drawn. */
  inkOnDrawing(): Promise<number> {
    return this.drawing.first().evaluate((element) => {
      const canvas = element as HTMLCanvasElement;
      const { data } = canvas.getContext('2d')?.getImageData(0, 0, canvas.width, canvas.height) ?? {
        data: [],
      };
      let dark = 0;
      for (let at = 0; at < data.length; at += 4)
        if ((data[at] ?? 255) < 128 && (data[at + 3] ?? 0) > 128) dark += 1;
      return dark;
    });
  }

  async select(balloon: string): Promise<void> {
    await this.page
      .getByRole('option')
      .filter({ has: this.page.getByText(balloon, { exact: true }) })
      .click();
    await this.row(balloon).waitFor();
  }

  async press(key: string): Promise<void> {
    await this.page.keyboard.press(key);
  }

  async acceptElements(labels: readonly string[]): Promise<void> {
    for (const label of labels) {
      const item = this.page
        .getByRole('region', { name: 'Elements' })
        .getByRole('listitem')
        .filter({ hasText: label });
      await item.getByRole('button', { name: 'Accept' }).click();
      await item.getByText('accepted').waitFor();
    }
  }

  async chooseOutcome(words: string): Promise<void> {
    await this.page.getByRole('radio', { name: words }).check();
  }

  async limit(facts: { until: string; pieces: string; containment: string }): Promise<void> {
    await this.page.getByLabel('Ends on').fill(facts.until);
    await this.page.getByRole('textbox', { name: 'Number of pieces' }).fill(facts.pieces);
    await this.page.getByRole('textbox', { name: 'Containment' }).fill(facts.containment);
  }

  async addCondition(text: string, owner: string, due: string): Promise<void> {
    await this.page.getByRole('button', { name: 'Add a condition' }).click();
    await this.page.getByLabel('What must happen').fill(text);
    await this.page.getByLabel('Owner').fill(owner);
    await this.page.getByLabel('Due on').fill(due);
  }

  async sign(password: string): Promise<void> {
    await this.page.getByLabel('Your password').fill(password);
    await this.page.getByRole('button', { name: /^Sign: / }).click();
  }
}
