import type { Page } from 'playwright-core';
import { pasteInto, type TestFile } from './acts.ts';

export interface NewPart {
  readonly number: string;
  readonly name: string;
  readonly material: string;
  readonly revision: string;
}

/** The list of parts, and the page of one drawing revision. */
export class PartPages {
  readonly characteristics;
  readonly saved;
  readonly released;
  constructor(private readonly page: Page) {
    this.characteristics = page.getByRole('grid', { name: 'Characteristics' });
    this.saved = page.getByRole('toolbar').getByText(/^Saved/);
    this.released = page.getByText(/^Revision \S+ is released\.$/);
  }

  async openParts(): Promise<void> {
    await this.page.getByRole('navigation', { name: 'Desks' }).getByRole('link', { name: 'Parts' }).click();
  }

  async create(part: NewPart): Promise<void> {
    await this.page.getByRole('button', { name: 'New part' }).first().click();
    const dialog = this.page.getByRole('dialog');
    await dialog.getByLabel('Part number').fill(part.number);
    await dialog.getByLabel('Name', { exact: true }).fill(part.name);
    await dialog.getByLabel('First revision').fill(part.revision);
    await dialog.getByLabel(/^Material/).fill(part.material);
    await dialog.getByRole('button', { name: 'Create the part' }).click();
    await this.page.getByRole('heading', { name: 'Drawing revisions' }).waitFor();
  }

  async openRevision(code: string): Promise<void> {
    await this.page.getByRole('table').getByRole('link', { name: code, exact: true }).click();
    await this.characteristics.waitFor();
  }

  async attachDrawing(file: TestFile): Promise<void> {
    await this.page.locator('#drawing-file').setInputFiles(file);
    await this.page.getByText(file.name).waitFor();
  }

  async pasteCharacteristics(rows: readonly (readonly string[])[]): Promise<void> {
    await this.page.getByRole('button', { name: 'Add a row' }).click();
    await pasteInto(this.characteristics, rows);
  }

  async release(code: string): Promise<void> {
    await this.page.getByRole('button', { name: `Release revision ${code}` }).click();
    await this.page.getByRole('dialog').getByRole('button', { name: 'Release the revision' }).click();
  }
}
