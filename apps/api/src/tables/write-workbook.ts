import type ExcelJs from 'exceljs';
import { safeText } from './export-text.ts';

export interface WorkbookPlan {
  readonly sheet: string;
  readonly header: readonly string[];
  readonly widths: readonly number[];
  readonly rows: readonly (readonly string[])[];
  /** Lines of a second sheet that explains the columns. */
  readonly legend?: readonly (readonly string[])[];
}

/** One sheet of text cells: a nominal written 2.50 stays 2.50, as a number cell it would lose its zero. */
export async function writeWorkbook(plan: WorkbookPlan): Promise<Uint8Array> {
  const { default: exceljs } = (await import('exceljs')) as { default: typeof ExcelJs };
  const workbook = new exceljs.Workbook();
  const sheet = workbook.addWorksheet(plan.sheet, { views: [{ state: 'frozen', ySplit: 1 }] });
  sheet.columns = plan.header.map((header, index) => ({
    header,
    width: plan.widths[index] ?? 14,
    style: { numFmt: '@' },
  }));
  sheet.getRow(1).font = { bold: true };
  for (const row of plan.rows) sheet.addRow(row.map((cell) => (cell === '' ? null : safeText(cell))));
  if (plan.legend) {
    const legend = workbook.addWorksheet('How to fill in');
    legend.columns = [{ width: 24 }, { width: 90 }];
    for (const row of plan.legend) legend.addRow([...row]);
  }
  return new Uint8Array(await workbook.xlsx.writeBuffer());
}
