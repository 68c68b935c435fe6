import type { Faces } from '../faces/build-faces.ts';
import { reportRows, rowCounts } from '../report-rows.ts';
import type { ReportScene } from '../report-scene.ts';
import { Flow } from './flow.ts';
import { PageWriter } from './page-writer.ts';
import { drawSignaturePair } from './signature-pair.ts';

const name = 'Part submission warrant';

/** The warrant on paper: what was run, what it covers and does not, what is declared, and both signatures. */
export function warrantPdf(scene: ReportScene, faces: Faces): Promise<Uint8Array> {
  const { title, inputs } = scene;
  const pages = new PageWriter(faces, { title: `${name} ${title.partNumber}`, layout: 'portrait' });
  const flow = new Flow(pages, name, title);
  flow.heading('Package');
  flow.grid(
    [
      ['Reason', scene.reason],
      ['Decision rule', scene.decisionRule],
      ['Drawing (SHA-256)', scene.drawing, true],
    ],
    3,
  );
  flow.heading('Production run and part');
  const { warrant: facts } = inputs;
  flow.grid(
    [
      ['Run on', facts.runOn ?? '', true],
      ['Length of the run', facts.runHours === null ? '' : `${facts.runHours} h`, true],
      ['Pieces made', facts.runQuantity === null ? '' : String(facts.runQuantity), true],
      ['Mass of one part', facts.partMassKg === null ? '' : `${facts.partMassKg} kg`, true],
      ['Production tool', facts.productionTool],
      ['Material report', facts.materialReport],
      ['Exceptions', facts.exceptions || 'none stated'],
      ['Comment', facts.comment || 'none'],
    ],
    4,
  );
  coverage(flow, scene);
  deviations(flow, scene);
  decision(flow, scene);
  flow.heading('Declaration of the signatory');
  flow.notice(scene.declaration, 'graphite');
  if (scene.caution !== null) {
    flow.heading('Safety or regulatory characteristics');
    flow.notice(scene.caution, 'brass');
  }
  drawSignaturePair(flow, scene.warrant, scene.disposition);
  return flow.finish(scene.madeAt);
}

function coverage(flow: Flow, scene: ReportScene): void {
  const { inputs, findings } = scene;
  const rows = reportRows(scene);
  const counts = rowCounts(rows);
  const elements = inputs.elements.filter((element) => element.demand !== 'not-required');
  const files = elements.reduce((sum, element) => sum + element.files.length, 0);
  const figure = (caption: string, value: number) => [caption, String(value), true] as const;
  flow.heading('What it covers');
  flow.grid(
    [
      figure('Characteristics', inputs.characteristics.list.length),
      figure('Rows in tolerance', counts.inTolerance),
      figure('Rows out of tolerance', counts.out),
      figure('Rows undecided', counts.undecided),
      figure('Rows not measured', counts.notMeasured),
      figure('Deviations', scene.deviations.length),
      figure('Elements', elements.length),
      figure('Files', files),
    ],
    4,
  );
  const covered = inputs.streams.filter((stream) => !stream.blocked).map((stream) => stream.name);
  flow.paragraph(`Covers: ${covered.join(', ') || 'no stream'}. A row is one characteristic in one stream.`);
  for (const stream of inputs.streams.filter((one) => one.blocked)) {
    flow.notice(`Not covered: ${stream.name}. ${stream.blockedReason || 'No reason stated.'}`, 'vermilion');
  }
  flow.paragraph(
    `Findings of the check: ${findings.stops} stop submission, ${findings.decides} for the reviewer to decide, ${findings.informs} for information.`,
  );
}

function deviations(flow: Flow, scene: ReportScene): void {
  flow.heading('Deviations from the requirements', 20);
  if (scene.deviations.length === 0) return flow.paragraph('None asked for.');
  for (const line of scene.deviations) {
    flow.ensure(48);
    flow.grid(
      [
        ['Deviation', `${line.number}, balloon ${line.balloon}`, true],
        ['Range asked for', line.range, true],
        ['Streams', line.streams],
        ['Limited to', line.limits, true],
        ['State', line.decided === '' ? line.state : `${line.state}, ${line.decided}`],
      ],
      5,
    );
    flow.paragraph(`Cause: ${line.cause} Containment: ${line.containment}`);
  }
}

function decision(flow: Flow, { dispositionFacts: facts }: ReportScene): void {
  if (facts === null) return;
  const lines = [
    ...facts.limits,
    ...facts.conditions.map((text) => `Condition: ${text}`),
    ...facts.reasons.map((text) => `Reason: ${text}`),
    ...(facts.comment === '' ? [] : [`Comment: ${facts.comment}`]),
  ];
  if (lines.length === 0) return;
  flow.heading('Disposition', 20);
  for (const line of lines) flow.paragraph(line);
}
