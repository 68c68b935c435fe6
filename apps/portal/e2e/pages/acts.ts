import type { Locator } from 'playwright-core';

export interface TestFile {
  readonly name: string;
  readonly mimeType: string;
  readonly buffer: Buffer;
}

/** Puts a block on the clipboard, as a spreadsheet does, and pastes it where the keyboard is. */
export async function pasteInto(target: Locator, rows: readonly (readonly string[])[]): Promise<void> {
  const page = target.page();
  const block = rows.map((row) => row.join('\t')).join('\n');
  await page.evaluate((text) => navigator.clipboard.writeText(text), block);
  await target.focus();
  await page.keyboard.press('Control+V');
}

/** The day so many days from now, as a date field takes it. */
export function dayFromNow(days: number): string {
  return new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);
}

/** A drawing of one page with one line of text. */
export function pdfFile(name: string, words: string): TestFile {
  const text = `BT /F1 18 Tf 60 760 Td (${words}) Tj ET`;
  const objects = [
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 595 842] /Contents 4 0 R /Resources << /Font << /F1 5 0 R >> >> >>',
    `<< /Length ${text.length} >>\nstream\n${text}\nendstream`,
    '<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica >>',
  ];
  let body = '%PDF-1.4\n';
  const places = objects.map((object, index) => {
    const at = body.length;
    body += `${index + 1} 0 obj\n${object}\nendobj\n`;
    return at;
  });
  const table = places.map((place) => `${String(place).padStart(10, '0')} 00000 n \n`).join('');
  const start = body.length;
  body += `xref\n0 ${objects.length + 1}\n0000000000 65535 f \n${table}`;
  body += `trailer\n<< /Size ${objects.length + 1} /Root 1 0 R >>\nstartxref\n${start}\n%%EOF\n`;
  return { name, mimeType: 'application/pdf', buffer: Buffer.from(body, 'latin1') };
}
