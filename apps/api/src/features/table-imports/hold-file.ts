import { randomUUID } from 'node:crypto';
import type { Request, RequestHandler } from 'express';
import multer from 'multer';
import type { EntityManager } from 'typeorm';
import type { Clock } from '../../clock.ts';
import { later } from '../../clock.ts';
import type { Database } from '../../database/data-source.ts';
import { TableImport } from '../../database/entities/table-import.entity.ts';
import { writeStatement } from '../../database/raw.ts';
import type { Deed } from '../../http/deed.ts';
import { Invalid, invalidField } from '../../http/problems.ts';
import { tableBudget } from '../../tables/budget.ts';
import { TableRefused } from '../../tables/table.ts';
import type { OpenedFile } from './open-table.ts';
import { heldFor } from './table-imports.queries.ts';
import { inThread } from './table-threads.ts';

/** One table in the field `file`; small enough for memory, larger is refused as it comes. */
export const receiveTable: RequestHandler = multer({
  storage: multer.memoryStorage(),
  defParamCharset: 'utf8',
  limits: {
    fileSize: tableBudget.fileBytes,
    files: 1,
    fields: 0,
    parts: 1,
    headerPairs: 20,
    fieldNameSize: 40,
  },
}).single('file');

export interface SentTable {
  readonly name: string;
  readonly opened: OpenedFile;
}

/** A refusal of the file as a whole, as the person reads it. */
export async function refusing<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof TableRefused)
      throw new Invalid([{ pointer: '/file', detail: `${error.message} ${error.remedy}` }], error.message);
    throw error;
  }
}

const unprintable = /[\p{Cc}\u202a-\u202e\u2066-\u2069]/gu;

export function openSentTable(req: Request): Promise<SentTable> {
  const { file } = req;
  if (!file) throw invalidField('/file', 'Choose a file.');
  const name = file.originalname.replace(unprintable, '').slice(-200) || 'table';
  return refusing(async () => ({ name, opened: await inThread.open({ name, bytes: file.buffer }) }));
}

/** Keeps the file as read until it is confirmed or swept. */
export async function holdTable(
  manager: EntityManager,
  deed: Deed,
  kind: TableImport['kind'],
  targetId: string,
  { name, opened }: SentTable,
  settings: unknown,
): Promise<string> {
  const id = randomUUID();
  await manager.insert(TableImport, {
    id,
    organisationId: deed.actor.organisationId,
    userId: deed.actor.userId,
    kind,
    targetId,
    fileName: name,
    format: opened.format,
    sheets: [...opened.sheets],
    content: opened.content,
    settings: JSON.stringify(settings),
    createdAt: deed.now,
    confirmedAt: null,
  });
  return id;
}

/** What was last shown is what a confirmation imports. */
export function rememberShown(manager: EntityManager, id: string, shown: unknown): void {
  writeStatement(manager, 'UPDATE table_imports SET settings = ? WHERE id = ?').run(
    JSON.stringify(shown),
    id,
  );
}

/** The file is let go with the confirmation; that it happened stays until the sweep. */
export function markConfirmed(manager: EntityManager, id: string, now: string): void {
  writeStatement(manager, `UPDATE table_imports SET confirmed_at = ?, content = '' WHERE id = ?`).run(
    now,
    id,
  );
}

export function sweepTableImports(db: Database, clock: Clock): Promise<void> {
  return db.writeTransaction((manager) => {
    writeStatement(manager, 'DELETE FROM table_imports WHERE created_at < ?').run(
      later(clock.now(), -heldFor),
    );
    return Promise.resolve();
  });
}
