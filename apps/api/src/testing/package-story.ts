// Longer than most: the steps of one story share one scene, and a test reads them in one place.
import type { CharacteristicRequest } from '@trammel/shared/characteristics';
import type { MeasurementSheetResponse } from '@trammel/shared/measurements';
import type { SaveRequestRequest } from '@trammel/shared/requests';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { buildCast, testPassword, type Cast } from './builders.ts';
import { ifVersion, onceKey, signInAs, type Client } from './sign-in.ts';
import { createTestApp, type TestApp } from './test-app.ts';

/** The smallest drawing that the file sniffer takes for a PDF. */
export const smallPdf = Buffer.from(
  '%PDF-1.4\n1 0 obj<</Type/Catalog>>endobj\ntrailer<</Root 1 0 R>>\n%%EOF\n',
);

export const bore: CharacteristicRequest = {
  balloon: '1',
  description: 'Bore',
  kind: 'size',
  tolerance: { form: 'limits', lower: '19.00', upper: '19.05' },
  unit: 'mm',
  decimals: 2,
  class: 'significant',
};
export const bossPosition: CharacteristicRequest = {
  balloon: '2',
  description: 'Position of the bore',
  kind: 'geometric',
  tolerance: { form: 'max', upper: '0.15', zeroBound: true },
  geometric: {
    type: 'position',
    diametral: true,
    modifier: 'MMC',
    datums: 'A|B|C',
    feature: 'internal',
    sizeBalloon: '1',
  },
  unit: 'mm',
  decimals: 2,
};
export const wall: CharacteristicRequest = {
  balloon: '3',
  description: 'Wall',
  kind: 'size',
  tolerance: { form: 'symmetric', nominal: '2.50', tolerance: '0.10' },
  unit: 'mm',
  decimals: 2,
};
export const marking: CharacteristicRequest = {
  balloon: '4',
  description: 'Marking legible',
  kind: 'attribute',
  tolerance: { form: 'none' },
  unit: '1',
  decimals: 0,
};

const usualFacts = {
  runHours: '4',
  runQuantity: 1200,
  partMassKg: '0.0613',
  productionTool: 'M-0733',
  materialReport: '',
  exceptions: '',
  comment: '',
};

/** One package carried from request to decision through HTTP, step by step; each step can be left where a test needs it. */
export class PackageStory {
  submissionId = '';
  requestId = '';
  revisionId = '';
  partId = '';

  private constructor(
    readonly app: TestApp,
    readonly cast: Cast,
    readonly reviewer: Client,
    readonly supplier: Client,
    readonly signer: Client,
    readonly purchaser: Client,
  ) {}

  static async begin(options: Parameters<typeof createTestApp>[0] = {}): Promise<PackageStory> {
    const app = await createTestApp(options);
    const cast = await buildCast(app);
    return new PackageStory(
      app,
      cast,
      await signInAs(app, cast.reviewer),
      await signInAs(app, cast.supplierQuality),
      await signInAs(app, cast.supplierSigner),
      await signInAs(app, cast.purchaser),
    );
  }

  today(): string {
    return this.app.clock.now().slice(0, 10);
  }

  inDays(days: number): string {
    return new Date(Date.parse(this.app.clock.now()) + days * 86_400_000).toISOString().slice(0, 10);
  }

  async releasePart(characteristics: readonly CharacteristicRequest[], number = 'TD-1'): Promise<void> {
    const { reviewer } = this;
    const part = await reviewer
      .post('/api/parts')
      .send({ number, name: 'Cover', firstRevision: 'B' })
      .expect(201);
    this.partId = part.body.id;
    this.revisionId = part.body.revisions[0].id;
    const drawing = await reviewer
      .post('/api/files?purpose=drawing')
      .attach('file', smallPdf, 'drawing.pdf')
      .expect(201);
    const revision = await reviewer.get(`/api/revisions/${this.revisionId}`).expect(200);
    const changed = await reviewer
      .put(`/api/revisions/${this.revisionId}`)
      .set(ifVersion(revision.body.version))
      .send({
        code: 'B',
        drawingFileId: drawing.body.id,
        drawingDate: null,
        changeOrder: '',
        tolerancingStandard: 'iso',
        roundingRule: 'absolute',
        generalTolerance: '',
        note: '',
      })
      .expect(200);
    for (const characteristic of characteristics) {
      await reviewer
        .post(`/api/revisions/${this.revisionId}/characteristics`)
        .send(characteristic)
        .expect(201);
    }
    const fresh = await reviewer.get(`/api/revisions/${this.revisionId}`).expect(200);
    await reviewer
      .post(`/api/revisions/${this.revisionId}/release`)
      .set(onceKey())
      .set(ifVersion(fresh.body.version ?? changed.body.version))
      .expect(200);
  }

  async issue(overrides: Partial<SaveRequestRequest> = {}): Promise<void> {
    const { reviewer, cast } = this;
    const draft = await reviewer
      .post('/api/requests')
      .send({
        supplierId: cast.supplier.id,
        siteId: cast.supplier.siteId,
        revisionId: this.revisionId,
        reason: 'initial',
        level: 3,
        elements: [
          { code: 'control-plan', label: 'Control plan', demand: 'submit' },
          { code: 'dimensional-results', label: 'Dimensional results', demand: 'submit' },
          { code: 'warrant', label: 'Part submission warrant', demand: 'submit' },
        ],
        streams: ['cavity 1', 'cavity 2'],
        piecesPerStream: 3,
        decisionRule: { kind: 'simple' },
        dueOn: this.inDays(30),
        reviewerIds: [cast.reviewer.id],
        ...overrides,
      })
      .expect(201);
    this.requestId = draft.body.id;
    const issued = await reviewer
      .post(`/api/requests/${this.requestId}/issue`)
      .set(onceKey())
      .set(ifVersion(draft.body.version))
      .expect(200);
    this.submissionId = issued.body.rounds[0].id;
  }

  async acknowledge(): Promise<void> {
    await this.supplier.post(`/api/requests/${this.requestId}/acknowledge`).expect(200);
  }

  async head(who: Client = this.supplier): Promise<SubmissionResponse> {
    return (await who.get(`/api/submissions/${this.submissionId}`).expect(200)).body as SubmissionResponse;
  }

  async sheet(who: Client = this.supplier): Promise<MeasurementSheetResponse> {
    return (await who.get(`/api/submissions/${this.submissionId}/measurements`).expect(200))
      .body as MeasurementSheetResponse;
  }

  /** Readings by balloon and stream, in the order of the pieces. */
  async measure(readings: Record<string, Record<string, readonly (string | null)[]>>, overwrite = true) {
    const sheet = await this.sheet();
    const changes = Object.entries(readings).flatMap(([balloon, streams]) =>
      Object.entries(streams).flatMap(([name, texts]) => {
        const stream = sheet.streams.find((candidate) => candidate.name === name);
        const pieces = sheet.pieces.filter((piece) => piece.streamId === stream?.id);
        const characteristic = sheet.characteristics.find((candidate) => candidate.balloon === balloon);
        return texts.map((text, index) => ({
          characteristicId: characteristic?.id ?? '',
          pieceId: pieces[index]?.id ?? '',
          text,
          was: null,
        }));
      }),
    );
    return this.supplier
      .put(`/api/submissions/${this.submissionId}/readings`)
      .send({ changes, overwrite })
      .expect(200);
  }

  /** A gauge in calibration and today's date on every row. */
  async nameGauges(dueOn = this.inDays(200)): Promise<string> {
    const gauge = await this.supplier
      .post('/api/gauges')
      .send({
        code: `CMM-${Math.random().toString(36).slice(2, 8)}`,
        kind: 'Coordinate measuring machine',
        resolution: '0.0001',
        unit: 'mm',
        calibratedOn: this.inDays(-100),
        dueOn,
      })
      .expect(201);
    const sheet = await this.sheet();
    const rows = sheet.characteristics.flatMap((facts) =>
      sheet.streams.map((stream) => ({ characteristicId: facts.id, streamId: stream.id })),
    );
    await this.supplier
      .post(`/api/submissions/${this.submissionId}/rows`)
      .send({ rows, gaugeId: gauge.body.id, measuredOn: this.today() })
      .expect(200);
    return gauge.body.id as string;
  }

  async attachControlPlan(statedRevision = 'B'): Promise<void> {
    const elements = await this.supplier.get(`/api/submissions/${this.submissionId}/elements`).expect(200);
    const element = elements.body.items.find((item: { code: string }) => item.code === 'control-plan');
    const file = await this.supplier
      .post('/api/files')
      .attach('file', smallPdf, 'control-plan.pdf')
      .expect(201);
    const attached = await this.supplier
      .post(`/api/elements/${element.id}/files`)
      .send({ fileId: file.body.id })
      .expect(201);
    await this.supplier
      .put(`/api/elements/${element.id}`)
      .set(ifVersion(attached.body.version))
      .send({ state: 'submitted', reason: '', statedPart: '', statedRevision, dated: null, note: '' })
      .expect(200);
  }

  async stateRun(): Promise<void> {
    const { version } = await this.head();
    await this.supplier
      .put(`/api/submissions/${this.submissionId}/warrant`)
      .set(ifVersion(version))
      .send({ ...usualFacts, runOn: this.inDays(-1) })
      .expect(200);
  }

  async check() {
    return (await this.supplier.get(`/api/submissions/${this.submissionId}/check`).expect(200)).body;
  }

  async sign(key = onceKey()) {
    const warrant = await this.signer.get(`/api/submissions/${this.submissionId}/warrant`).expect(200);
    return this.signer
      .post(`/api/submissions/${this.submissionId}/warrant/signature`)
      .set(key)
      .send({ password: testPassword, digest: warrant.body.digest });
  }

  /** Everything in tolerance and complete, ready for the signature. */
  async prepareClean(): Promise<void> {
    await this.measure({
      '1': { 'cavity 1': ['19.02', '19.03', '19.04'], 'cavity 2': ['19.01', '19.02', '19.02'] },
      '2': { 'cavity 1': ['0.066', '0.080', '0.100'], 'cavity 2': ['0.071', '0.082', '0.090'] },
      '3': { 'cavity 1': ['2.50', '2.52', '2.51'], 'cavity 2': ['2.49', '2.50', '2.53'] },
      '4': { 'cavity 1': ['pass', 'pass', 'pass'], 'cavity 2': ['pass', 'pass', 'pass'] },
    });
    await this.nameGauges();
    await this.attachControlPlan();
    await this.stateRun();
  }

  async submitClean(): Promise<void> {
    await this.prepareClean();
    const signed = await this.sign();
    if (signed.status !== 201) throw new Error(`not signed: ${JSON.stringify(signed.body)}`);
  }

  async review(show = 'all') {
    return (await this.reviewer.get(`/api/submissions/${this.submissionId}/review?show=${show}`).expect(200))
      .body;
  }

  mark(characteristicId: string, version: number, body: Record<string, unknown>) {
    return this.reviewer
      .put(`/api/submissions/${this.submissionId}/characteristics/${characteristicId}/decision`)
      .set(ifVersion(version))
      .send({ remark: '', internalRemark: '', deviationId: null, ...body });
  }

  /** Marks every row and element as accepted, one by one. */
  async acceptAll(): Promise<void> {
    const { rows } = await this.review();
    for (const row of rows)
      await this.mark(row.characteristic.id, row.decision.version, { mark: 'accepted' }).expect(200);
    const elements = await this.reviewer.get(`/api/submissions/${this.submissionId}/elements`).expect(200);
    for (const element of elements.body.items) {
      await this.reviewer
        .put(`/api/submissions/${this.submissionId}/elements/${element.id}/decision`)
        .set(ifVersion(element.markVersion))
        .send({ mark: 'accepted', remark: '', internalRemark: '' })
        .expect(200);
    }
  }

  async dispose(body: Record<string, unknown>, key = onceKey()) {
    const draft = await this.reviewer
      .get(`/api/submissions/${this.submissionId}/disposition-draft`)
      .expect(200);
    return this.reviewer
      .post(`/api/submissions/${this.submissionId}/disposition`)
      .set(key)
      .send({ password: testPassword, digest: draft.body.digest, ...body });
  }

  async buyingLine() {
    const list = await this.purchaser.get('/api/buying-status').expect(200);
    return list.body.items[0];
  }
}
