import { openFont, type Outline, type SourceFont } from './source-font.ts';
import { writeTrueType } from './write-truetype.ts';

export const faceNames = ['text', 'strong', 'figures', 'strong-figures'] as const;
export type FaceName = (typeof faceNames)[number];
/** TrueType files by the part they play in a document. */
export type Faces = Readonly<Record<FaceName, Uint8Array>>;

const family = '@fontsource-variable/atkinson-hyperlegible';
/** Greek, Cyrillic and signs of mathematics, which the letters of the product lack. */
const further = 'pdfjs-dist/standard_fonts/LiberationSans';

interface Recipe {
  readonly name: string;
  readonly family: 'next' | 'mono';
  readonly weight: number;
  readonly further: string;
}

const recipes: Record<FaceName, Recipe> = {
  text: { name: 'TrammelText', family: 'next', weight: 400, further: 'Regular' },
  strong: { name: 'TrammelStrong', family: 'next', weight: 700, further: 'Bold' },
  figures: { name: 'TrammelFigures', family: 'mono', weight: 400, further: 'Regular' },
  'strong-figures': { name: 'TrammelStrongFigures', family: 'mono', weight: 700, further: 'Bold' },
};

/** Signs of drawings that no font has, and the letter that is drawn alike. */
const alike = new Map([
  ['⌀', 'Ø'],
  ['∅', 'Ø'],
  ['µ', 'μ'],
  ['\u2010', '-'],
  ['\u2011', '-'],
  ['\u202f', ' '],
]);

/**
 * The letters of the product in the weights that documents use, each with every letter it is ever asked for in one
 * file: no text has to be cut where it changes alphabets. Costs a moment, so it is done once a process.
 */
export function buildFaces(): Faces {
  const opened = new Map<string, SourceFont>();
  const open: Open = (file, weight) => {
    const key = `${file} ${weight ?? ''}`;
    let source = opened.get(key);
    if (!source) opened.set(key, (source = openFont(file, weight)));
    return source;
  };
  return {
    text: buildFace(recipes.text, open),
    strong: buildFace(recipes.strong, open),
    figures: buildFace(recipes.figures, open),
    'strong-figures': buildFace(recipes['strong-figures'], open),
  };
}

type Open = (file: string, weight: number | null) => SourceFont;

function buildFace(recipe: Recipe, open: Open): Uint8Array {
  const part = (letters: string) =>
    open(
      `${family}-${recipe.family}/files/atkinson-hyperlegible-${recipe.family}-${letters}-wght-normal.woff2`,
      recipe.weight,
    );
  const main = part('latin');
  const glyphs = new Map<number, Outline>();
  for (const source of [main, part('latin-ext'), open(`${further}-${recipe.further}.ttf`, null)]) {
    addLetters(glyphs, source);
  }
  for (const [sign, letter] of alike) {
    const drawn = glyphs.get(letter.codePointAt(0) ?? 0);
    const code = sign.codePointAt(0) ?? 0;
    if (drawn && !glyphs.has(code)) glyphs.set(code, drawn);
  }
  const { font } = main;
  return writeTrueType({
    name: recipe.name,
    isFixedPitch: recipe.family === 'mono',
    ascent: font.ascent,
    descent: font.descent,
    capHeight: font.capHeight,
    xHeight: font.xHeight,
    missing: hollowBox,
    glyphs,
  });
}

function addLetters(glyphs: Map<number, Outline>, source: SourceFont): void {
  for (const code of source.characters) {
    if (code >= 32 && !glyphs.has(code)) glyphs.set(code, source.outlineOf(code));
  }
}

const corner = (x: number, y: number) => ({ x, y, onCurve: true });
const hollowBox: Outline = {
  advance: 600,
  contours: [
    [corner(60, 0), corner(60, 660), corner(540, 660), corner(540, 0)],
    [corner(110, 50), corner(490, 50), corner(490, 610), corner(110, 610)],
  ],
};
