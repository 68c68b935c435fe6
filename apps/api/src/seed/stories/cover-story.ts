import { blockStream } from '../../features/submissions/pieces.service.ts';
import { demoReadings } from '../fixtures/readings.ts';
import { decide, markAll, signAndSubmit, stateWarrant } from '../decisions.ts';
import { usualElements } from '../elements.ts';
import { cover } from '../parts/cover.ts';
import { fillElements, nameGauges } from '../evidence-steps.ts';
import {
  acknowledge,
  measure,
  seedPart,
  seedRequest,
  sheetOf,
  type DemoPart,
  type SeededPackage,
  type Seeding,
} from '../steps.ts';

const cavities = ['cavity 1', 'cavity 2', 'cavity 3', 'cavity 4'];

async function moulded(
  seeding: Seeding,
  part: DemoPart,
  issuedOn: number,
  dueOn: number,
): Promise<SeededPackage> {
  const seeded = await seedPart(seeding, part, issuedOn - 10);
  const pack = await seedRequest(seeding, {
    supplier: 'oberlyn',
    revisionId: seeded.revisionId,
    reason: 'initial',
    streamKind: 'cavity',
    streams: cavities,
    pieces: 3,
    elements: usualElements(['design-record', 'control-plan', 'material-performance-results']),
    message: 'Each cavity counts by itself. Condition the pieces for 24 hours before measuring.',
    issuedOn,
    dueOn,
  });
  await acknowledge(seeding, pack, 'Dario Wex', issuedOn + 1);
  await measure(seeding, pack, demoReadings['TD-31880'] ?? {}, 'Dario Wex', issuedOn + 20);
  await nameGauges(
    seeding,
    pack,
    [
      {
        code: 'OP-CMM-1',
        kind: 'Coordinate measuring machine',
        resolution: '0.001',
        unit: 'mm',
        calibrated: -180,
        due: 185,
        balloons: ['1', '2', '3', '4', '5', '6', '7', '8', '9', '10', '11', '12'],
      },
      {
        code: 'OP-PULL-2',
        kind: 'Pull tester',
        resolution: '0.1',
        unit: 'N',
        calibrated: -100,
        due: 265,
        balloons: ['13'],
      },
      {
        code: 'OP-OPT-1',
        kind: 'Optical comparator',
        resolution: '0.01',
        unit: 'mm',
        calibrated: -140,
        due: 225,
        balloons: ['14', '16'],
      },
      {
        code: 'OP-SCALE-3',
        kind: 'Laboratory balance',
        resolution: '0.01',
        unit: 'g',
        calibrated: -40,
        due: 325,
        balloons: ['15'],
      },
      {
        code: 'OP-SPEC-1',
        kind: 'Spectrophotometer',
        resolution: '0.01',
        unit: 'dE',
        calibrated: -30,
        due: 335,
        balloons: ['17', '18'],
      },
    ],
    'Dario Wex',
    issuedOn + 20,
  );
  await fillElements(seeding, pack, 'Dario Wex', issuedOn + 22, { part, stated: () => part.revision });
  await stateWarrant(seeding, pack, 'Dario Wex', issuedOn + 23, {
    runHours: '5',
    runQuantity: 1800,
    partMassKg: '0.0614',
    productionTool: 'M-0733, 4 cavities',
    materialReport: 'OP-MAT-044',
    exceptions: 'Cavity 3 is blocked until its core is replaced.',
  });
  return pack;
}

/** Cavity 3 is out, so the signer blocks it and the customer allows the rest for a while. */
async function interim(
  seeding: Seeding,
  pack: SeededPackage,
  submittedOn: number,
  endsOn: number,
  pieceLimit: number,
): Promise<void> {
  const { core, cast } = seeding;
  const sheet = await sheetOf(core, cast, pack, 'Petra Lohm');
  const third = sheet.streams.find((stream) => stream.name === 'cavity 3');
  if (!third) throw new Error('The demo has no third cavity.');
  await blockStream(cast.deed('Petra Lohm', submittedOn, 14), pack.submissionId, third.id, third.version, {
    blocked: true,
    reason: 'Boss bore out of tolerance; core worn, gate closed.',
  });
  await signAndSubmit(seeding, pack, 'Petra Lohm', submittedOn);
  await markAll(seeding, pack, submittedOn + 4, {
    rows: {
      '5': {
        mark: 'accepted',
        internalRemark: 'Cavity 2 passes only with the bonus of its own bore; counted piece by piece.',
      },
    },
  });
  await decide(seeding, pack, submittedOn + 6, {
    outcome: 'interim-approval',
    endOn: cast.date(endsOn),
    pieceLimit,
    containment: 'Cavity 3 stays closed; bore of cavities 1, 2 and 4 checked with a plug gauge, 100 %.',
    resubmitBy: cast.date(endsOn - 2),
    conditions: [
      {
        text: 'Replace the core of cavity 3 and submit cavity 3 again.',
        owner: 'Dario Wex',
        dueOn: cast.date(endsOn - 2),
      },
    ],
  });
}

/** Gear housing cover: interim approval that ends in six days. */
export async function coverStory(seeding: Seeding): Promise<void> {
  const pack = await moulded(seeding, cover, -90, -60);
  await interim(seeding, pack, -60, 6, 40_000);
}

const endCap: DemoPart = { ...cover, number: 'TD-31895', name: 'Gear housing end cap', revision: 'A' };

/** End cap from the same tool family: its interim approval ran out two days ago and was stopped by the clock. */
export async function endCapStory(seeding: Seeding): Promise<void> {
  const pack = await moulded(seeding, endCap, -120, -95);
  await interim(seeding, pack, -96, -2, 12_000);
}
