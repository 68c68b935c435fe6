import { demoReadings } from '../fixtures/readings.ts';
import { decide, markAll, signAndSubmit, stateWarrant } from '../decisions.ts';
import { usualElements } from '../elements.ts';
import { shaft } from '../parts/shaft.ts';
import { fillElements, nameGauges } from '../evidence-steps.ts';
import { acknowledge, measure, seedPart, seedRequest, type Seeding } from '../steps.ts';

/** Output shaft: a first try that passes. Approved three weeks ago. */
export async function shaftStory(seeding: Seeding): Promise<void> {
  const part = await seedPart(seeding, shaft, -70);
  const pack = await seedRequest(seeding, {
    supplier: 'quillmark',
    revisionId: part.revisionId,
    reason: 'initial',
    streamKind: 'spindle',
    streams: ['spindle 1', 'spindle 2'],
    pieces: 3,
    elements: usualElements([
      'design-record',
      'process-flow',
      'process-fmea',
      'control-plan',
      'material-performance-results',
    ]),
    message: 'Seats and runout are critical for bearing life. Measure the seats at 20 °C.',
    issuedOn: -60,
    dueOn: -25,
  });
  await acknowledge(seeding, pack, 'Joana Pell', -59);
  await measure(seeding, pack, demoReadings[shaft.number] ?? {}, 'Joana Pell', -32);
  await nameGauges(
    seeding,
    pack,
    [
      {
        code: 'QT-CMM-2',
        kind: 'Coordinate measuring machine',
        resolution: '0.0001',
        unit: 'mm',
        calibrated: -200,
        due: 165,
        balloons: ['1', '2', '3', '4', '5', '6', '7', '8', '9', '16'],
      },
      {
        code: 'QT-FORM-1',
        kind: 'Form tester',
        resolution: '0.0001',
        unit: 'mm',
        calibrated: -150,
        due: 215,
        balloons: ['10', '11'],
      },
      {
        code: 'QT-ROUGH-3',
        kind: 'Roughness tester',
        resolution: '0.01',
        unit: 'µm',
        calibrated: -90,
        due: 275,
        balloons: ['12'],
      },
      {
        code: 'QT-RING-16',
        kind: 'Thread ring gauge M16x1.5-6g',
        resolution: null,
        unit: '1',
        calibrated: -120,
        due: 245,
        balloons: ['13'],
      },
      {
        code: 'QT-HARD-1',
        kind: 'Rockwell tester',
        resolution: '0.1',
        unit: 'HRC',
        calibrated: -60,
        due: 120,
        balloons: ['14', '15'],
      },
    ],
    'Joana Pell',
    -32,
  );
  await fillElements(seeding, pack, 'Joana Pell', -30, { part: shaft, stated: () => 'C' });
  await stateWarrant(seeding, pack, 'Joana Pell', -29, {
    runHours: '6',
    runQuantity: 420,
    partMassKg: '0.512',
    productionTool: 'Grinding cell 4',
    materialReport: 'QT-MAT-118',
  });
  await signAndSubmit(seeding, pack, 'Henrik Sall', -28);
  await markAll(seeding, pack, -24, {
    rows: {
      '10': {
        mark: 'accepted',
        remark: '',
        internalRemark:
          'Runout leans on zero, so a normal index would flatter it. The worst piece has half of the tolerance; accepted.',
      },
    },
  });
  await decide(seeding, pack, -21, { outcome: 'approved' });
}
