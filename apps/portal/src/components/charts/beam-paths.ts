import { frame, type Beam } from './beam-geometry.ts';

/* Each kind of mark of a beam is one path, however many pieces: a page draws hundreds of beams. */

const { line, dot } = frame;

const short = (x: number) => Math.round(x * 10) / 10;

/** Filled circles. */
export function dotsPath(xs: readonly number[], radius: number = dot, y: number = line): string {
  const arcs = `a${radius} ${radius} 0 1 0 ${2 * radius} 0a${radius} ${radius} 0 1 0-${2 * radius} 0`;
  let path = '';
  for (const x of xs) path += `M${short(x - radius)} ${y}${arcs}`;
  return path;
}

/** The filled half of a half dot; its ring is drawn with `dotsPath`. */
export function halvesPath(xs: readonly number[], radius: number = dot + 0.5, y: number = line): string {
  let path = '';
  for (const x of xs) path += `M${x} ${y - radius}a${radius} ${radius} 0 0 0 0 ${2 * radius}z`;
  return path;
}

export function diamondsPath(marks: readonly { x: number }[], y: number = line): string {
  let path = '';
  for (const { x } of marks) path += `M${x} ${y - 5}l4.5 5-4.5 5-4.5-5z`;
  return path;
}

/** Arrow heads at the rim, for values that lie further out than the drawing reaches. */
export function arrowsPath(marks: Beam['outside']): string {
  let path = '';
  if (marks.some((mark) => mark.beyond === 'left')) path += `M4 ${line - 4}L0.5 ${line}L4 ${line + 4}`;
  if (marks.some((mark) => mark.beyond === 'right')) {
    path += `M${frame.width - 4} ${line - 4}L${frame.width - 0.5} ${line}L${frame.width - 4} ${line + 4}`;
  }
  return path;
}

/** A trammel point: a head on the beam and a leg that ends in a tip. */
export function limitsPath(xs: readonly (number | null)[]): string {
  let path = '';
  for (const x of xs) if (x !== null) path += `M${x - 3.5} 1h7v4l-2 1v9l-1.5 3-1.5-3v-9l-2-1z`;
  return path;
}

export function hatchPath(bands: Beam['guards']): string {
  let path = '';
  for (const { from, to } of bands) {
    const width = to - from;
    const lean = Math.min(4, width);
    const lines = Math.max(1, Math.floor((width - lean) / 3) + 1);
    for (let i = 0; i < lines; i += 1) path += `M${short(from + i * 3)} ${line + 4}l${lean}-8`;
  }
  return path;
}

export function bracketPath(bracket: NonNullable<Beam['bracket']>): string {
  const { from, to, openLeft, openRight } = bracket;
  return `M${from} ${openLeft ? 25 : 21}V25H${to}${openRight ? '' : 'V21'}`;
}

/** Marks of an attribute characteristic in groups of five; the failed ones last. */
export function attributeMarks(
  checked: number,
  failed: number,
): { passed: number[]; failed: { x: number }[] } {
  const place = (index: number) => frame.edge + index * 8 + Math.floor(index / 5) * 5;
  const all = Array.from({ length: checked }, (_, index) => place(index));
  return { passed: all.slice(0, checked - failed), failed: all.slice(checked - failed).map((x) => ({ x })) };
}

/** More marks than this are written as counts. */
export const mostAttributeMarks = 20;
