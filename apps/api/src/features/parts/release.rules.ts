import type { Characteristic } from '../../database/entities/characteristic.entity.ts';
import type { PartRevision } from '../../database/entities/part-revision.entity.ts';

type Row = Pick<
  Characteristic,
  | 'balloon'
  | 'kind'
  | 'geometric'
  | 'controlledBy'
  | 'lowerLimit'
  | 'upperLimit'
  | 'naturalLower'
  | 'attributeAllowed'
  | 'tolerance'
  | 'nominal'
>;

const needsLimits = new Set(['size', 'geometric']);

/** Why a revision cannot be released yet, each with its place; empty when it can. */
export function releaseBlockers(
  revision: Pick<PartRevision, 'drawingFileId'>,
  rows: readonly Row[],
): string[] {
  const blockers: string[] = [];
  if (revision.drawingFileId === null) blockers.push('No drawing is attached.');
  if (rows.length === 0) blockers.push('No characteristic has been entered.');
  const byBalloon = new Map(rows.map((row) => [row.balloon, row]));
  for (const row of rows)
    blockers.push(
      ...limitBlockers(row),
      ...partnerBlockers(row, byBalloon),
      ...basicBlockers(row, byBalloon),
    );
  return blockers;
}

function limitBlockers(row: Row): string[] {
  const none = row.lowerLimit === null && row.upperLimit === null;
  if (needsLimits.has(row.kind) && none && !row.attributeAllowed) {
    return [
      `Balloon ${row.balloon} has no tolerance: give its limits, or make it a reference or basic dimension.`,
    ];
  }
  if (row.kind === 'material-performance' && none && !row.attributeAllowed) {
    return [`Balloon ${row.balloon} has no limit: give one, or allow a pass or fail result.`];
  }
  return [];
}

/** The bonus of a geometric tolerance comes from the size of one feature with two limits (R15). */
function partnerBlockers(row: Row, byBalloon: ReadonlyMap<string, Row>): string[] {
  const { geometric } = row;
  if (geometric === null || geometric.modifier === 'RFS') return [];
  const place = `Balloon ${row.balloon} at ${geometric.modifier}`;
  if (geometric.sizeBalloon === null) return [`${place} does not say whose size gives the bonus.`];
  const partner = byBalloon.get(geometric.sizeBalloon);
  if (!partner)
    return [`${place} takes its bonus from balloon ${geometric.sizeBalloon}, which is not on the drawing.`];
  if (partner.kind !== 'size')
    return [`${place} takes its bonus from balloon ${geometric.sizeBalloon}, which is not a size.`];
  if (partner.lowerLimit === null || partner.upperLimit === null || partner.naturalLower) {
    return [
      `${place} takes its bonus from balloon ${geometric.sizeBalloon}, which needs a lower and an upper limit.`,
    ];
  }
  return [];
}

/** A basic dimension has no verdict of its own; a geometric row must control it (R13). */
function basicBlockers(row: Row, byBalloon: ReadonlyMap<string, Row>): string[] {
  if (row.kind !== 'basic') return [];
  if (row.controlledBy.length === 0)
    return [`Balloon ${row.balloon} is basic but no row controls it: name the geometric row.`];
  return row.controlledBy
    .filter((balloon) => byBalloon.get(balloon)?.kind !== 'geometric')
    .map(
      (balloon) =>
        `Balloon ${row.balloon} is controlled by balloon ${balloon}, which is not a geometric row of this drawing.`,
    );
}
