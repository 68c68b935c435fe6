import {
  compareDecimals,
  multiplyDecimals,
  parseDecimal,
  subtractDecimals,
} from '@trammel/metrology/decimal';
import { isUndetermined } from '@trammel/metrology';
import { convertDecimal } from '@trammel/metrology/units';
import type { Finding } from '@trammel/shared/checks';
import type { CheckedGauge, CheckInputs } from '../check-inputs.ts';
import { hasVerdict, takesAttribute } from '../characteristic-facts.ts';
import type { JudgedRow } from '../row-checks.ts';
import { yearBefore } from './calendar.ts';
import { onRow } from './finding.ts';

/** Which gauge, when, and whether it was in calibration that day: R26 and R28. */
export function gaugeFindings(inputs: CheckInputs, rows: readonly JudgedRow[]): Finding[] {
  const found: Finding[] = [];
  for (const row of rows) {
    if (row.stream.blocked || row.checked.n === 0) continue;
    found.push(...dateFindings(inputs, row));
    if (!hasVerdict(row.facts) || takesAttribute(row.facts)) continue;
    const gauge = row.stored.gaugeId === null ? undefined : inputs.gauges.get(row.stored.gaugeId);
    found.push(
      ...(gauge === undefined
        ? [gaugeMissing(row)]
        : [...calibration(row, gauge), ...resolution(row, gauge)]),
    );
  }
  return found;
}

function gaugeMissing(row: JudgedRow): Finding {
  return onRow(row, {
    rule: 'R28',
    weight: 'stops-submission',
    title: 'Gauge missing',
    detail: `Balloon ${row.facts.balloon} (${row.facts.description}), ${row.stream.name}: the readings name no gauge.`,
    remedy: 'Choose the gauge that measured them; several rows can be filled at once.',
  });
}

function calibration(row: JudgedRow, gauge: CheckedGauge): Finding[] {
  const { facts, stream, stored } = row;
  const where = `Balloon ${facts.balloon}, ${stream.name}`;
  if (gauge.dueOn === null) {
    return [
      onRow(row, {
        rule: 'R28',
        weight: 'reviewer-decides',
        title: 'Calibration date unknown',
        detail: `${where}: gauge ${gauge.code} has no calibration due date on record.`,
        remedy: 'Enter calibration and due date in the gauge register.',
      }),
    ];
  }
  if (stored.measuredOn === null || stored.measuredOn <= gauge.dueOn) return [];
  const justified = stored.note.trim() !== '';
  return [
    onRow(row, {
      rule: 'R28',
      weight: justified ? 'reviewer-decides' : 'stops-submission',
      title: 'Gauge overdue on the day of measuring',
      detail: `${where}: gauge ${gauge.code} was due on ${gauge.dueOn} and measured on ${stored.measuredOn}.${justified ? ` Justification: ${stored.note}` : ''}`,
      remedy: justified
        ? 'The reviewer decides on the justification.'
        : 'Measure again with a gauge in calibration, or write a justification in the row’s note.',
    }),
  ];
}

/** Common practice: a gauge resolves at least a tenth of the tolerance. */
function resolution(row: JudgedRow, gauge: CheckedGauge): Finding[] {
  const { facts } = row;
  const lowerText = facts.lowerLimit ?? (facts.naturalLower ? '0' : null);
  if (gauge.resolution === null || lowerText === null || facts.upperLimit === null) return [];
  const converted = convertDecimal(gauge.resolution, gauge.unit, facts.unit);
  if (isUndetermined(converted)) return [];
  const [lower, upper] = [parseDecimal(lowerText), parseDecimal(facts.upperLimit)];
  if (isUndetermined(lower) || isUndetermined(upper)) return [];
  const tenfold = multiplyDecimals(converted.value, { digits: 10n, scale: 0 });
  if (compareDecimals(tenfold, subtractDecimals(upper, lower)) <= 0) return [];
  return [
    onRow(row, {
      rule: 'R28',
      weight: 'for-information',
      title: 'Gauge resolves more than a tenth of the tolerance',
      detail: `Balloon ${facts.balloon}, ${row.stream.name}: gauge ${gauge.code} resolves ${gauge.resolution} ${gauge.unit}; the tolerance runs from ${lowerText} to ${facts.upperLimit} ${facts.unit}.`,
      remedy: 'Use a finer gauge where one is at hand; a tenth of the tolerance is common practice.',
    }),
  ];
}

function dateFindings(inputs: CheckInputs, row: JudgedRow): Finding[] {
  const { facts, stream, stored } = row;
  const where = `Balloon ${facts.balloon}, ${stream.name}`;
  const day = stored.measuredOn;
  const stop = (title: string, detail: string, remedy: string) =>
    onRow(row, { rule: 'R26', weight: 'stops-submission', title, detail, remedy });
  if (day === null) {
    return [
      stop(
        'Date of measuring missing',
        `${where}: no date says when it was measured.`,
        'Enter the date; several rows can be filled at once.',
      ),
    ];
  }
  if (day > inputs.today) {
    return [
      stop('Measured in the future', `${where}: ${day} is after today.`, 'Correct the date of measuring.'),
    ];
  }
  if (day < yearBefore(inputs.today)) {
    return [
      stop(
        'Readings older than twelve months',
        `${where}: measured on ${day}.`,
        'Measure pieces of the present process.',
      ),
    ];
  }
  const run = inputs.warrant.runOn;
  if (run !== null && day < run) {
    return [
      stop(
        'Measured before the run',
        `${where}: measured on ${day}, but the run is stated for ${run}.`,
        'Correct the date of measuring or the run date on the warrant.',
      ),
    ];
  }
  const late = inputs.pieces.find(
    (piece) => piece.streamId === stream.id && piece.madeOn !== null && piece.madeOn > day,
  );
  return late === undefined
    ? []
    : [
        stop(
          'Measured before the piece was made',
          `${where}: measured on ${day}, but piece ${late.label} was made on ${late.madeOn ?? ''}.`,
          'Correct one of the two dates.',
        ),
      ];
}
