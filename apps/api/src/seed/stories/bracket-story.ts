import { startNextRound } from '../../features/requests/resubmit.service.ts';
import { writeMessage } from '../../features/requests/request-messages.service.ts';
import { changeRow } from '../../features/measurements/measurements.service.ts';
import { demoReadings } from '../fixtures/readings.ts';
import { decide, signAndSubmit, stateWarrant } from '../decisions.ts';
import { usualElements } from '../elements.ts';
import { bracket } from '../parts/bracket.ts';
import { fillElements, nameGauges, type DemoGauge } from '../evidence-steps.ts';
import {
  acknowledge,
  measure,
  seedPart,
  seedRequest,
  sheetOf,
  type SeededPackage,
  type Seeding,
} from '../steps.ts';

const protractor = (days: { calibrated: number; due: number }, code: string): DemoGauge => ({
  code,
  kind: 'Bevel protractor',
  resolution: '0.05',
  unit: 'deg',
  ...days,
  balloons: ['4'],
});

const others: DemoGauge[] = [
  {
    code: 'DP-CAL-7',
    kind: 'Digital caliper',
    resolution: '0.01',
    unit: 'mm',
    calibrated: -100,
    due: 265,
    balloons: ['1', '2', '3', '8', '10'],
  },
  {
    code: 'DP-CMM-1',
    kind: 'Coordinate measuring machine',
    resolution: '0.001',
    unit: 'mm',
    calibrated: -150,
    due: 215,
    balloons: ['5', '6', '7', '9'],
  },
  {
    code: 'DP-XRF-1',
    kind: 'X-ray layer gauge',
    resolution: '0.1',
    unit: 'µm',
    calibrated: -90,
    due: 275,
    balloons: ['11'],
  },
  {
    code: 'DP-PRESS-2',
    kind: 'Push-out tester',
    resolution: '0.01',
    unit: 'kN',
    calibrated: -80,
    due: 285,
    balloons: ['12'],
  },
];

/** Mounting bracket: sent back for a protractor overdue, submitted again, now with the reviewer; a second source is at work. */
export async function bracketStory(seeding: Seeding): Promise<void> {
  const { cast } = seeding;
  const part = await seedPart(seeding, bracket, -75);
  const asked = {
    revisionId: part.revisionId,
    reason: 'initial' as const,
    streamKind: 'die' as const,
    streams: ['die 1'],
    pieces: 5,
    elements: usualElements(['design-record', 'control-plan', 'material-performance-results']),
    message: 'Flange height and slot are significant.',
  };
  const first = await seedRequest(seeding, { ...asked, supplier: 'dunmeric', issuedOn: -55, dueOn: -8 });
  await acknowledge(seeding, first, 'Sunniva Aarl', -54);
  await measure(seeding, first, demoReadings[bracket.number] ?? {}, 'Sunniva Aarl', -22);
  await nameGauges(
    seeding,
    first,
    [...others, protractor({ calibrated: -395, due: -30 }, 'DP-PRO-1')],
    'Sunniva Aarl',
    -22,
  );
  await justify(
    seeding,
    first,
    '4',
    'Protractor is at the laboratory next week; compared with a 90 degree square, no difference seen.',
  );
  await fillElements(seeding, first, 'Sunniva Aarl', -20, { part: bracket, stated: () => 'A' });
  const facts = {
    runHours: '3',
    runQuantity: 900,
    partMassKg: '0.148',
    productionTool: 'Progressive die D-118',
    materialReport: 'DP-MAT-31',
  };
  await stateWarrant(seeding, first, 'Sunniva Aarl', -19, facts);
  await signAndSubmit(seeding, first, 'Colm Varga', -18);
  await decide(seeding, first, -13, {
    outcome: 'sent-back',
    comment:
      'The protractor of balloon 4 was eight days overdue and a comparison with a square says nothing about 89 or 91 degrees. Measure again with a gauge in calibration.',
  });
  const again = await startNextRound(cast.deed('Sunniva Aarl', -11), first.requestId);
  const second = { ...first, submissionId: again.rounds.at(-1)?.id ?? '' };
  await measure(
    seeding,
    second,
    { '4': { 'die 1': ['90.25', '90.40', '90.35', '90.10', '89.85'] } },
    'Sunniva Aarl',
    -6,
  );
  await nameGauges(
    seeding,
    second,
    [protractor({ calibrated: -9, due: 356 }, 'DP-PRO-2')],
    'Sunniva Aarl',
    -6,
  );
  await signAndSubmit(seeding, second, 'Colm Varga', -3);

  const other = await seedRequest(seeding, { ...asked, supplier: 'askelund', issuedOn: -20, dueOn: 12 });
  await acknowledge(seeding, other, 'Nils Orrey', -19);
  await writeMessage(cast.deed('Nils Orrey', -12), other.requestId, {
    kind: 'question',
    text: 'Is the burr of balloon 10 measured on the die side only, or on both sides?',
  });
  await writeMessage(cast.deed('Ines Carrow', -11), other.requestId, {
    kind: 'answer',
    text: 'On both sides; the larger value counts.',
  });
  await measure(
    seeding,
    other,
    {
      '1': { 'die 1': ['2.50', '2.51', '2.49', '2.50', '2.52'] },
      '2': { 'die 1': ['64.05', '64.11', '64.02', '64.31', '64.08'] },
      '3': { 'die 1': ['28.02', '28.05', '27.99'] },
      '8': { 'die 1': ['9.0', '9.1', '9.0', '9.0', '9.0'] },
    },
    'Nils Orrey',
    -4,
  );
}

/** Writes a note on every stream of a row. */
async function justify(
  { core, cast }: Seeding,
  pack: SeededPackage,
  balloon: string,
  note: string,
): Promise<void> {
  const sheet = await sheetOf(core, cast, pack, 'Sunniva Aarl');
  const facts = sheet.characteristics.find((row) => row.balloon === balloon);
  for (const row of sheet.rows.filter((candidate) => candidate.characteristicId === facts?.id)) {
    const key = {
      submissionId: pack.submissionId,
      characteristicId: row.characteristicId,
      streamId: row.streamId,
    };
    const { gaugeId, measuredOn, attribute } = row;
    await changeRow(cast.deed('Sunniva Aarl', -21), key, row.version, {
      gaugeId,
      measuredOn,
      attribute,
      note,
    });
  }
}
