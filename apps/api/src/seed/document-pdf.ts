import PDFDocument from 'pdfkit';

/** A one-page stand-in for a document of the package: what it is, for which part, and that it is invented. */
export function documentPdf(title: string, facts: readonly (readonly [string, string])[]): Promise<Buffer> {
  const page = new PDFDocument({ size: 'A4', margin: 56, info: { Title: title } });
  const chunks: Buffer[] = [];
  page.on('data', (chunk: Buffer) => chunks.push(chunk));
  const done = new Promise<Buffer>((resolve) => page.on('end', () => resolve(Buffer.concat(chunks))));
  page.fontSize(16).fillColor('#22262b').text(title).moveDown();
  page.fontSize(10);
  for (const [caption, value] of facts)
    page.fillColor('#5b626b').text(caption, { continued: true }).fillColor('#22262b').text(`  ${value}`);
  page.moveDown().fillColor('#5b626b').text('An invented document of the demo.');
  page.end();
  return done;
}
