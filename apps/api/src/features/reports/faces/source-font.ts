import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { create, type DecodedGlyph, type Font, type Movements, type OutlinePoint } from 'fontkit';

export interface Point {
  readonly x: number;
  readonly y: number;
  readonly onCurve: boolean;
}
export type Contour = readonly Point[];
export interface Outline {
  readonly advance: number;
  readonly contours: readonly Contour[];
}

/** A font file of an installed package at one weight, drawn in units of 1000 to the em. */
export interface SourceFont {
  readonly font: Font;
  readonly characters: readonly number[];
  outlineOf(codePoint: number): Outline;
}

const installed = createRequire(import.meta.url);

/**
 * The files of the web fonts hold every weight in one, and the reader of this format draws the lightest or the default
 * of them only. So the movements between the weights are applied here, point by point.
 */
export function openFont(file: string, weight: number | null): SourceFont {
  const bytes = readFileSync(installed.resolve(file));
  const font = create(bytes);
  const movements = weight === null ? null : openMovements(bytes, weight);
  const scale = 1000 / font.unitsPerEm;
  const scaled = (contour: readonly OutlinePoint[]): Contour =>
    contour.map(({ x, y, onCurve }) => ({ x: Math.round(x * scale), y: Math.round(y * scale), onCurve }));
  const outlines = new Map<number, Outline>();
  const draw = (codePoint: number): Outline => {
    const drawn = drawGlyph({ font, movements }, font.glyphForCodePoint(codePoint).id, 0);
    return { advance: Math.round(drawn.advance * scale), contours: drawn.contours.map(scaled) };
  };
  return {
    font,
    characters: font.characterSet,
    outlineOf: (codePoint) => {
      let outline = outlines.get(codePoint);
      if (!outline) outlines.set(codePoint, (outline = draw(codePoint)));
      return outline;
    },
  };
}

/** Read from a font of its own: the reader stumbles over composite letters once it knows of a weight. */
function openMovements(bytes: Uint8Array, weight: number): Movements {
  const font = create(bytes);
  font.variationCoords = (font.fvar?.axis ?? []).map(({ axisTag }) => (axisTag === 'wght' ? weight : 0));
  const movements = font._variationProcessor;
  if (!movements) throw new Error('A font of one weight cannot be drawn in another.');
  return movements;
}

interface Source {
  readonly font: Font;
  readonly movements: Movements | null;
}

interface Drawn {
  readonly advance: number;
  readonly contours: OutlinePoint[][];
}

const deepest = 5;

function drawGlyph(source: Source, id: number, depth: number): Drawn {
  const { font, movements } = source;
  const glyph = font.getGlyph(id);
  const decoded: DecodedGlyph | null = glyph._decode();
  const parts = decoded?.components ?? [];
  const points = decoded?.points ?? [];
  const sample = points[0] ?? anyPoint(font);
  const movable =
    parts.length > 0 ? parts.map(({ dx, dy }) => alone(sample, dx, dy)) : points.map((one) => one.copy());
  const phantoms = [0, glyph.advanceWidth, 0, 0].map((x) => alone(sample, x, 0));
  const all = [...movable, ...phantoms];
  movements?.transformPoints(id, all);
  const [left, right] = all.slice(movable.length);
  const advance = (right?.x ?? 0) - (left?.x ?? 0);
  if (parts.length === 0) return { advance, contours: contoursOf(all.slice(0, movable.length)) };
  if (depth >= deepest) return { advance, contours: [] };
  const contours = parts.flatMap((part, at) => {
    const place = all[at] ?? sample;
    return drawGlyph(source, part.glyphID, depth + 1).contours.map((contour) =>
      contour.map((one) =>
        pointAt(
          one,
          one.x * part.scaleX + one.y * part.scale01 + place.x,
          one.y * part.scaleY + one.x * part.scale10 + place.y,
        ),
      ),
    );
  });
  return { advance, contours };
}

function pointAt(like: OutlinePoint, x: number, y: number): OutlinePoint {
  const point = like.copy();
  point.x = x;
  point.y = y;
  return point;
}

/** A point that is a contour by itself: the place of a part, or a bound of the glyph. */
function alone(like: OutlinePoint, x: number, y: number): OutlinePoint {
  const point = pointAt(like, x, y);
  point.endContour = true;
  return point;
}

function anyPoint(font: Font): OutlinePoint {
  const point = font.glyphForCodePoint(font.characterSet.find((code) => code > 32) ?? 33)._decode()
    ?.points?.[0];
  if (!point) throw new Error('A font without outlines cannot be used in documents.');
  return point;
}

function contoursOf(points: readonly OutlinePoint[]): OutlinePoint[][] {
  const contours: OutlinePoint[][] = [];
  let open: OutlinePoint[] = [];
  for (const point of points) {
    open.push(point);
    if (!point.endContour) continue;
    contours.push(open);
    open = [];
  }
  return contours;
}
