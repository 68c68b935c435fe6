import type { ComparisonResponse } from '@trammel/shared/characteristics';
import { canonicalJson } from '../../database/canonical-json.ts';
import { compareBalloons } from '../../database/balloon-order.ts';
import type { Characteristic } from '../../database/entities/characteristic.entity.ts';
import { presentCharacteristic } from './characteristics.presenter.ts';

type Row = ComparisonResponse['rows'][number];

/** Fields whose change means measuring anew; the others only say the same requirement in other words or another place. */
const requirement = [
  'kind',
  'tolerance',
  'geometric',
  'unit',
  'decimals',
  'class',
  'attributeAllowed',
  'pieces',
  'controlledBy',
] as const;
const wording = ['balloon', 'sheet', 'zone', 'description', 'method', 'note'] as const;

/**
 * Two revisions characteristic by characteristic, paired by lineage, so that a renumbered row is a change and not a
 * removal. A tolerance stated in another way that gives the same limits counts as changed wording.
 */
export function compareRevisions(before: readonly Characteristic[], after: readonly Characteristic[]): Row[] {
  const old = new Map(before.map((row) => [row.lineageId, row]));
  const rows = after.map((row) => compareRow(old.get(row.lineageId) ?? null, row));
  const kept = new Set(after.map((row) => row.lineageId));
  for (const row of before) if (!kept.has(row.lineageId)) rows.push(compareRow(row, null));
  return rows.sort((a, b) => compareBalloons(a.balloon, b.balloon));
}

function compareRow(before: Characteristic | null, after: Characteristic | null): Row {
  const shown = {
    balloon: (after ?? before)?.balloon ?? '',
    before: before && presentCharacteristic(before),
    after: after && presentCharacteristic(after),
  };
  if (before === null) return { ...shown, change: 'added', fields: [] };
  if (after === null) return { ...shown, change: 'removed', fields: [] };
  const differs = (field: keyof Characteristic) =>
    canonicalJson(before[field]) !== canonicalJson(after[field]);
  const limitsDiffer = (['nominal', 'lowerLimit', 'upperLimit', 'naturalLower'] as const).some(differs);
  const changed = requirement.filter((field) => differs(field));
  const substance = changed.filter((field) => field !== 'tolerance' || limitsDiffer);
  const fields = [...changed, ...wording.filter(differs)];
  return {
    ...shown,
    change: substance.length > 0 ? 'changed' : fields.length > 0 ? 'text-only' : 'same',
    fields,
  };
}
