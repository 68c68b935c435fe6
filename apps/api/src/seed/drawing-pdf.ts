import PDFDocument from 'pdfkit';

export interface DrawingFacts {
  readonly number: string;
  readonly name: string;
  readonly revision: string;
  readonly material: string;
  readonly characteristics: readonly {
    readonly balloon: string;
    readonly description: string;
    readonly zone: string;
  }[];
}

const width = 842;
const height = 595;

/**
 * A ballooned sheet for the demo: frame with zones, an outline that stands for the part, a balloon for every
 * characteristic at its zone, and a title block. It is a stand-in for a drawing, not one to make the part by.
 */
export function drawingPdf(facts: DrawingFacts): Promise<Buffer> {
  const page = new PDFDocument({
    size: [width, height],
    margin: 0,
    info: { Title: `${facts.number} rev ${facts.revision}` },
  });
  const chunks: Buffer[] = [];
  page.on('data', (chunk: Buffer) => chunks.push(chunk));
  const done = new Promise<Buffer>((resolve) => page.on('end', () => resolve(Buffer.concat(chunks))));
  frame(page);
  outline(page);
  facts.characteristics.forEach((row, index) => balloon(page, row, index));
  titleBlock(page, facts);
  page.end();
  return done;
}

type Page = InstanceType<typeof PDFDocument>;

function frame(page: Page): void {
  page
    .lineWidth(1)
    .rect(24, 24, width - 48, height - 48)
    .stroke('#22262b');
  page.fontSize(7).fillColor('#22262b');
  for (let column = 0; column < 8; column += 1)
    page.text(String(column + 1), 60 + column * 98, 27, { lineBreak: false });
  for (let row = 0; row < 5; row += 1)
    page.text('ABCDE'.charAt(row), 28, 60 + row * 98, { lineBreak: false });
}

function outline(page: Page): void {
  page.lineWidth(1.2);
  page.rect(150, 170, 430, 170).stroke('#1d3f72');
  page.rect(230, 130, 120, 250).stroke('#1d3f72');
  page.circle(470, 255, 46).stroke('#1d3f72');
  page.circle(470, 255, 24).stroke('#1d3f72');
  page.lineWidth(0.5).dash(8, { space: 3 }).moveTo(120, 255).lineTo(610, 255).stroke('#8a6418').undash();
}

function balloon(page: Page, row: { balloon: string; description: string }, index: number): void {
  const x = 92 + (index % 8) * 84;
  const y = index < 8 ? 82 : index < 16 ? 412 : 452;
  const target = { x: 170 + (index % 8) * 52, y: 180 + Math.floor(index / 8) * 60 };
  page
    .lineWidth(0.5)
    .moveTo(x, y + (index < 8 ? 10 : -10))
    .lineTo(target.x, target.y)
    .stroke('#5b626b');
  page.lineWidth(0.9).circle(x, y, 10).fillAndStroke('#ffffff', '#8a6418');
  page
    .fillColor('#22262b')
    .fontSize(8)
    .text(row.balloon, x - 10, y - 4, { width: 20, align: 'center', lineBreak: false });
}

function titleBlock(page: Page, facts: DrawingFacts): void {
  const left = width - 24 - 330;
  const top = height - 24 - 78;
  page.lineWidth(0.8).rect(left, top, 330, 78).stroke('#22262b');
  const cell = (x: number, y: number, w: number, caption: string, value: string) => {
    page
      .lineWidth(0.5)
      .rect(left + x, top + y, w, 26)
      .stroke('#22262b');
    page
      .fillColor('#5b626b')
      .fontSize(5.5)
      .text(caption, left + x + 3, top + y + 3, { lineBreak: false });
    page
      .fillColor('#22262b')
      .fontSize(9)
      .text(value, left + x + 3, top + y + 12, { width: w - 6, lineBreak: false });
  };
  cell(0, 0, 220, 'Part number', facts.number);
  cell(220, 0, 110, 'Revision', facts.revision);
  cell(0, 26, 330, 'Description', facts.name);
  cell(0, 52, 220, 'Material', facts.material);
  cell(220, 52, 110, 'Units', 'mm');
}
