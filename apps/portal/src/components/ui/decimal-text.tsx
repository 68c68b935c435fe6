import { decimalSign, showDecimal } from '../../lib/format.ts';

export interface DecimalTextProps {
  /** Decimal text with a point, as it was typed. */
  text: string | null;
  /** Decimals the column has room for; more are shown, never cut. */
  decimals: number;
  unit?: string;
}

/** A number that stands on the decimal point of its column: the column is set flush right in the mono face. */
export function DecimalText({ text, decimals, unit }: DecimalTextProps) {
  if (text === null) return <span className="text-pencil">—</span>;
  const shown = showDecimal(text);
  const point = shown.indexOf(decimalSign());
  const held = point < 0 ? 0 : shown.length - point - 1;
  const missing = Math.max(0, decimals - held + (point < 0 && decimals > 0 ? 1 : 0));
  return (
    <span className="figures whitespace-pre">
      {shown}
      {/* Invisible room instead of zeros: a zero would claim a digit that nobody measured. */}
      {missing > 0 && <span aria-hidden="true">{'\u2007'.repeat(missing)}</span>}
      {unit && <span className="text-pencil"> {unit}</span>}
    </span>
  );
}
