import type { Finding } from '@trammel/shared/checks';
import { deviationCovers, outReadings } from '../deviation-cover.ts';
import type { CheckInputs } from '../check-inputs.ts';
import { sizeBalloonOf } from '../characteristic-facts.ts';
import { expandedUncertainty } from '../decision-rules.ts';
import type { JudgedRow } from '../row-checks.ts';
import { onCharacteristic, onRow, plural } from './finding.ts';

/** Rows outside or at the edge of their limits: R12, R15, R19, R20 and the rounding method (R09). */
export function toleranceFindings(inputs: CheckInputs, rows: readonly JudgedRow[]): Finding[] {
  const found: Finding[] = [];
  for (const row of rows) {
    const { verdict } = row.checked;
    if (verdict === 'out-of-tolerance') found.push(outOfTolerance(inputs, row));
    if (verdict === 'undecided') found.push(undecided(row));
    if (row.checked.reason !== null && row.checked.n > 0) {
      found.push(
        onRow(row, {
          rule: 'R07',
          weight: 'reviewer-decides',
          title: 'No limits to judge against',
          detail: `Balloon ${row.facts.balloon}: ${row.checked.reason}`,
          remedy:
            'The customer completes the tolerance in the next drawing revision, or the reviewer decides on the readings.',
        }),
      );
    }
  }
  if (inputs.rules.decisionRule.kind === 'guard-band') found.push(...withoutGuardBand(inputs));
  return found;
}

function outOfTolerance(inputs: CheckInputs, row: JudgedRow): Finding {
  const { facts, stream, checked } = row;
  const asked = inputs.deviations.filter(
    (deviation) =>
      deviation.characteristicId === facts.id &&
      (deviation.state === 'sent' || deviation.state === 'granted') &&
      (deviation.streamIds.length === 0 || deviation.streamIds.includes(stream.id)),
  );
  const covering = asked.find((deviation) =>
    deviationCovers(deviation, facts, outReadings({ ...row, texts: row.texts() })),
  );
  const what = `Balloon ${facts.balloon} (${facts.description}), ${stream.name}: ${plural(checked.outCount, 'piece')} of ${checked.n} outside ${limitsInWords(row)}.`;
  if (covering) {
    return onRow(row, {
      rule: 'R20',
      weight: 'reviewer-decides',
      title: 'Out of tolerance, deviation asked for',
      detail: `${what} Deviation request ${covering.number} covers the readings (${covering.state}).`,
      remedy: 'The customer decides the deviation request; the row cannot be accepted without a granted one.',
    });
  }
  if (asked.length > 0) {
    return onRow(row, {
      rule: 'R20',
      weight: 'stops-submission',
      title: 'Deviation request does not cover the readings',
      detail: `${what} The range asked for ends before the furthest reading.`,
      remedy: 'Widen the range of the deviation request to the readings found, or measure again.',
    });
  }
  return onRow(row, {
    rule: 'R20',
    weight: 'stops-submission',
    title: 'Out of tolerance without a deviation asked for',
    detail: what,
    remedy:
      'Correct the process and measure new pieces, block this stream, or ask for a deviation with range, cause and containment.',
  });
}

function undecided(row: JudgedRow): Finding {
  const { facts, stream, checked } = row;
  const bonus = sizeBalloonOf(facts);
  if (bonus !== null) {
    return onRow(row, {
      rule: 'R15',
      weight: 'stops-submission',
      title: 'Size missing, so the bonus is unknown',
      detail: `Balloon ${facts.balloon}, ${stream.name}: ${plural(checked.undecidedCount, 'piece')} cannot be judged without the piece’s own size (balloon ${bonus}).`,
      remedy: `Enter the size of the same pieces at balloon ${bonus}.`,
    });
  }
  return onRow(row, {
    rule: 'R19',
    weight: 'reviewer-decides',
    title: 'Within the measurement uncertainty of a limit',
    detail: `Balloon ${facts.balloon}, ${stream.name}: ${plural(checked.undecidedCount, 'reading')} in the guard band; neither conformity nor non-conformity is proved.`,
    remedy: 'Measure again with a smaller uncertainty, or leave it to the reviewer with a remark.',
  });
}

function withoutGuardBand(inputs: CheckInputs): Finding[] {
  const agreed = inputs.rules.decisionRule;
  if (agreed.kind !== 'guard-band') return [];
  return inputs.characteristics.list
    .filter(
      (facts) => facts.kind === 'size' || facts.kind === 'geometric' || facts.kind === 'material-performance',
    )
    .filter((facts) => (facts.lowerLimit === null) !== (facts.upperLimit === null))
    .filter((facts) => expandedUncertainty(facts, agreed.uncertaintyPercentOfTolerance) === null)
    .map((facts) =>
      onCharacteristic(facts, {
        rule: 'R19',
        weight: 'for-information',
        title: 'Judged without a guard band',
        detail: `Balloon ${facts.balloon} has one limit, so a share of its tolerance is not defined; simple acceptance was used.`,
        remedy: 'Where a guard band is wanted here, agree the uncertainty as a value.',
      }),
    );
}

function limitsInWords(row: JudgedRow): string {
  const { lowerLimit, upperLimit, unit } = row.facts;
  if (lowerLimit !== null && upperLimit !== null) return `${lowerLimit} to ${upperLimit} ${unit}`;
  if (upperLimit !== null) return `at most ${upperLimit} ${unit}`;
  return lowerLimit === null ? 'the requirement' : `at least ${lowerLimit} ${unit}`;
}
