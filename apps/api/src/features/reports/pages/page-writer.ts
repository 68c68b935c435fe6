import PDFDocument from 'pdfkit';
import { faceNames, type FaceName, type Faces } from '../faces/build-faces.ts';

/** The colours of the product on paper, as the numbers of a PDF. */
const colours = {
  graphite: '0.133 0.149 0.169',
  pencil: '0.357 0.384 0.42',
  rule: '0.851 0.831 0.78',
  brass: '0.541 0.392 0.094',
  verdigris: '0.11 0.431 0.361',
  vermilion: '0.702 0.204 0.122',
  plum: '0.416 0.239 0.561',
} as const;
export type Colour = keyof typeof colours;

export interface TextStyle {
  readonly face: FaceName;
  readonly size: number;
  readonly colour?: Colour;
}

interface Letter {
  readonly code: string;
  /** Advance in thousandths of the size. */
  readonly advance: number;
}

/** The part of a PDF document that its types leave out: fonts by letter codes. */
interface EmbeddedFont {
  readonly id: string;
  encode(text: string): [string[], { advanceWidth: number }[]];
  ref(): unknown;
}
interface OpenDocument {
  readonly _font: EmbeddedFont;
  readonly page: { readonly fonts: Record<string, unknown> };
}

interface Face {
  readonly font: EmbeddedFont;
  readonly letters: Map<string, Letter>;
  /** Texts lately written: a table says the same words on every row. */
  readonly texts: Map<string, Letter>;
}
const keptTexts = 4000;

const number = (value: number) => String(Math.round(value * 10) / 10);

/**
 * Writes the marks of a page itself and leaves fonts, compression and structure of the file to pdfkit: a results table
 * has some ten thousand short texts, and each would otherwise pass through layout, state and transformation anew.
 * Places are in points from the upper left corner; text stands on its base line.
 */
export class PageWriter {
  readonly width: number;
  readonly height: number;
  pageCount = 0;
  private readonly document: PDFKit.PDFDocument;
  private readonly faces = new Map<FaceName, Face>();
  private readonly finished: Promise<Uint8Array>;
  private marks: string[] = [];
  private colour: Colour | null = null;
  private font = '';
  private isInText = false;

  constructor(faces: Faces, { title, layout }: { title: string; layout: 'portrait' | 'landscape' }) {
    this.document = new PDFDocument({
      size: 'A4',
      layout,
      margin: 0,
      autoFirstPage: false,
      bufferPages: true,
      lang: 'en',
      displayTitle: true,
      info: { Title: title, Creator: 'Trammel', Producer: 'Trammel' },
    });
    [this.width, this.height] = layout === 'portrait' ? [595.28, 841.89] : [841.89, 595.28];
    const chunks: Buffer[] = [];
    this.document.on('data', (chunk: Buffer) => chunks.push(chunk));
    this.finished = new Promise((resolve, reject) => {
      this.document.on('end', () => resolve(new Uint8Array(Buffer.concat(chunks))));
      this.document.on('error', reject);
    });
    for (const name of faceNames) {
      this.document.font(Buffer.from(faces[name]));
      this.faces.set(name, { font: this.open()._font, letters: new Map(), texts: new Map() });
    }
  }

  addPage(): void {
    this.flush();
    this.document.addPage();
    this.pageCount += 1;
    this.beginMarks();
  }

  /** Draws on every page again once their number is known. */
  onEveryPage(draw: (page: number, of: number) => void): void {
    this.flush();
    for (let page = 0; page < this.pageCount; page += 1) {
      this.document.switchToPage(page);
      this.beginMarks();
      draw(page + 1, this.pageCount);
      this.flush();
    }
  }

  finish(): Promise<Uint8Array> {
    this.flush();
    this.document.end();
    return this.finished;
  }

  widthOf(text: string, { face, size }: TextStyle): number {
    return (this.encoded(face, text).advance * size) / 1000;
  }

  text(x: number, y: number, text: string, style: TextStyle): void {
    const { code } = this.encoded(style.face, text);
    if (code === '') return;
    this.fill(style.colour ?? 'graphite');
    if (!this.isInText) this.marks.push('BT');
    this.isInText = true;
    const font = `/${this.face(style.face).font.id} ${number(style.size)} Tf`;
    if (font !== this.font) this.marks.push(font);
    this.font = font;
    this.marks.push(`1 0 0 -1 ${number(x)} ${number(y)} Tm <${code}> Tj`);
  }

  textRight(right: number, y: number, text: string, style: TextStyle): void {
    this.text(right - this.widthOf(text, style), y, text, style);
  }

  line(x1: number, y1: number, x2: number, y2: number, colour: Colour = 'rule', thickness = 0.5): void {
    this.path(`${number(x1)} ${number(y1)} m ${number(x2)} ${number(y2)} l S`, colour, thickness);
  }

  rectangle(x: number, y: number, width: number, height: number, colour: Colour, thickness: number): void {
    const place = [x, y, width, height].map(number).join(' ');
    this.path(`${place} re S`, colour, thickness);
  }

  /** Path operators that end in a stroke. */
  path(operators: string, colour: Colour, thickness: number): void {
    this.endText();
    this.marks.push(`${colours[colour]} RG ${number(thickness)} w ${operators}`);
  }

  /** Path operators that end in a filling. */
  area(operators: string, colour: Colour): void {
    this.endText();
    this.fill(colour);
    this.marks.push(operators);
  }

  /** Lines no wider than given: at blanks where possible, inside a word where not. */
  wrap(text: string, width: number, style: TextStyle): string[] {
    const lines: string[] = [];
    for (const paragraph of text.normalize('NFC').split(/\r?\n/)) {
      if (this.widthOf(paragraph, style) <= width) {
        lines.push(paragraph);
        continue;
      }
      let line = '';
      for (const word of paragraph.split(/\s+/)) {
        const longer = line === '' ? word : `${line} ${word}`;
        if (this.widthOf(longer, style) <= width) {
          line = longer;
          continue;
        }
        if (line !== '') lines.push(line);
        line = '';
        for (const letter of word) {
          if (line !== '' && this.widthOf(line + letter, style) > width) {
            lines.push(line);
            line = '';
          }
          line += letter;
        }
      }
      lines.push(line);
    }
    return lines;
  }

  private open(): OpenDocument {
    return this.document as unknown as OpenDocument;
  }

  private face(name: FaceName): Face {
    const face = this.faces.get(name);
    if (!face) throw new Error(`The face ${name} is missing.`);
    return face;
  }

  private encoded(name: FaceName, text: string): Letter {
    const face = this.face(name);
    let known = face.texts.get(text);
    if (known) return known;
    let code = '';
    let advance = 0;
    for (const letter of text) {
      const one = face.letters.get(letter) ?? this.addLetter(face, letter);
      code += one.code;
      advance += one.advance;
    }
    if (face.texts.size >= keptTexts) face.texts.clear();
    face.texts.set(text, (known = { code, advance }));
    return known;
  }

  private addLetter({ font, letters }: Face, letter: string): Letter {
    const [codes, positions] = font.encode(letter);
    const advance = positions.reduce((sum, position) => sum + position.advanceWidth, 0);
    const added = { code: codes.join(''), advance };
    letters.set(letter, added);
    return added;
  }

  private endText(): void {
    if (this.isInText) this.marks.push('ET');
    this.isInText = false;
  }

  private fill(colour: Colour): void {
    if (this.colour === colour) return;
    this.colour = colour;
    this.marks.push(`${colours[colour]} rg`);
  }

  private beginMarks(): void {
    this.colour = null;
    this.font = '';
    const { page } = this.open();
    for (const { font } of this.faces.values()) page.fonts[font.id] ??= font.ref();
  }

  private flush(): void {
    this.endText();
    if (this.marks.length > 0) this.document.addContent(Buffer.from(`${this.marks.join('\n')}\n`, 'latin1'));
    this.marks = [];
  }
}
