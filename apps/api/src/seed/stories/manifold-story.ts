import { askDeviation, decideDeviation } from '../../features/deviations/deviations.service.ts';
import { createRevision } from '../../features/parts/revisions.service.ts';
import { saveTable } from '../../features/characteristics/characteristics.service.ts';
import { findCharacteristics } from '../../features/characteristics/characteristics.queries.ts';
import { startNextRound } from '../../features/requests/resubmit.service.ts';
import { findElements } from '../../features/submissions/elements.queries.ts';
import { demoReadings } from '../fixtures/readings.ts';
import { decide, markAll, signAndSubmit, stateWarrant } from '../decisions.ts';
import { usualElements } from '../elements.ts';
import { manifold, manifoldNext } from '../parts/manifold.ts';
import { fillElements, nameGauges, type DemoGauge } from '../evidence-steps.ts';
import {
  acknowledge,
  measure,
  releaseWithDrawing,
  seedPart,
  seedRequest,
  sheetOf,
  type DemoPart,
  type SeededPackage,
  type Seeding,
} from '../steps.ts';

const who = 'Bea Tindall';

const gauges: DemoGauge[] = [
  {
    code: 'VC-CMM-1',
    kind: 'Coordinate measuring machine',
    resolution: '0.0001',
    unit: 'mm',
    calibrated: -170,
    due: 195,
    balloons: ['1', '2', '3', '4', '5', '6', '7', '8', '9', '10', '12', '16', '18', '19', '20', '24'],
  },
  {
    code: 'VC-ROUGH-1',
    kind: 'Roughness tester',
    resolution: '0.01',
    unit: 'µm',
    calibrated: -60,
    due: 305,
    balloons: ['11', '13'],
  },
  {
    code: 'VC-PLUG-G14',
    kind: 'Thread plug gauge G1/4',
    resolution: null,
    unit: '1',
    calibrated: -60,
    due: 305,
    balloons: ['14', '15', '23'],
  },
  {
    code: 'VC-LEAK-1',
    kind: 'Leak tester',
    resolution: '0.01',
    unit: 'ml/min',
    calibrated: -30,
    due: 335,
    balloons: ['21'],
  },
  {
    code: 'VC-HB-1',
    kind: 'Brinell tester',
    resolution: '1',
    unit: 'HBW',
    calibrated: -110,
    due: 255,
    balloons: ['22'],
  },
];

const facts = {
  runHours: '7',
  runQuantity: 320,
  partMassKg: '0.884',
  productionTool: 'Casting die C-52, cell 2',
  materialReport: 'VC-MAT-207',
};

/** Valve manifold: approved at C; at D rejected once for a wrong control plan, then approved under a deviation of one wall. */
export async function manifoldStory(seeding: Seeding): Promise<void> {
  const { core, cast } = seeding;
  const seeded = await seedPart(seeding, manifold, -190);
  const asked = {
    supplier: 'vesperholt' as const,
    streamKind: 'line' as const,
    streams: ['line 1'],
    pieces: 3,
    elements: usualElements(['design-record', 'control-plan', 'material-performance-results']),
    message: 'Spool bores are critical.',
  };
  const earlier = await seedRequest(seeding, {
    ...asked,
    revisionId: seeded.revisionId,
    reason: 'initial',
    issuedOn: -180,
    dueOn: -150,
  });
  await prepare(seeding, earlier, manifold, -160, 'C');
  await signAndSubmit(seeding, earlier, 'Ruben Osk', -158);
  await markAll(seeding, earlier, -155);
  await decide(seeding, earlier, -153, { outcome: 'approved' });

  const revisionId = await nextRevision(seeding, seeded.partId, seeded.revisionId);
  const part: DemoPart = { ...manifold, revision: 'D' };
  const pack = await seedRequest(seeding, {
    ...asked,
    revisionId,
    reason: 'engineering-change',
    issuedOn: -50,
    dueOn: -10,
  });
  await prepare(seeding, pack, part, -40, '');
  const first = await askForWall(seeding, pack, -39);
  await decideDeviation(cast.deed('Tomasz Bellweather', -37), first.id, first.version, {
    decision: 'granted',
    note: 'Burst pressure at 2.80 mm is still twice the working pressure. Pressure test every piece until the core is moved.',
  });
  await signAndSubmit(seeding, pack, 'Ruben Osk', -36);
  await markAll(seeding, pack, -33, {
    rows: { '20': { mark: 'accepted', deviationId: first.id } },
    elements: {
      'control-plan': {
        mark: 'refused',
        remark: 'The control plan is for revision C; port P2 and the wall are missing.',
      },
    },
  });
  const plan = (await findElements(core.db.reader.manager, pack.submissionId, 'customer')).find(
    (element) => element.code === 'control-plan',
  );
  await decide(seeding, pack, -32, {
    outcome: 'rejected',
    reasons: [
      {
        code: 'wrong-revision',
        characteristicId: null,
        elementId: plan?.id ?? null,
        text: 'The control plan is for revision C.',
      },
    ],
  });
  const again = await startNextRound(cast.deed(who, -30), pack.requestId);
  const second: SeededPackage = { ...pack, submissionId: again.rounds.at(-1)?.id ?? '' };
  const granted = await askForWall(seeding, second, -29);
  await decideDeviation(cast.deed('Tomasz Bellweather', -28), granted.id, granted.version, {
    decision: 'granted',
    note: 'As in the round before: 400 pieces or 120 days, pressure test 100 %.',
  });
  await signAndSubmit(seeding, second, 'Ruben Osk', -27);
  await markAll(seeding, second, -24, {
    rows: {
      '20': { mark: 'accepted', deviationId: granted.id, remark: 'Accepted under the deviation only.' },
    },
  });
  await decide(seeding, second, -23, {
    outcome: 'approved',
    comment: 'Full approval of the wall needs the moved core.',
  });
}

async function prepare(
  seeding: Seeding,
  pack: SeededPackage,
  part: DemoPart,
  days: number,
  stated: string,
): Promise<void> {
  await acknowledge(seeding, pack, who, days - 5);
  const readings = demoReadings[part.number] ?? {};
  const earlier =
    part.revision === 'C' ? { ...readings, '19': { 'line 1': ['56.48', '56.61', '56.35'] } } : readings;
  await measure(seeding, pack, earlier, who, days);
  await nameGauges(seeding, pack, gauges, who, days);
  await fillElements(seeding, pack, who, days, { part, stated: () => stated });
  await stateWarrant(seeding, pack, who, days + 1, facts);
}

async function askForWall(seeding: Seeding, pack: SeededPackage, days: number) {
  const { core, cast } = seeding;
  const sheet = await sheetOf(core, cast, pack, who);
  const wall = sheet.characteristics.find((row) => row.balloon === '20');
  return askDeviation(cast.deed(who, days), pack.submissionId, {
    characteristicId: wall?.id ?? '',
    streamIds: [],
    rangeLower: '2.80',
    rangeUpper: null,
    cause: 'The sand core of the channel shifts by up to 0.2 mm.',
    risk: 'Lower burst pressure of the wall; function and sealing are not touched.',
    containment: 'Pressure test of every piece at 1.5 times the working pressure.',
    correctiveAction: 'Core print lengthened; first pieces in ten weeks.',
    quantity: 400,
    untilOn: cast.date(days + 120),
  });
}

async function nextRevision(seeding: Seeding, partId: string, fromId: string): Promise<string> {
  const { core, cast } = seeding;
  const deed = cast.deed('Tomasz Bellweather', -64);
  const revision = await createRevision(deed, partId, {
    code: manifoldNext.revision,
    copyFromRevisionId: fromId,
  });
  const rows = await findCharacteristics(core.db.reader, revision.id);
  const changed = manifoldNext.changed.map((row) => {
    const copied = rows.find((candidate) => candidate.balloon === row.balloon);
    return { id: copied?.id ?? null, version: copied?.version ?? null, ...row };
  });
  const added = manifoldNext.added.map((row) => ({ id: null, version: null, ...row }));
  await saveTable(deed, revision.id, { rows: [...changed, ...added], removed: [] });
  const all = [
    ...manifold.characteristics.filter(
      (row) => !manifoldNext.changed.some((other) => other.balloon === row.balloon),
    ),
    ...manifoldNext.changed,
    ...manifoldNext.added,
  ];
  await releaseWithDrawing(
    seeding,
    revision.id,
    { ...manifold, revision: manifoldNext.revision, characteristics: all },
    -62,
  );
  return revision.id;
}
