import { isUndetermined } from '@trammel/metrology/conformance';
import { statedLimits } from '@trammel/metrology/tolerance-notation';
import type { CharacteristicInput, UnitSymbol } from '@trammel/shared/characteristics';
import type {
  CharacteristicImportPreview,
  ImportConfirmed,
  ImportIssue,
  ImportSettings,
  RemapCharacteristicsRequest,
} from '@trammel/shared/table-import';
import type { Request } from 'express';
import type { EntityManager } from 'typeorm';
import { appendAudit } from '../../database/append-audit.ts';
import { canonicalJson } from '../../database/canonical-json.ts';
import { writeCharacteristicTable, type TableChange } from '../../database/characteristic-table.ts';
import type { Characteristic } from '../../database/entities/characteristic.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, Invalid, NotFound } from '../../http/problems.ts';
import { findCharacteristics } from '../characteristics/characteristics.queries.ts';
import { findRevisionForActor, type FoundRevision } from '../parts/parts.queries.ts';
import type { CharacteristicMapping, ReadCharacteristic } from './characteristic-rows.ts';
import { columnLabels } from './column-words.ts';
import { holdTable, markConfirmed, openSentTable, refusing, rememberShown } from './hold-file.ts';
import type { HeldFile } from './open-table.ts';
import { assertNotConfirmed, findImport } from './table-imports.queries.ts';
import { inThread } from './table-threads.ts';

interface Shown {
  readonly settings: ImportSettings;
  readonly mapping: CharacteristicMapping;
}

interface FileFacts {
  readonly fileName: string;
  readonly format: 'csv' | 'xlsx';
  readonly sheets: readonly string[];
}

async function loadDraft(from: EntityManager, deed: Deed, revisionId: string): Promise<FoundRevision> {
  const found = await findRevisionForActor(from, deed.actor, revisionId);
  if (found.side !== 'owner') throw new NotFound();
  if (found.revision.state !== 'draft') {
    throw new Conflict(
      `Revision ${found.revision.code} is ${found.revision.state} and no longer changes. Create the next revision to change it.`,
    );
  }
  return found;
}

const defaultUnit = (found: FoundRevision): UnitSymbol => (found.part.unitSystem === 'inch' ? 'in' : 'mm');

export async function previewSentCharacteristics(
  deed: Deed,
  revisionId: string,
  req: Request,
): Promise<CharacteristicImportPreview> {
  const found = await loadDraft(deed.reader.manager, deed, revisionId);
  const sent = await openSentTable(req);
  const read = await readRows(sent.opened, null, defaultUnit(found));
  const existing = await findCharacteristics(deed.reader, revisionId);
  const importId = await deed.transact((manager) =>
    holdTable(manager, deed, 'characteristics', revisionId, sent, {
      settings: read.settings,
      mapping: read.mapping,
    }),
  );
  return present(
    importId,
    { fileName: sent.name, format: sent.opened.format, sheets: sent.opened.sheets },
    read,
    existing,
  );
}

export async function previewRemapped(
  deed: Deed,
  importId: string,
  command: RemapCharacteristicsRequest,
): Promise<CharacteristicImportPreview> {
  const held = await findImport(deed.reader, deed, importId, 'characteristics');
  assertNotConfirmed(held);
  const found = await loadDraft(deed.reader.manager, deed, held.targetId);
  const shown: Shown = { settings: command.settings, mapping: command.mapping };
  const read = await readRows(held, shown, defaultUnit(found));
  const existing = await findCharacteristics(deed.reader, held.targetId);
  await deed.transact((manager) =>
    Promise.resolve(rememberShown(manager, importId, { ...shown, settings: read.settings })),
  );
  return present(importId, held, read, existing);
}

/** Imports the rows that were shown as good; the refused ones stay out. */
export async function confirmCharacteristics(deed: Deed, importId: string): Promise<ImportConfirmed> {
  const held = await findImport(deed.reader, deed, importId, 'characteristics');
  assertNotConfirmed(held);
  const before = await loadDraft(deed.reader.manager, deed, held.targetId);
  const read = await readRows(held, JSON.parse(held.settings) as Shown, defaultUnit(before));
  return deed.transact(async (manager) => {
    assertNotConfirmed(await findImport(manager, deed, importId, 'characteristics'));
    const { revision } = await loadDraft(manager, deed, held.targetId);
    const sorted = sortRows(read.rows, await findCharacteristics(manager, revision.id));
    const outcome = await writeCharacteristicTable(manager, revision, sorted.changes, []);
    if ('stale' in outcome)
      throw new Conflict('The table changed while the file was imported. Look at the preview again.');
    if ('faults' in outcome) {
      throw new Invalid(
        outcome.faults.map((fault) => ({
          pointer: `/lines/${sorted.lines[fault.row] ?? 0}/${fault.field}`,
          detail: `Line ${sorted.lines[fault.row] ?? 0}: ${fault.detail}`,
        })),
      );
    }
    markConfirmed(manager, importId, deed.now);
    const { done } = outcome;
    if (done.added + done.changed > 0) {
      writeStatement(manager, 'UPDATE part_revisions SET version = version + 1 WHERE id = ?').run(
        revision.id,
      );
      appendAudit(manager, deed, {
        action: 'characteristics.imported',
        objectType: 'revision',
        objectId: revision.id,
        summary: `Characteristics of revision ${revision.code} imported from ${held.fileName}: ${done.added} added, ${done.changed} replaced`,
        before: done.before,
        after: done.after,
      });
    }
    return { written: done.added + done.changed, unchanged: sorted.same.size, skipped: read.refused.length };
  });
}

function readRows(file: HeldFile, shown: Shown | null, unit: UnitSymbol) {
  return refusing(() =>
    inThread.characteristics({
      file: { format: file.format, content: file.content },
      settings: shown?.settings ?? null,
      mapping: shown?.mapping ?? null,
      defaultUnit: unit,
    }),
  );
}

interface SortedRows {
  readonly changes: TableChange[];
  readonly lines: number[];
  readonly same: ReadonlySet<string>;
  readonly known: ReadonlyMap<string, Characteristic>;
}

function sortRows(rows: readonly ReadCharacteristic[], existing: readonly Characteristic[]): SortedRows {
  const known = new Map(existing.map((row) => [row.balloon, row]));
  const changes: TableChange[] = [];
  const lines: number[] = [];
  const same = new Set<string>();
  for (const { line, input } of rows) {
    const row = known.get(input.balloon);
    if (row && isSame(row, input)) {
      same.add(input.balloon);
      continue;
    }
    changes.push({ id: row?.id ?? null, version: row?.version ?? null, input });
    lines.push(line);
  }
  return { changes, lines, same, known };
}

function isSame(row: Characteristic, input: CharacteristicInput): boolean {
  const fields = Object.keys(input) as (keyof CharacteristicInput)[];
  return fields.every((field) => canonicalJson(row[field] ?? null) === canonicalJson(input[field] ?? null));
}

function present(
  importId: string,
  file: FileFacts,
  read: Awaited<ReturnType<typeof readRows>>,
  existing: readonly Characteristic[],
): CharacteristicImportPreview {
  const { same, known } = sortRows(read.rows, existing);
  const refused: ImportIssue[] =
    read.mapping.balloon === undefined || read.mapping.balloon === null
      ? [noBalloonColumn(read.settings)]
      : read.refused;
  const rows = read.rows.map(({ line, input }) => {
    const limits = statedLimits(input.tolerance, input.unit);
    const resolved = isUndetermined(limits) ? null : limits;
    return {
      line,
      balloon: input.balloon,
      description: input.description,
      kind: input.kind,
      nominal: resolved?.nominal ?? null,
      lowerLimit: resolved?.lower ?? null,
      upperLimit: resolved?.upper ?? null,
      unit: input.unit,
      action: same.has(input.balloon)
        ? ('same' as const)
        : known.has(input.balloon)
          ? ('replace' as const)
          : ('add' as const),
    };
  });
  const count = (action: 'add' | 'replace' | 'same') => rows.filter((row) => row.action === action).length;
  return {
    importId,
    fileName: file.fileName,
    format: file.format,
    sheets: [...file.sheets],
    settings: read.settings,
    columns: read.columns,
    totalRows: read.totalRows,
    refused: refused.slice(0, 500),
    mapping: read.mapping,
    rows,
    counts: { add: count('add'), replace: count('replace'), same: count('same'), refused: refused.length },
  };
}

const noBalloonColumn = (settings: ImportSettings): ImportIssue => ({
  line: Math.max(1, settings.headerLine),
  column: columnLabels.balloon,
  detail: 'No column holds the balloon numbers.',
  remedy: 'Choose the column of the balloon numbers, or the line of the header.',
});
