import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { PartRevision } from '../../database/entities/part-revision.entity.ts';
import type { Part } from '../../database/entities/part.entity.ts';
import type { ApprovalRequest } from '../../database/entities/request.entity.ts';
import { SubmissionElement } from '../../database/entities/submission-element.entity.ts';
import { SubmissionStream } from '../../database/entities/submission-stream.entity.ts';
import { Submission } from '../../database/entities/submission.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import { countRows, isDerivedElement, pieceLabel } from '../submissions/submissions.queries.ts';

export const noWarrantFacts = {
  runOn: null,
  runHours: null,
  runQuantity: null,
  partMassKg: null,
  productionTool: '',
  materialReport: '',
  exceptions: '',
  comment: '',
};

/** Opens a package: its streams, the pieces asked for and the elements, with the part's identity frozen as it is now. */
export async function createFirstRound(
  manager: EntityManager,
  facts: { request: ApprovalRequest; part: Part; revision: PartRevision; now: string },
): Promise<string> {
  const { request, part, revision, now } = facts;
  const submissionId = randomUUID();
  const characteristics: { kind: string; class: string }[] = await manager.query(
    'SELECT kind, class FROM characteristics WHERE revision_id = ?',
    [revision.id],
  );
  await manager.insert(Submission, {
    id: submissionId,
    requestId: request.id,
    round: 1,
    customerId: request.customerId,
    supplierId: request.supplierId,
    partId: part.id,
    revisionId: revision.id,
    partNumber: part.number,
    partName: part.name,
    revisionCode: revision.code,
    state: 'requested',
    desk: 'supplier',
    isOpen: true,
    dueOn: request.dueOn,
    createdAt: now,
    updatedAt: now,
    warrant: noWarrantFacts,
    characteristicCount: characteristics.length,
    specialCount: characteristics.filter((characteristic) => characteristic.class !== 'none').length,
    totalRows: countRows(characteristics, request.streams.length),
  });
  const streams = request.streams.map((name, index) => ({
    id: randomUUID(),
    submissionId,
    name,
    sequence: index + 1,
  }));
  // The mapper writes generated values back into what it is given, and not always into the same one: it gets copies.
  await manager.insert(
    SubmissionStream,
    streams.map((stream) => ({ ...stream })),
  );
  writePieces(manager, submissionId, streams, request.piecesPerStream);
  await manager.insert(
    SubmissionElement,
    request.elements.map((element, index) => ({
      id: randomUUID(),
      submissionId,
      sequence: index + 1,
      ...element,
      state: isDerivedElement(element.code) ? ('submitted' as const) : ('open' as const),
    })),
  );
  return submissionId;
}

function writePieces(
  manager: EntityManager,
  submissionId: string,
  streams: readonly { id: string; sequence: number }[],
  piecesPerStream: number,
): void {
  const insert = writeStatement(
    manager,
    `INSERT INTO sample_pieces (id, submission_id, stream_id, slot, label, made_on, lot, version)
     VALUES (?, ?, ?, ?, ?, NULL, '', 1)`,
  );
  for (const stream of streams) {
    for (let piece = 1; piece <= piecesPerStream; piece += 1) {
      const label = pieceLabel(stream.sequence, piece, streams.length);
      insert.run(randomUUID(), submissionId, stream.id, piece - 1, label);
    }
  }
}
