import { countOf } from '../../../lib/format.ts';

interface Tally {
  n: number;
  one: string;
  many: string;
  tone: string;
}

/** Counts in words, the heaviest first; what is nil is left out. */
function Tallies({ tallies, none }: { tallies: readonly Tally[]; none: string }) {
  const counted = tallies.filter(({ n }) => n > 0);
  if (counted.length === 0) return <span className="text-pencil">{none}</span>;
  return (
    <span className="flex flex-wrap gap-x-3">
      {counted.map(({ n, one, many, tone }) => (
        <span key={one} className={tone}>
          {countOf(n, one, many)}
        </span>
      ))}
    </span>
  );
}

export function FindingTally({
  stops,
  decides,
  informs,
}: {
  stops: number;
  decides: number;
  informs: number;
}) {
  return (
    <Tallies
      none="none"
      tallies={[
        { n: stops, one: 'stops submission', many: 'stop submission', tone: 'font-semibold text-vermilion' },
        { n: decides, one: 'for the reviewer', many: 'for the reviewer', tone: 'text-plum' },
        { n: informs, one: 'for information', many: 'for information', tone: 'text-pencil' },
      ]}
    />
  );
}

export function RowTally({ out, undecided, special }: { out: number; undecided: number; special: number }) {
  return (
    <Tallies
      none="nothing stands out"
      tallies={[
        { n: out, one: 'row out', many: 'rows out', tone: 'font-semibold text-vermilion' },
        { n: undecided, one: 'undecided', many: 'undecided', tone: 'text-plum' },
        { n: special, one: 'special', many: 'special', tone: 'text-brass' },
      ]}
    />
  );
}
