import type { TitleFacts } from '../report-scene.ts';
import { momentInUtc } from '../report-words.ts';
import type { Colour, PageWriter, TextStyle } from './page-writer.ts';
import { drawTitleBlock } from './title-block.ts';

export const margin = 34;
const foot = 30;
const caption: TextStyle = { face: 'text', size: 6.5, colour: 'pencil' };
const words: TextStyle = { face: 'text', size: 8.5 };

/** What is written from top to bottom, page after page, each with the title block at its head. */
export class Flow {
  y = 0;
  readonly left = margin;
  readonly width: number;
  private readonly bottom: number;

  constructor(
    readonly pages: PageWriter,
    private readonly name: string,
    private readonly title: TitleFacts,
    /** Repeated under the title block of each further page. */
    private underHead: ((flow: Flow) => void) | null = null,
  ) {
    this.width = pages.width - 2 * margin;
    this.bottom = pages.height - margin - foot / 2;
    this.startPage();
  }

  /** Starts a new page where this much does not fit. */
  ensure(height: number): void {
    if (this.y + height <= this.bottom) return;
    this.startPage();
    this.underHead?.(this);
  }

  startPage(): void {
    const { pages } = this;
    pages.addPage();
    pages.text(margin, margin + 4, this.name, { face: 'strong', size: 12 });
    this.y = drawTitleBlock(pages, this.title, margin, margin + 11, this.width) + 8;
  }

  /** What follows is no longer under the head of the table. */
  endTable(): void {
    this.underHead = null;
  }

  heading(text: string, follows = 40): void {
    this.ensure(18 + follows);
    this.y += 15;
    this.pages.text(this.left, this.y, text, { face: 'strong', size: 9.5 });
    this.y += 5;
  }

  paragraph(text: string, style: TextStyle = words, indent = 0): void {
    const step = style.size * 1.3;
    for (const line of this.pages.wrap(text, this.width - indent, style)) {
      this.ensure(step);
      this.y += step;
      this.pages.text(this.left + indent, this.y, line, style);
    }
    this.y += 3;
  }

  /** A paragraph with a bar at its side, so that it is not passed over. */
  notice(text: string, colour: Colour): void {
    const lines = this.pages.wrap(text, this.width - 12, words);
    const height = lines.length * 11 + 6;
    this.ensure(height + 4);
    const top = this.y + 3;
    this.pages.line(this.left + 1.5, top, this.left + 1.5, top + height, colour, 3);
    lines.forEach((line, at) => this.pages.text(this.left + 10, top + 11 + at * 11, line, words));
    this.y = top + height + 4;
  }

  /** Ruled cells, small caption over value. */
  grid(
    cells: readonly (readonly [caption: string, value: string, isFigure?: boolean])[],
    columns: number,
  ): void {
    const unit = this.width / columns;
    for (let at = 0; at < cells.length; at += columns) {
      const line = cells.slice(at, at + columns).map(([above, value, isFigure]) => {
        const style: TextStyle = isFigure === true ? { face: 'figures', size: 8.5 } : words;
        return { above, style, lines: this.pages.wrap(value || 'not stated', unit - 10, style) };
      });
      const height = 13 + Math.max(...line.map((cell) => cell.lines.length)) * 11;
      this.ensure(height);
      line.forEach(({ above, style, lines }, column) => {
        const x = this.left + column * unit;
        this.pages.rectangle(x, this.y, unit, height, 'rule', 0.5);
        this.pages.text(x + 5, this.y + 8.5, above, caption);
        lines.forEach((text, row) => this.pages.text(x + 5, this.y + 19 + row * 11, text, style));
      });
      this.y += height;
    }
  }

  /** Page numbers need the number of pages, so they come last. */
  finish(madeAt: string): Promise<Uint8Array> {
    const { pages, title } = this;
    const y = pages.height - margin + 6;
    const what = `${this.name} · ${title.partNumber} rev ${title.revision} · request ${title.request} · made ${momentInUtc(madeAt)}`;
    pages.onEveryPage((page, of) => {
      pages.line(margin, y - 10, pages.width - margin, y - 10);
      pages.text(margin, y, what, caption);
      pages.textRight(pages.width - margin, y, `page ${page} of ${of}`, { ...caption, face: 'figures' });
    });
    return pages.finish();
  }
}
