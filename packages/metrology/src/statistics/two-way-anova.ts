import { powerOfTen, ratio, ratioToNumber } from '../decimal/index.ts';
import type { Ratio } from '../decimal/index.ts';
import { fUpperTail } from '../distributions/f.ts';
import { undetermined } from '../result.ts';
import type { Undetermined } from '../result.ts';
import { divideFractions, subtractFractions } from './fractions.ts';
import type { VarianceSource } from './one-way-anova.ts';
import { readExactly } from './readings.ts';
import type { Reading } from './readings.ts';

/** A line of the analysis with its test against the residual. */
export interface TestedSource extends VarianceSource {
  readonly f: number | Undetermined;
  readonly p: number | Undetermined;
}

/** Two-way analysis of variance of a balanced, crossed layout. */
export interface TwoWayAnova {
  readonly method: 'two-way analysis of variance, fixed effects, exact decimal sums';
  readonly n: number;
  readonly rows: TestedSource;
  readonly columns: TestedSource;
  /** Null where each cell holds one reading: the interaction is then the residual. */
  readonly interaction: TestedSource | null;
  readonly residual: VarianceSource;
  readonly total: { readonly df: number; readonly sumOfSquares: number };
}

const sum = (values: readonly bigint[]) => values.reduce((a, b) => a + b, 0n);
const sumOfSquares = (values: readonly bigint[], each: number) =>
  ratio(
    values.reduce((a, b) => a + b * b, 0n),
    BigInt(each),
  );

/** Sizes of a balanced layout, or the reason why it is not one. */
function sizes(cells: readonly (readonly (readonly Reading[])[])[]) {
  const a = cells.length;
  const b = cells[0]?.length ?? 0;
  const r = cells[0]?.[0]?.length ?? 0;
  if (a < 2 || b < 2) return undetermined('too-few', 'Both factors need at least two levels');
  if (r < 1) return undetermined('too-few', 'The first cell has no readings');
  for (let i = 0; i < a; i += 1) {
    const row = cells[i] ?? [];
    if (row.length !== b)
      return undetermined('unbalanced', `Row ${i + 1} has ${row.length} cells in place of ${b}`);
    const short = row.findIndex((cell) => cell.length !== r);
    if (short >= 0)
      return undetermined(
        'unbalanced',
        `Row ${i + 1}, column ${short + 1} does not hold ${r} readings: all cells must`,
      );
  }
  return { a, b, r };
}

/**
 * Two-way analysis of variance with fixed effects from decimal readings, `cells[row][column][repeat]`, balanced.
 *
 * Sums of squares are exact fractions: rows ΣT(i..)²/(br) − T²/N, columns ΣT(.j.)²/(ar) − T²/N, cells
 * ΣT(ij.)²/r − T²/N; interaction = cells − rows − columns; residual = total − cells. Each is tested by F against the
 * residual. With one reading a cell the model is additive and the interaction is the residual.
 */
export function twoWayAnova(cells: readonly (readonly (readonly Reading[])[])[]): TwoWayAnova | Undetermined {
  const layout = sizes(cells);
  if ('undetermined' in layout) return layout;
  const { a, b, r } = layout;
  const exact = readExactly(cells.flat(2));
  if ('undetermined' in exact) return exact;
  const d = exact.deviations;
  const cellSums: bigint[] = [];
  for (let start = 0; start < d.length; start += r) cellSums.push(sum(d.slice(start, start + r)));
  const rowSums = Array.from({ length: a }, (_, i) => sum(cellSums.slice(i * b, (i + 1) * b)));
  const columnSums = Array.from({ length: b }, (_, j) =>
    sum(cellSums.filter((_value, index) => index % b === j)),
  );
  const n = a * b * r;
  const unit = powerOfTen(exact.scale);
  const grand = sumOfSquares([sum(rowSums)], n);
  const rows = subtractFractions(sumOfSquares(rowSums, b * r), grand);
  const columns = subtractFractions(sumOfSquares(columnSums, a * r), grand);
  const ofCells = subtractFractions(sumOfSquares(cellSums, r), grand);
  const total = subtractFractions(sumOfSquares(d, 1), grand);
  const interaction = subtractFractions(subtractFractions(ofCells, rows), columns);
  const residual = r === 1 ? interaction : subtractFractions(total, ofCells);
  const dfResidual = r === 1 ? (a - 1) * (b - 1) : a * b * (r - 1);
  const line = (squares: Ratio, df: number): VarianceSource => ({
    df,
    sumOfSquares: ratioToNumber(ratio(squares.numerator, squares.denominator * unit * unit)),
    meanSquare: ratioToNumber(ratio(squares.numerator, squares.denominator * unit * unit * BigInt(df))),
  });
  const tested = (squares: Ratio, df: number): TestedSource => {
    if (residual.numerator === 0n) {
      const reason = undetermined('no-variation', 'The residual is 0, so the ratio has no value');
      return { ...line(squares, df), f: reason, p: reason };
    }
    const f = (ratioToNumber(divideFractions(squares, residual)) * dfResidual) / df;
    return { ...line(squares, df), f, p: fUpperTail(f, df, dfResidual) };
  };
  return {
    method: 'two-way analysis of variance, fixed effects, exact decimal sums',
    n,
    rows: tested(rows, a - 1),
    columns: tested(columns, b - 1),
    interaction: r === 1 ? null : tested(interaction, (a - 1) * (b - 1)),
    residual: line(residual, dfResidual),
    total: { df: n - 1, sumOfSquares: line(total, 1).sumOfSquares },
  };
}
