import PDFDocument from 'pdfkit';
import { compare } from '../../../.ci/bench-harness.mjs';
import type { CheckInputs } from '../src/evidence/check-inputs.ts';
import type { CharacteristicFacts } from '../src/evidence/characteristic-facts.ts';
import { emptyRow } from '../src/evidence/stored-row.ts';
import { buildFaces } from '../src/features/reports/faces/build-faces.ts';
import { resultsPdf } from '../src/features/reports/pages/results-pdf.ts';
import type { ReportScene } from '../src/features/reports/report-scene.ts';
import { reportRows } from '../src/features/reports/report-rows.ts';

const rowCount = 2000;
const faces = buildFaces();
const stream = { id: 'stream', name: 'cavity 1', sequence: 1, blocked: false, blockedReason: '', version: 1 };

const facts: CharacteristicFacts[] = Array.from({ length: rowCount }, (_, at) => ({
  id: `characteristic ${at}`,
  sequence: at,
  balloon: String(at + 1),
  sheet: '1',
  zone: 'B4',
  description: `Bore ${at + 1}`,
  kind: 'size',
  class: at % 10 === 0 ? 'significant' : 'none',
  unit: 'mm',
  decimals: 3,
  nominal: '25.000',
  lowerLimit: '25.000',
  upperLimit: '25.021',
  naturalLower: false,
  geometric: null,
  attributeAllowed: false,
  method: '',
  pieces: null,
  controlledBy: [],
}));
const readingsOf = (at: number) =>
  Array.from({ length: 3 }, (_, piece) => `25.0${String(((at * 7 + piece * 5) % 21) + 1).padStart(2, '0')}`);

const inputs: CheckInputs = {
  submission: {
    id: 'submission',
    round: 1,
    partNumber: 'TD-1',
    revisionCode: 'B',
    revisionState: 'released',
    newestRevision: 'B',
    drawingSha256: null,
  },
  rules: { decisionRule: { kind: 'simple' }, roundingRule: 'absolute', piecesPerStream: 3 },
  characteristics: {
    list: facts,
    byId: new Map(facts.map((one) => [one.id, one])),
    byBalloon: new Map(facts.map((one) => [one.balloon, one])),
    dependents: new Map(),
  },
  streams: [stream],
  pieces: [0, 1, 2].map((slot) => ({
    id: `piece ${slot}`,
    streamId: stream.id,
    slot,
    label: String(slot + 1),
    madeOn: null,
    lot: '',
    version: 1,
  })),
  rows: facts.map((one, at) => ({ ...emptyRow(one, stream.id), readings: readingsOf(at).join('\n') })),
  gauges: new Map(),
  elements: [],
  deviations: [],
  warrant: {
    runOn: null,
    runHours: null,
    runQuantity: null,
    partMassKg: null,
    productionTool: '',
    materialReport: '',
    exceptions: '',
    comment: '',
  },
  today: '2026-03-02',
};
const scene: ReportScene = {
  title: {
    partNumber: 'TD-1',
    revision: 'B',
    description: 'Cover',
    request: '1, round 1',
    round: 1,
    state: 'submitted',
    supplier: 'Supplier',
    site: 'Main works',
    customer: 'Customer',
    material: 'Steel',
    units: 'metric',
    level: 3,
    due: '2026-04-01',
  },
  reason: 'Initial submission',
  decisionRule: 'Simple acceptance, limits taken as absolute',
  drawing: '',
  declaration: '',
  warrant: null,
  disposition: null,
  dispositionFacts: null,
  deviations: [],
  findings: { stops: 0, decides: 0, informs: 0 },
  caution: null,
  inputs,
  officialRows: null,
  madeAt: '2026-03-02T08:00:00.000Z',
};

const cells = reportRows(scene).map((row) => [
  row.facts.balloon,
  row.facts.description,
  row.facts.lowerLimit ?? '',
  row.facts.upperLimit ?? '',
  row.facts.unit,
  row.checked.minimum ?? '',
  row.checked.maximum ?? '',
  row.checked.mean?.toFixed(4) ?? '',
  row.checked.standardDeviation?.toFixed(5) ?? '',
  row.checked.verdict,
]);

/** The leanest use of pdfkit: a hundred rows of ten texts on each of twenty pages, in the same embedded font. */
function plainLoop(): Promise<number> {
  return new Promise((resolve) => {
    const document = new PDFDocument({ size: 'A4', margin: 30, autoFirstPage: false });
    let bytes = 0;
    document.on('data', (chunk: Buffer) => (bytes += chunk.length));
    document.on('end', () => resolve(bytes));
    cells.forEach((row, at) => {
      if (at % 100 === 0) document.addPage().font(Buffer.from(faces.text)).fontSize(6);
      row.forEach((text, column) =>
        document.text(text, 30 + column * 53, 30 + (at % 100) * 7.8, { lineBreak: false }),
      );
    });
    document.end();
  });
}

await compare('results PDF of 2,000 rows with embedded fonts, against a plain pdfkit loop', {
  product: () => resultsPdf(scene, faces),
  limit: plainLoop,
  goal: 1.2,
  rounds: 7,
  warmUp: 1,
});
