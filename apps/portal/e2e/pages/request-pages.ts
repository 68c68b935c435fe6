import type { Page } from 'playwright-core';

export interface NewRequest {
  readonly part: string;
  readonly supplier: string;
  readonly site: string;
  readonly level: string;
  readonly ownElement: string;
  readonly streamKind: string;
  readonly streams: readonly string[];
  readonly pieces: number;
  readonly due: string;
  readonly message: string;
}

export class RequestPages {
  readonly acknowledge;
  readonly issued;
  readonly message;
  constructor(private readonly page: Page) {
    this.acknowledge = page.getByRole('button', { name: 'Acknowledge the request' });
    this.issued = page.getByRole('heading', { name: 'What is asked' });
    this.message = page.locator('blockquote');
  }

  async openNew(): Promise<void> {
    const desks = this.page.getByRole('navigation', { name: 'Desks' });
    await desks.getByRole('link', { name: 'Requests' }).click();
    await this.page.getByRole('link', { name: 'New request' }).first().click();
    await this.page.getByLabel('Find the part').waitFor();
  }

  async fill(request: NewRequest): Promise<void> {
    const { page } = this;
    await page.getByLabel('Find the part').fill(request.part);
    await choose(page, 'Part', request.part);
    await choose(page, 'Supplier', request.supplier);
    await choose(page, 'Site that makes the part', request.site);
    await choose(page, 'Submission level', request.level);
    await page.getByText(/^Elements: /).click();
    // Only the warrant and the customer's own element are asked for.
    for (const demand of await page.getByLabel(/^Demand for (?!.*warrant)/i).all())
      await demand.selectOption('not-required');
    await page.getByLabel('Another element').fill(request.ownElement);
    await page.getByRole('button', { name: 'Add element' }).click();
    await choose(page, 'Kind of stream', request.streamKind);
    await page.getByLabel('Names of the streams').fill(request.streams.join('\n'));
    await page.getByLabel('Pieces from each').fill(String(request.pieces));
    await page.getByLabel('Due', { exact: true }).fill(request.due);
    await page.getByLabel(/^Message to the supplier/).fill(request.message);
  }

  async saveDraft(): Promise<void> {
    await this.page.getByRole('button', { name: 'Save the draft' }).click();
    await this.page.getByRole('button', { name: 'Issue the request' }).waitFor();
  }

  async issue(): Promise<void> {
    await this.page.getByRole('button', { name: 'Issue the request' }).click();
    await this.page.getByRole('dialog').getByRole('button', { name: 'Issue the request' }).click();
  }

  async startRound(round: number): Promise<void> {
    await this.page.getByRole('button', { name: `Start round ${round}` }).click();
    await this.page
      .getByRole('dialog')
      .getByRole('button', { name: `Start round ${round}` })
      .click();
  }
}

/** Chooses by the words that stand in the option; the option may still be on its way. */
async function choose(page: Page, label: string, words: string): Promise<void> {
  const select = page.getByLabel(label, { exact: true });
  const option = select.locator('option', { hasText: words }).first();
  await option.waitFor({ state: 'attached' });
  await select.selectOption((await option.getAttribute('value')) ?? '');
}
