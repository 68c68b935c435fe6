import type { TitleFacts } from '../report-scene.ts';
import type { PageWriter, TextStyle } from './page-writer.ts';

interface Cell {
  readonly caption: string;
  readonly value: string;
  /** Columns of eight. */
  readonly span: number;
  readonly style?: TextStyle;
}

const caption: TextStyle = { face: 'text', size: 6, colour: 'pencil' };
const words: TextStyle = { face: 'text', size: 8 };
const figures: TextStyle = { face: 'figures', size: 8 };
const columns = 8;
const inset = 4;
const lineHeight = 9.6;

function lines(title: TitleFacts): Cell[][] {
  return [
    [
      {
        caption: 'Part number',
        value: title.partNumber,
        span: 2,
        style: { face: 'strong-figures', size: 10 },
      },
      { caption: 'Revision', value: title.revision, span: 1, style: figures },
      { caption: 'Description', value: title.description, span: 3 },
      { caption: 'Request', value: title.request, span: 1, style: figures },
      { caption: 'State', value: title.state, span: 1 },
    ],
    [
      { caption: 'Supplier', value: title.supplier, span: 2 },
      { caption: 'Site', value: title.site, span: 1 },
      { caption: 'Customer', value: title.customer, span: 1 },
      { caption: 'Material', value: title.material, span: 1 },
      { caption: 'Units', value: title.units, span: 1 },
      { caption: 'Level', value: String(title.level), span: 1, style: figures },
      { caption: 'Due', value: title.due, span: 1, style: figures },
    ],
  ];
}

/** The same cells in the same places as on the screen; answers where it ends. */
export function drawTitleBlock(
  pages: PageWriter,
  title: TitleFacts,
  left: number,
  top: number,
  width: number,
): number {
  const unit = width / columns;
  let y = top;
  for (const [at, line] of lines(title).entries()) {
    const filled = line.map((cell) => ({
      ...cell,
      wrapped: pages.wrap(cell.value || '–', cell.span * unit - 2 * inset, cell.style ?? words),
    }));
    const height = 10 + Math.max(...filled.map((cell) => cell.wrapped.length)) * lineHeight + 3;
    let x = left;
    if (at > 0) pages.line(left, y, left + width, y);
    for (const { caption: above, span, style, wrapped } of filled) {
      if (x > left) pages.line(x, y, x, y + height);
      pages.text(x + inset, y + 8, above, caption);
      wrapped.forEach((text, row) =>
        pages.text(x + inset, y + 10 + (row + 0.8) * lineHeight, text, style ?? words),
      );
      x += span * unit;
    }
    y += height;
  }
  pages.rectangle(left, top, width, y - top, 'graphite', 0.8);
  return y;
}
