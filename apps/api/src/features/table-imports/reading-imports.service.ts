// Longer than most: preview, second preview and confirmation share what was shown, and belong side by side.
import { randomUUID } from 'node:crypto';
import type {
  confirmReadingImportRequest,
  ImportConfirmed,
  ImportSettings,
  ReadingImportPreview,
  ReadingMapping,
  remapReadingsRequest,
} from '@trammel/shared/table-import';
import type { Request } from 'express';
import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import { appendAudit } from '../../database/append-audit.ts';
import { Submission } from '../../database/entities/submission.entity.ts';
import { readStatement, writeStatement } from '../../database/raw.ts';
import { characteristicsOf, piecesOf, streamsOf, type Prepare } from '../../evidence/package-context.ts';
import { recountRows, writeReadings } from '../../evidence/write-readings.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, invalidField } from '../../http/problems.ts';
import { findSubmissionForActor, requireOpenForSupplier } from '../submissions/submissions.queries.ts';
import { holdTable, markConfirmed, openSentTable, refusing, rememberShown } from './hold-file.ts';
import type { HeldFile } from './open-table.ts';
import type { ReadingChangeOfFile, ReadingContext } from './reading-rows.ts';
import { assertNotConfirmed, findImport } from './table-imports.queries.ts';
import { inThread } from './table-threads.ts';

interface Shown {
  readonly settings: ImportSettings;
  readonly mapping: ReadingMapping | null;
  readonly unit: string | null;
  readonly newPiecesStreamId: string | null;
  /** Values that stood there when the person looked, by key: another one since then is never written over. */
  readonly standing: Readonly<Record<string, string>>;
}

const mostPiecesInStream = 300;
const conflictsShown = 20_000;

async function loadOpen(from: EntityManager, deed: Deed, id: string): Promise<Submission> {
  return requireOpenForSupplier(await findSubmissionForActor(from, deed.actor, id));
}

function contextOf(
  prepare: Prepare,
  submission: Submission,
  unit: string | null,
  newPiecesStreamId: string | null,
): ReadingContext {
  return {
    facts: characteristicsOf(prepare, submission.revisionId).list,
    streams: streamsOf(prepare, submission.id).map(({ id, name }) => ({ id, name })),
    pieces: piecesOf(prepare, submission.id).map(({ id, label, streamId, slot }) => ({
      id,
      label,
      streamId,
      slot,
    })),
    stored: prepare(
      'SELECT characteristic_id AS characteristicId, stream_id AS streamId, readings FROM characteristic_results WHERE submission_id = ?',
    ).all(submission.id) as ReadingContext['stored'],
    unit,
    newPiecesStreamId,
  };
}

const reading =
  (deed: Deed): Prepare =>
  (sql) =>
    readStatement(deed.reader, sql);

export async function previewSentReadings(
  deed: Deed,
  submissionId: string,
  req: Request,
): Promise<ReadingImportPreview> {
  const submission = await loadOpen(deed.reader.manager, deed, submissionId);
  const sent = await openSentTable(req);
  const context = contextOf(reading(deed), submission, null, null);
  const read = await readRows(sent.opened, null, null, context);
  const shown: Shown = {
    settings: read.settings,
    mapping: read.mapping,
    unit: null,
    newPiecesStreamId: null,
    standing: standingOf(read.changes),
  };
  const importId = await deed.transact((manager) =>
    holdTable(manager, deed, 'readings', submissionId, sent, shown),
  );
  return present(
    importId,
    { fileName: sent.name, format: sent.opened.format, sheets: sent.opened.sheets },
    shown,
    read,
  );
}

export async function previewRemappedReadings(
  deed: Deed,
  importId: string,
  command: z.output<typeof remapReadingsRequest>,
): Promise<ReadingImportPreview> {
  const held = await findImport(deed.reader, deed, importId, 'readings');
  assertNotConfirmed(held);
  const submission = await loadOpen(deed.reader.manager, deed, held.targetId);
  const context = contextOf(reading(deed), submission, command.unit, command.newPiecesStreamId);
  if (
    command.newPiecesStreamId !== null &&
    !context.streams.some((stream) => stream.id === command.newPiecesStreamId)
  ) {
    throw invalidField('/newPiecesStreamId', 'Choose a stream of this package.');
  }
  const read = await readRows(held, command.settings, command.mapping, context);
  const shown: Shown = { ...command, settings: read.settings, standing: standingOf(read.changes) };
  await deed.transact((manager) => Promise.resolve(rememberShown(manager, importId, shown)));
  return present(importId, held, shown, read);
}

/** Writes what was shown: new pieces, new readings, and of those already there the ones that were chosen. */
export async function confirmReadings(
  deed: Deed,
  importId: string,
  command: z.output<typeof confirmReadingImportRequest>,
): Promise<ImportConfirmed> {
  const held = await findImport(deed.reader, deed, importId, 'readings');
  assertNotConfirmed(held);
  const shown = JSON.parse(held.settings) as Shown;
  const before = await loadOpen(deed.reader.manager, deed, held.targetId);
  if (shown.mapping === null) throw new Conflict('Say first which columns hold the readings.');
  const context = contextOf(reading(deed), before, shown.unit, shown.newPiecesStreamId);
  const read = await readRows(held, shown.settings, shown.mapping, context);
  const chosen = chooser(command.conflicts);
  const changes = read.changes.filter(
    (change) => change.was === null || (shown.standing[keyOf(change)] === change.was && chosen(change)),
  );
  return deed.transact(async (manager) => {
    assertNotConfirmed(await findImport(manager, deed, importId, 'readings'));
    const submission = await loadOpen(manager, deed, held.targetId);
    const used = new Set(changes.filter((change) => change.pieceId === null).map((change) => change.piece));
    const added = addPieces(
      manager,
      submission.id,
      read.newPieces.filter((piece) => used.has(piece.label)),
    );
    const scope = {
      submissionId: submission.id,
      requestId: submission.requestId,
      revisionId: submission.revisionId,
      userId: deed.actor.userId,
      now: deed.now,
    };
    const written = writeReadings(
      manager,
      scope,
      changes.map((change) => ({
        characteristicId: change.characteristicId,
        pieceId: change.pieceId ?? added.get(change.piece) ?? '',
        text: change.text,
        was: change.was,
      })),
      false,
    );
    if (added.size > 0) recountRows(manager, submission.id);
    await manager.update(Submission, { id: submission.id }, { updatedAt: deed.now });
    markConfirmed(manager, importId, deed.now);
    appendAudit(manager, deed, {
      action: 'readings.imported',
      objectType: 'submission',
      objectId: submission.id,
      summary: `${written.changed.length} readings imported from ${held.fileName}`,
      before: written.changed
        .filter((cell) => cell.before !== null)
        .slice(0, 500)
        .map((cell) => [cell.balloon, cell.piece, cell.before]),
      after: {
        readings: written.changed.length,
        pieces: [...added.keys()],
        cells: written.changed.slice(0, 500).map((cell) => [cell.balloon, cell.piece, cell.after]),
      },
    });
    const skipped =
      read.changes.length -
      changes.length +
      written.conflicts.length +
      written.refused.length +
      read.refusedCount;
    return { written: written.changed.length, unchanged: read.same, skipped };
  });
}

type Choice = z.output<typeof confirmReadingImportRequest>['conflicts'];

const keyOf = (change: ReadingChangeOfFile): string => `${change.balloon}|${change.piece}`.slice(0, 120);

const standingOf = (changes: readonly ReadingChangeOfFile[]): Record<string, string> =>
  Object.fromEntries(changes.flatMap((change) => (change.was === null ? [] : [[keyOf(change), change.was]])));

function chooser(conflicts: Choice): (change: ReadingChangeOfFile) => boolean {
  if (conflicts.choice === 'keep') return () => false;
  if (conflicts.choice === 'replace') return () => true;
  const named = new Set(conflicts.replace);
  return (change) => named.has(keyOf(change));
}

function addPieces(
  manager: EntityManager,
  submissionId: string,
  pieces: readonly { label: string; streamId: string }[],
): Map<string, string> {
  const ids = new Map<string, string>();
  const slots = new Map<string, number>();
  const next = writeStatement(
    manager,
    'SELECT COALESCE(MAX(slot), -1) + 1 AS slot FROM sample_pieces WHERE stream_id = ?',
  );
  const count = writeStatement(manager, 'SELECT count(*) AS n FROM sample_pieces WHERE stream_id = ?');
  const insert = writeStatement(
    manager,
    `INSERT INTO sample_pieces (id, submission_id, stream_id, slot, label, made_on, lot, version) VALUES (?, ?, ?, ?, ?, NULL, '', 1)`,
  );
  for (const { label, streamId } of pieces) {
    const slot = slots.get(streamId) ?? (next.get(streamId) as { slot: number }).slot;
    if ((count.get(streamId) as { n: number }).n >= mostPiecesInStream) {
      throw new Conflict(
        `A stream takes at most ${mostPiecesInStream} pieces; piece ${label} would be one more.`,
      );
    }
    const id = randomUUID();
    insert.run(id, submissionId, streamId, slot, label);
    slots.set(streamId, slot + 1);
    ids.set(label, id);
  }
  return ids;
}

function readRows(
  file: HeldFile,
  settings: ImportSettings | null,
  mapping: ReadingMapping | null,
  context: ReadingContext,
) {
  return refusing(() =>
    inThread.readings({ file: { format: file.format, content: file.content }, settings, mapping, context }),
  );
}

function present(
  importId: string,
  file: { readonly fileName: string; readonly format: 'csv' | 'xlsx'; readonly sheets: readonly string[] },
  shown: Shown,
  read: Awaited<ReturnType<typeof readRows>>,
): ReadingImportPreview {
  const conflicts = read.changes.filter((change) => change.was !== null);
  return {
    importId,
    fileName: file.fileName,
    format: file.format,
    sheets: [...file.sheets],
    settings: read.settings,
    columns: read.columns,
    totalRows: read.totalRows,
    refused: read.refused,
    mapping: read.mapping,
    unit: shown.unit,
    newPiecesStreamId: shown.newPiecesStreamId,
    counts: {
      readings: read.changes.length - conflicts.length,
      same: read.same,
      conflicts: conflicts.length,
      refused: read.refusedCount,
      newPieces: read.newPieces.length,
    },
    newPieces: read.newPieces.map((piece) => piece.label).slice(0, 1000),
    sample: read.changes.slice(0, 100).map(({ line, balloon, piece, text, unit, converted }) => ({
      line,
      balloon,
      piece,
      text,
      unit,
      converted,
    })),
    conflicts: conflicts.slice(0, conflictsShown).map((change) => ({
      key: keyOf(change),
      line: change.line,
      balloon: change.balloon,
      piece: change.piece,
      now: change.was ?? '',
      inFile: change.text,
    })),
  };
}
