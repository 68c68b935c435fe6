import type { Outline } from './source-font.ts';

export interface FaceDesign {
  readonly name: string;
  readonly isFixedPitch: boolean;
  readonly ascent: number;
  readonly descent: number;
  readonly capHeight: number;
  readonly xHeight: number;
  /** Box shown for a letter that no font has. */
  readonly missing: Outline;
  readonly glyphs: ReadonlyMap<number, Outline>;
}

const em = 1000;

/** A static TrueType file: outlines, widths and the map of letters; what a PDF needs and no more. */
export function writeTrueType(design: FaceDesign): Uint8Array {
  const letters = [...design.glyphs].sort(([one], [other]) => one - other);
  const outlines = [design.missing, ...letters.map(([, outline]) => outline)];
  const bodies = outlines.map(glyphBody);
  const offsets = [0];
  for (const body of bodies) offsets.push((offsets.at(-1) ?? 0) + body.length);
  const boxes = outlines.map(boxOf);
  const box = {
    xMin: Math.min(...boxes.map((one) => one.xMin)),
    yMin: Math.min(...boxes.map((one) => one.yMin)),
    xMax: Math.max(...boxes.map((one) => one.xMax)),
    yMax: Math.max(...boxes.map((one) => one.yMax)),
  };
  const widest = Math.max(...outlines.map((outline) => outline.advance));
  return assemble({
    'OS/2': os2(design, letters),
    cmap: characterMap(letters.map(([code]) => code)),
    glyf: Buffer.concat(bodies),
    head: head(box),
    hhea: hhea(design, widest, outlines.length),
    hmtx: Buffer.concat(outlines.map((outline, at) => shorts(outline.advance, signed(boxes[at]?.xMin ?? 0)))),
    loca: longs(...offsets),
    maxp: maxp(outlines),
    name: names(design.name),
    post: Buffer.concat([
      longs(0x0003_0000, 0),
      shorts(signed(-75), 50),
      longs(design.isFixedPitch ? 1 : 0, 0, 0, 0, 0),
    ]),
  });
}

const signed = (value: number) => value & 0xffff;

function shorts(...values: number[]): Buffer {
  const bytes = Buffer.alloc(values.length * 2);
  values.forEach((value, at) => bytes.writeUInt16BE(value, at * 2));
  return bytes;
}

function longs(...values: number[]): Buffer {
  const bytes = Buffer.alloc(values.length * 4);
  values.forEach((value, at) => bytes.writeUInt32BE(value, at * 4));
  return bytes;
}

function boxOf(outline: Outline) {
  const points = outline.contours.flat();
  const of = (pick: (...values: number[]) => number, axis: 'x' | 'y') =>
    points.length === 0 ? 0 : pick(...points.map((point) => point[axis]));
  return {
    xMin: of(Math.min, 'x'),
    yMin: of(Math.min, 'y'),
    xMax: of(Math.max, 'x'),
    yMax: of(Math.max, 'y'),
  };
}

function glyphBody(outline: Outline): Buffer {
  const contours = outline.contours.filter((contour) => contour.length > 0);
  if (contours.length === 0) return Buffer.alloc(0);
  const { xMin, yMin, xMax, yMax } = boxOf(outline);
  const points = contours.flat();
  let last = -1;
  const ends = contours.map((contour) => (last += contour.length));
  const steps = (axis: 'x' | 'y') =>
    points.map((point, at) => signed(point[axis] - (points[at - 1]?.[axis] ?? 0)));
  const body = Buffer.concat([
    shorts(contours.length, signed(xMin), signed(yMin), signed(xMax), signed(yMax), ...ends, 0),
    Buffer.from(points.map((point) => (point.onCurve ? 1 : 0))),
    shorts(...steps('x')),
    shorts(...steps('y')),
  ]);
  return Buffer.concat([body, Buffer.alloc((4 - (body.length % 4)) % 4)]);
}

function characterMap(codes: readonly number[]): Buffer {
  const groups: { first: number; last: number; glyph: number }[] = [];
  codes.forEach((code, at) => {
    const open = groups.at(-1);
    if (open && open.last === code - 1) open.last = code;
    else groups.push({ first: code, last: code, glyph: at + 1 });
  });
  return Buffer.concat([
    shorts(0, 1, 3, 10),
    longs(12),
    shorts(12, 0),
    longs(16 + groups.length * 12, 0, groups.length),
    ...groups.map(({ first, last, glyph }) => longs(first, last, glyph)),
  ]);
}

function head(box: { xMin: number; yMin: number; xMax: number; yMax: number }): Buffer {
  return Buffer.concat([
    longs(0x0001_0000, 0x0001_0000, 0, 0x5f0f_3cf5),
    shorts(0, em),
    longs(0, 0, 0, 0),
    shorts(signed(box.xMin), signed(box.yMin), signed(box.xMax), signed(box.yMax), 0, 8, 2, 1, 0),
  ]);
}

function hhea(design: FaceDesign, widest: number, count: number): Buffer {
  const { ascent, descent } = design;
  return Buffer.concat([
    longs(0x0001_0000),
    shorts(signed(ascent), signed(descent), 0, widest, 0, 0, widest, 1, 0, 0, 0, 0, 0, 0, 0, count),
  ]);
}

function maxp(outlines: readonly Outline[]): Buffer {
  const points = Math.max(...outlines.map((outline) => outline.contours.flat().length));
  const contours = Math.max(...outlines.map((outline) => outline.contours.length));
  return Buffer.concat([
    longs(0x0001_0000),
    shorts(outlines.length, points, contours, 0, 0, 1, 0, 0, 0, 0, 0, 0, 0, 0),
  ]);
}

function os2(design: FaceDesign, letters: readonly (readonly [number, Outline])[]): Buffer {
  const first = Math.min(letters[0]?.[0] ?? 32, 0xffff);
  const last = Math.min(letters.at(-1)?.[0] ?? 32, 0xffff);
  return Buffer.concat([
    shorts(2, 500, 400, 5, 0, 650, 600, 0, 75, 650, 600, 0, 350, 50, 250, 0),
    Buffer.alloc(10),
    longs(0, 0, 0, 0),
    Buffer.from('NONE'),
    shorts(0x40, first, last, signed(design.ascent), signed(design.descent), 0),
    shorts(design.ascent, Math.abs(design.descent)),
    longs(0, 0),
    shorts(signed(design.xHeight), signed(design.capHeight), 0, 32, 0),
  ]);
}

function names(name: string): Buffer {
  const entries = [1, 4, 6].map((id) => ({ id, text: Buffer.from(name, 'utf16le').swap16() }));
  let offset = 0;
  const records = entries.map(({ id, text }) => {
    const record = shorts(3, 1, 0x409, id, text.length, offset);
    offset += text.length;
    return record;
  });
  return Buffer.concat([
    shorts(0, entries.length, 6 + entries.length * 12),
    ...records,
    ...entries.map(({ text }) => text),
  ]);
}

function assemble(tables: Record<string, Buffer>): Uint8Array {
  const entries = Object.entries(tables);
  const power = 2 ** Math.floor(Math.log2(entries.length));
  const header = Buffer.concat([
    longs(0x0001_0000),
    shorts(entries.length, power * 16, Math.log2(power), (entries.length - power) * 16),
  ]);
  let offset = 12 + entries.length * 16;
  const directory: Buffer[] = [];
  const bodies: Buffer[] = [];
  for (const [tag, table] of entries) {
    const padded = Buffer.concat([table, Buffer.alloc((4 - (table.length % 4)) % 4)]);
    directory.push(Buffer.from(tag), longs(checksum(padded), offset, table.length));
    bodies.push(padded);
    offset += padded.length;
  }
  return new Uint8Array(Buffer.concat([header, ...directory, ...bodies]));
}

function checksum(padded: Buffer): number {
  let sum = 0;
  for (let at = 0; at < padded.length; at += 4) sum = (sum + padded.readUInt32BE(at)) >>> 0;
  return sum;
}
