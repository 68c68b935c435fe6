import type { CharacteristicInput } from '@trammel/shared/characteristics';
import type { RequestElement, RequestReason } from '@trammel/shared/requests';
import type { Core } from '../http/core.ts';
import type { FileStore } from '../storage/file-store.ts';
import { saveTable } from '../features/characteristics/characteristics.service.ts';
import { saveReadings } from '../features/measurements/measurements.service.ts';
import { findSheet } from '../features/measurements/measurements.queries.ts';
import { createPart } from '../features/parts/parts.service.ts';
import { answerRevision, changeRevision, releaseRevision } from '../features/parts/revisions.service.ts';
import { issueRequest } from '../features/requests/issue-request.service.ts';
import { createRequest } from '../features/requests/save-request.service.ts';
import { acknowledgeRequest } from '../features/requests/request-steps.service.ts';
import { findSubmissionForActor } from '../features/submissions/submissions.queries.ts';
import type { DemoCast } from './cast.ts';
import { drawingPdf } from './drawing-pdf.ts';
import { seedFile } from './files.ts';
import type { SupplierKey } from './people.ts';

export interface Seeding {
  readonly core: Core;
  readonly store: FileStore;
  readonly cast: DemoCast;
}

export interface DemoPart {
  readonly number: string;
  readonly name: string;
  readonly material: string;
  readonly commodity: string;
  readonly revision: string;
  readonly characteristics: readonly CharacteristicInput[];
}

export interface SeededPart {
  readonly partId: string;
  readonly revisionId: string;
}

const designer = 'Tomasz Bellweather';
const reviewer = 'Ines Carrow';

/** Part, drawing and characteristics, released so many days from today. */
export async function seedPart(
  { core, store, cast }: Seeding,
  part: DemoPart,
  days: number,
): Promise<SeededPart> {
  const { number, name, material, commodity, revision } = part;
  const created = await createPart(cast.deed(designer, days), {
    number,
    name,
    material,
    commodity,
    unitSystem: 'metric',
    safetyOrRegulatory: false,
    firstRevision: revision,
  });
  const revisionId = created.revisions[0]?.id ?? '';
  await saveTable(cast.deed(designer, days), revisionId, {
    rows: part.characteristics.map((row) => ({ id: null, version: null, ...row })),
    removed: [],
  });
  await releaseWithDrawing({ core, store, cast }, revisionId, part, days);
  return { partId: created.id, revisionId };
}

export async function releaseWithDrawing(
  { core, store, cast }: Seeding,
  revisionId: string,
  part: DemoPart,
  days: number,
): Promise<void> {
  const deed = cast.deed(designer, days);
  const pdf = await drawingPdf(part);
  const drawingFileId = await seedFile(
    deed,
    store,
    core.config.dataDir,
    `${part.number}-rev-${part.revision}.pdf`,
    pdf,
  );
  const draft = await answerRevision(core.db.reader, deed.actor, revisionId);
  const drawn = await changeRevision(deed, revisionId, draft.version, {
    code: part.revision,
    drawingFileId,
    drawingDate: cast.date(days - 2),
    changeOrder: '',
    tolerancingStandard: 'iso',
    roundingRule: 'absolute',
    generalTolerance: 'ISO 2768-m',
    note: '',
  });
  await releaseRevision(cast.deed(reviewer, days, 11), revisionId, drawn.version);
}

export interface DemoRequest {
  readonly supplier: SupplierKey;
  readonly revisionId: string;
  readonly reason: RequestReason;
  readonly streamKind: 'cavity' | 'spindle' | 'die' | 'line' | 'pattern' | 'other';
  readonly streams: readonly string[];
  readonly pieces: number;
  readonly elements: readonly RequestElement[];
  readonly message: string;
  readonly issuedOn: number;
  readonly dueOn: number;
}

export interface SeededPackage {
  readonly requestId: string;
  readonly submissionId: string;
  readonly supplier: SupplierKey;
}

export async function seedRequest({ cast }: Seeding, asked: DemoRequest): Promise<SeededPackage> {
  const place = cast.suppliers[asked.supplier];
  const deed = cast.deed(reviewer, asked.issuedOn);
  const draft = await createRequest(deed, {
    supplierId: place.id,
    siteId: place.siteId,
    revisionId: asked.revisionId,
    reason: asked.reason,
    reasonNote: '',
    level: 3,
    elements: [...asked.elements],
    streamKind: asked.streamKind,
    streams: [...asked.streams],
    piecesPerStream: asked.pieces,
    decisionRule: { kind: 'simple' },
    dueOn: cast.date(asked.dueOn),
    purchaseOrder: '',
    message: asked.message,
    reviewerIds: ['Ines Carrow', 'Mirela Haddow'].map((name) => cast.customer.people.get(name)?.userId ?? ''),
  });
  const issued = await issueRequest(cast.deed(reviewer, asked.issuedOn, 10), draft.id, draft.version);
  return { requestId: draft.id, submissionId: issued.rounds[0]?.id ?? '', supplier: asked.supplier };
}

export async function acknowledge(
  { cast }: Seeding,
  pack: SeededPackage,
  who: string,
  days: number,
): Promise<void> {
  await acknowledgeRequest(cast.deed(who, days, 8), pack.requestId);
}

type Readings = Readonly<Record<string, Readonly<Record<string, readonly string[]>>>>;

/** Types the readings in, row by row of the drawing. */
export async function measure(
  { core, cast }: Seeding,
  pack: SeededPackage,
  readings: Readings,
  who: string,
  days: number,
): Promise<void> {
  const sheet = await sheetOf(core, cast, pack, who);
  const changes = Object.entries(readings).flatMap(([balloon, streams]) =>
    Object.entries(streams).flatMap(([streamName, texts]) => {
      const stream = sheet.streams.find((candidate) => candidate.name === streamName);
      const facts = sheet.characteristics.find((candidate) => candidate.balloon === balloon);
      const pieces = sheet.pieces.filter((piece) => piece.streamId === stream?.id);
      if (!facts || !stream) return [];
      return texts.flatMap((text, index) => {
        const piece = pieces[index];
        return piece ? [{ characteristicId: facts.id, pieceId: piece.id, text, was: null }] : [];
      });
    }),
  );
  await saveReadings(cast.deed(who, days, 13), pack.submissionId, { changes, overwrite: true });
}

export async function sheetOf(core: Core, cast: DemoCast, pack: SeededPackage, who: string) {
  const found = await findSubmissionForActor(
    core.db.reader.manager,
    cast.deed(who, 0).actor,
    pack.submissionId,
  );
  return findSheet(core.db.reader, found.submission, { after: 0, limit: 500 }, true);
}
