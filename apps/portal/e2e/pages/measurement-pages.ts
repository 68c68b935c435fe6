import type { Locator, Page } from 'playwright-core';
import { pasteInto, type TestFile } from './acts.ts';

/** The measurement sheet and the import of readings. */
export class MeasurementPages {
  readonly grid;
  readonly saved;
  readonly said;
  readonly written;
  readonly decimalSign;
  constructor(private readonly page: Page) {
    this.grid = page.getByRole('grid', { name: 'Readings by characteristic and piece' });
    this.saved = page.getByText('All readings saved');
    this.said = page.locator('p[aria-live=polite][role=status]');
    this.written = page.getByText(/readings written and judged$/);
    this.decimalSign = page.getByLabel('Decimal sign');
  }

  async openImport(): Promise<void> {
    await this.page.getByRole('link', { name: 'Import a file' }).click();
  }

  async sendTable(file: TestFile): Promise<void> {
    await this.page.locator('#readings-file').setInputFiles(file);
    await this.page.getByRole('button', { name: /^Write / }).waitFor();
  }

  async writeReadings(): Promise<void> {
    await this.page.getByRole('button', { name: /^Write \d+ readings$/ }).click();
  }

  async backToSheet(): Promise<void> {
    await this.page.getByRole('link', { name: 'See the measurements' }).click();
    await this.grid.waitFor();
  }

  cell(row: number, column: number): Locator {
    return this.page.locator(`#reading-${row}-${column}`);
  }

  async stand(row: number, column: number): Promise<void> {
    await this.cell(row, column).click();
  }

  /** Types where the keyboard stands, and leaves the cell by the key named. */
  async type(text: string, leaveBy: 'Enter' | 'Tab'): Promise<void> {
    await this.page.keyboard.type(text);
    await this.page.keyboard.press(leaveBy);
  }

  async press(key: string): Promise<void> {
    await this.page.keyboard.press(key);
  }

  async paste(rows: readonly (readonly string[])[]): Promise<void> {
    await pasteInto(this.grid, rows);
  }

  async fillGaugeAndDate(gauge: string, on: string): Promise<void> {
    await this.page.getByRole('button', { name: 'Gauge and date' }).click();
    const dialog = this.page.getByRole('dialog');
    const option = dialog.getByLabel('Gauge').locator('option', { hasText: gauge });
    await option.waitFor({ state: 'attached' });
    await dialog.getByLabel('Gauge').selectOption((await option.getAttribute('value')) ?? '');
    await dialog.getByLabel(/^Measured on/).fill(on);
    await dialog.getByRole('button', { name: /^Fill \d+ rows$/ }).click();
    await dialog.waitFor({ state: 'detached' });
  }
}
