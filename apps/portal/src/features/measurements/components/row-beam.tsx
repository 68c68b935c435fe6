import { useMemo } from 'react';
import type { SheetCharacteristic } from '@trammel/shared/measurements';
import type { Verdict } from '@trammel/shared/status';
import { Beam } from '../../../components/charts/beam.tsx';
import type { SheetModel } from '../sheet-model.ts';

const verdictOf: Record<string, Verdict> = {
  i: 'in-tolerance',
  o: 'out-of-tolerance',
  u: 'undecided',
  x: 'no-verdict',
};

/** Every piece of every stream on one beam. No bracket: a natural spread belongs to one stream, and streams are not pooled. */
export function RowBeam({
  model,
  facts,
  version,
}: {
  model: SheetModel;
  facts: SheetCharacteristic;
  version: number;
}) {
  const data = useMemo(() => beamData(model, facts, version), [model, facts, version]);
  return <Beam name={`Balloon ${facts.balloon}`} decorative className="w-36" {...data} />;
}

function beamData(model: SheetModel, facts: SheetCharacteristic, _version: number) {
  let checked = 0;
  let failed = 0;
  const points = model.columns.flatMap((column) => {
    const cell = model.cell(facts, column);
    const verdict = verdictOf[cell.mark];
    if (cell.text === null || verdict === undefined) return [];
    if (cell.text === 'pass' || cell.text === 'fail') {
      checked += 1;
      failed += cell.text === 'fail' ? 1 : 0;
      return [];
    }
    const value = Number.parseFloat(cell.text);
    return Number.isFinite(value) ? [{ value, verdict, label: column.piece.label }] : [];
  });
  const counts = model.streams
    .map((stream) => model.row(facts.id, stream.id)?.attribute)
    .filter((count) => count != null);
  for (const count of counts) {
    if (points.length > 0 || checked > 0) break;
    checked += count.checked;
    failed += count.failed;
  }
  const number = (text: string | null) => (text === null ? null : Number(text));
  return {
    limits: {
      lower: number(facts.lowerLimit),
      upper: number(facts.upperLimit),
      naturalLower: facts.naturalLower,
    },
    nominal: number(facts.nominal),
    points,
    unit: facts.unit,
    decimals: facts.decimals,
    ...(checked > 0 ? { attribute: { checked, failed } } : {}),
  };
}
