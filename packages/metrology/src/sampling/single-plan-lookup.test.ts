import { describe, expect, it } from 'vitest';
import letters from '../testing/reference/iso2859-code-letters.json' with { type: 'json' };
import plans from '../testing/reference/iso2859-single-normal.json' with { type: 'json' };
import { isUndetermined } from '../result.ts';
import { CODE_LETTERS, INSPECTION_LEVELS, SAMPLE_SIZES } from '../tables/iso2859-code-letters.ts';
import { AQL_VALUES } from '../tables/iso2859-single-plans.ts';
import { codeLetter, singleSamplingPlan } from './single-plan-lookup.ts';
import type { InspectionLevel } from '../tables/iso2859-code-letters.ts';
import type { InspectionSeverity, LookedUpPlan } from './single-plan-lookup.ts';

function plan(
  lotSize: number,
  level: InspectionLevel,
  aql: number,
  severity: InspectionSeverity,
): LookedUpPlan {
  const found = singleSamplingPlan({ lotSize, level, aql, severity });
  if (isUndetermined(found)) throw new Error(found.reason);
  return found;
}

const short = (found: LookedUpPlan) => [found.planLetter, found.sampleSize, found.acceptanceNumber];

describe('code letters', () => {
  it('gives every letter of the public table at both ends of each lot range', () => {
    for (const row of letters.expected.rows) {
      for (const level of INSPECTION_LEVELS) {
        expect(codeLetter(row.from, level)).toBe(row[level]);
        expect(codeLetter(row.to ?? 9_000_000, level)).toBe(row[level]);
      }
    }
    expect(SAMPLE_SIZES).toEqual(letters.expected.sample_size);
  });

  it('refuses a lot of one piece, a broken piece and an unknown level', () => {
    expect(codeLetter(1, 'II')).toMatchObject({ code: 'lot-size' });
    expect(codeLetter(100.5, 'II')).toMatchObject({ code: 'lot-size' });
    expect(codeLetter(100, 'IV' as InspectionLevel)).toMatchObject({ code: 'inspection-level' });
  });
});

describe('single sampling plans', () => {
  it('follows the arrows of the normal table in all sixteen reference look-ups', () => {
    plans.expected.rows.forEach((row) => {
      expect(plan(row.lot, row.level as InspectionLevel, row.aql, 'normal')).toMatchObject({
        codeLetter: row.code_letter,
        planLetter: row.plan_letter,
        sampleSize: row.n,
        acceptanceNumber: row.Ac,
        rejectionNumber: row.Re,
        inspectAll: row.inspect_100pct,
      });
    });
  });

  it('tightens as the public transcription of MIL-STD-105E table II-B does (AQL 0.65 to 15)', () => {
    expect(short(plan(500, 'II', 15, 'tightened'))).toEqual(['H', 50, 12]);
    expect(short(plan(1000, 'II', 1, 'tightened'))).toEqual(['J', 80, 1]);
    expect(short(plan(1000, 'II', 0.65, 'tightened'))).toEqual(['K', 125, 1]);
    expect(short(plan(1000, 'II', 10, 'tightened'))).toEqual(['J', 80, 12]);
    expect(short(plan(3000, 'II', 15, 'tightened'))).toEqual(['J', 80, 18]);
    expect(short(plan(150, 'II', 1, 'tightened'))).toEqual(['F', 20, 0]);
    expect(short(plan(8, 'II', 10, 'tightened'))).toEqual(['D', 8, 1]);
    expect(short(plan(15, 'II', 6.5, 'tightened'))).toEqual(['B', 3, 0]);
  });

  it('uses letter S where the tightened table ends and says that it is from memory', () => {
    expect(plan(600_000, 'III', 0.025, 'tightened')).toMatchObject({
      planLetter: 'S',
      sampleSize: 3150,
      acceptanceNumber: 1,
      certainty: 'from-memory',
    });
    expect(plan(600_000, 'III', 0.015, 'normal')).toMatchObject({
      planLetter: 'P',
      sampleSize: 800,
      arrow: 'up',
    });
  });

  it('marks every reduced plan as remembered and refuses the irregular part of that table', () => {
    expect(plan(1000, 'II', 1, 'reduced')).toMatchObject({
      sampleSize: 32,
      acceptanceNumber: 2,
      certainty: 'from-memory',
    });
    expect(singleSamplingPlan({ lotSize: 1000, level: 'II', aql: 15, severity: 'reduced' })).toMatchObject({
      code: 'outside-table',
    });
    expect(singleSamplingPlan({ lotSize: 1000, level: 'II', aql: 1.1, severity: 'normal' })).toMatchObject({
      code: 'aql',
    });
  });

  it('inspects every piece when the sample would reach the lot', () => {
    expect(plan(60, 'II', 0.1, 'normal')).toMatchObject({
      sampleSize: 125,
      inspectAll: true,
      piecesToInspect: 60,
    });
  });

  it('reaches a plan from every cell, and tightening never tolerates more per piece inspected', () => {
    const lots = [5, 12, 20, 40, 80, 100, 200, 400, 1000, 3000, 9000, 30_000, 100_000, 400_000, 600_000];
    for (const lot of lots) {
      for (const level of INSPECTION_LEVELS) {
        for (const aql of AQL_VALUES) {
          const normal = plan(lot, level, aql, 'normal');
          const tightened = plan(lot, level, aql, 'tightened');
          expect(CODE_LETTERS).toContain(normal.planLetter);
          expect(tightened.acceptanceNumber / tightened.sampleSize).toBeLessThanOrEqual(
            normal.acceptanceNumber / normal.sampleSize,
          );
        }
      }
    }
  });
});
