import type { Verdict } from '@trammel/shared/status';
import type { Colour, PageWriter } from './page-writer.ts';

export const verdictColours: Record<Verdict, Colour> = {
  'in-tolerance': 'verdigris',
  'out-of-tolerance': 'vermilion',
  undecided: 'plum',
  'not-measured': 'pencil',
  'no-verdict': 'pencil',
};

const curve = 0.5523;
const point = (...places: number[]) => places.map((place) => place.toFixed(2)).join(' ');

/** Right half from top to bottom, then the left half back, as curves. */
function halves(x: number, y: number, r: number): { right: string; left: string } {
  const k = r * curve;
  return {
    right: `${point(x + k, y - r, x + r, y - k, x + r, y)} c ${point(x + r, y + k, x + k, y + r, x, y + r)} c`,
    left: `${point(x - k, y + r, x - r, y + k, x - r, y)} c ${point(x - r, y - k, x - k, y - r, x, y - r)} c`,
  };
}

/** Filled dot, diamond, half dot, dashed ring, dash: the shapes of the screen, about a centre. */
export function drawVerdict(pages: PageWriter, verdict: Verdict, x: number, y: number, r = 2.4): void {
  const colour = verdictColours[verdict];
  const top = `${point(x, y - r)} m`;
  const { right, left } = halves(x, y, r);
  switch (verdict) {
    case 'in-tolerance':
      return pages.area(`${top} ${right} ${left} f`, colour);
    case 'out-of-tolerance': {
      const d = r * 1.3;
      return pages.area(
        `${point(x, y - d)} m ${point(x + d, y)} l ${point(x, y + d)} l ${point(x - d, y)} l f`,
        colour,
      );
    }
    case 'undecided':
      pages.path(`${top} ${right} ${left} S`, colour, 0.7);
      return pages.area(`${point(x, y + r)} m ${left} f`, colour);
    case 'not-measured':
      return pages.path(`[1.4 0.9] 0 d ${top} ${right} ${left} S [] 0 d`, colour, 0.7);
    case 'no-verdict':
      return pages.path(`${point(x - r, y)} m ${point(x + r, y)} l S`, colour, 0.9);
  }
}
