import { compareDecimals, parseDecimal } from '@trammel/metrology/decimal';
import { isUndetermined } from '@trammel/metrology';
import type { Finding } from '@trammel/shared/checks';
import type { CheckInputs } from '../check-inputs.ts';
import { onCharacteristic, onPackage } from './finding.ts';

/** What concerns the package as a whole: R03, R25 and the caution for safety rows. */
export function packageFindings(inputs: CheckInputs): Finding[] {
  return [...revisionFindings(inputs), ...runFindings(inputs), ...safetyRows(inputs)];
}

function revisionFindings(inputs: CheckInputs): Finding[] {
  const { revisionState, revisionCode, newestRevision } = inputs.submission;
  if (revisionState !== 'superseded' || newestRevision === revisionCode) return [];
  return [
    onPackage({
      rule: 'R03',
      weight: 'reviewer-decides',
      title: 'A newer drawing revision is released',
      detail: `The package is for revision ${revisionCode}; revision ${newestRevision} has been released since.`,
      remedy:
        'Agree with the customer: go on with this revision, or withdraw and ask for the new one. An approval of this one does not cover the new.',
    }),
  ];
}

/** Common practice for a run that shows the real process: one to eight hours and at least 300 pieces in a row. */
function runFindings(inputs: CheckInputs): Finding[] {
  const { runOn, runHours, runQuantity } = inputs.warrant;
  const found: Finding[] = [];
  const add = (weight: Finding['weight'], title: string, detail: string, remedy: string) =>
    found.push(onPackage({ rule: 'R25', weight, title, detail, remedy }, 'warrant'));
  if (runOn === null || runQuantity === null) {
    add(
      'stops-submission',
      'Run not stated',
      'The warrant says neither when the pieces were made nor how many were made in that run.',
      'Enter date and quantity of the run on the warrant page.',
    );
  }
  if (runOn !== null && runOn > inputs.today) {
    add(
      'stops-submission',
      'Run in the future',
      `The run is stated for ${runOn}, after today.`,
      'Correct the date of the run.',
    );
  }
  if (runQuantity !== null && runQuantity < 300) {
    add(
      'reviewer-decides',
      'Short run',
      `${runQuantity} pieces were made; common practice is at least 300 in a row.`,
      'The reviewer decides whether the run shows the process; say in the comment why it was short.',
    );
  }
  const hours = runHours === null ? null : parseDecimal(runHours);
  if (hours !== null && !isUndetermined(hours)) {
    const short = compareDecimals(hours, { digits: 1n, scale: 0 }) < 0;
    const long = compareDecimals(hours, { digits: 8n, scale: 0 }) > 0;
    if (short || long) {
      add(
        'reviewer-decides',
        'Run length unusual',
        `The run took ${runHours ?? ''} hours; common practice is one to eight.`,
        'The reviewer decides; say in the comment why.',
      );
    }
  }
  return found;
}

function safetyRows(inputs: CheckInputs): Finding[] {
  return inputs.characteristics.list
    .filter((facts) => facts.class === 'safety-regulatory')
    .map((facts) =>
      onCharacteristic(facts, {
        rule: 'safety',
        weight: 'reviewer-decides',
        title: 'Safety or regulatory characteristic',
        detail: `Balloon ${facts.balloon} (${facts.description}) is never accepted automatically or in bulk.`,
        remedy:
          'An authorised person decides on it by itself; design authority, law and customer requirements stand above.',
      }),
    );
}
