import { createHash, randomUUID } from 'node:crypto';
import { rm } from 'node:fs/promises';
import type { FileResponse } from '@trammel/shared/documents';
import type { DataSource } from 'typeorm';
import { DAY, MINUTE, later, type Clock } from '../../clock.ts';
import type { Database } from '../../database/data-source.ts';
import { appendAudit } from '../../database/append-audit.ts';
import { StoredFile } from '../../database/entities/stored-file.entity.ts';
import type { Deed } from '../../http/deed.ts';
import { Conflict, NotFound, unavailable } from '../../http/problems.ts';
import type { FileStore } from '../../storage/file-store.ts';
import type { ReceivedUpload } from '../../storage/receive-file.ts';
import { findReadableFile, findUsage, presentFile, type FileRow } from './documents.queries.ts';

/** What one organisation may keep here, so that none can fill the disk for the others. */
const allowance = { bytes: 50 * 1024 ** 3, files: 50_000 };

/**
 * A row first, then the object, then its digest read back, then the row counts: an object without a row is swept, a row
 * without its object is never shown.
 */
export async function keepFile(deed: Deed, store: FileStore, upload: ReceivedUpload): Promise<FileResponse> {
  const { actor } = deed;
  try {
    const used = findUsage(deed.reader, actor.organisationId);
    if (used.bytes + upload.size > allowance.bytes || used.files >= allowance.files) {
      throw new Conflict(
        'Your organisation has used up its room for files. Remove what is not needed or ask for more.',
      );
    }
    const file: StoredFile = Object.assign(new StoredFile(), {
      id: randomUUID(),
      organisationId: actor.organisationId,
      uploadedById: actor.userId,
      uploadedByName: actor.name,
      name: upload.name.normalize('NFC'),
      mediaType: upload.mediaType,
      size: upload.size,
      sha256: upload.sha256,
      objectKey: store.newKey(actor.organisationId),
      state: 'pending' as const,
      createdAt: deed.now,
    });
    await deed.transact((manager) => manager.insert(StoredFile, file));
    await store.put(file.objectKey, upload, file.mediaType);
    await deed.transact(async (manager) => {
      await manager.update(StoredFile, { id: file.id }, { state: 'stored' });
      appendAudit(manager, deed, {
        action: 'file.stored',
        objectType: 'file',
        objectId: file.id,
        summary: `File ${file.name} received`,
        after: { name: file.name, size: file.size, sha256: file.sha256 },
      });
    });
    return presentFile(file);
  } finally {
    await rm(upload.path, { force: true });
  }
}

export function findFileFor(deed: Pick<Deed, 'reader' | 'actor'>, fileId: string): FileRow {
  const file = findReadableFile(deed.reader, deed.actor.organisationId, fileId);
  if (!file) throw new NotFound();
  return file;
}

/** Files found whole lately: a viewer asks for one drawing in hundreds of pieces. */
const foundWhole = new Map<string, number>();
const trustedFor = 5 * MINUTE;

/** Compares the stored bytes with the digest of their arrival; what differs is not handed out. */
export async function assertWhole(
  db: Database,
  clock: Clock,
  store: FileStore,
  file: FileRow,
): Promise<void> {
  const found = foundWhole.get(file.objectKey);
  if (found !== undefined && clock.millis() - found < trustedFor) return;
  const hash = createHash('sha256');
  for await (const chunk of await store.open(file.objectKey)) hash.update(chunk as Buffer);
  if (hash.digest('hex') === file.sha256) {
    if (foundWhole.size > 2000) foundWhole.clear();
    foundWhole.set(file.objectKey, clock.millis());
    return;
  }
  await db.writeTransaction(async (manager) => {
    const { organisation } = await manager.findOneOrFail(StoredFile, {
      where: { id: file.id },
      relations: { organisation: true },
    });
    appendAudit(
      manager,
      { now: clock.now(), actor: null, organisation },
      {
        action: 'file.damaged',
        objectType: 'file',
        objectId: file.id,
        summary: `File ${file.name} differs from what was received and was not handed out`,
      },
    );
  });
  throw unavailable(
    'The stored file differs from what was received, so it is not handed out. Your administrator can see this in the audit trail.',
  );
}

/** Uploads that never came to an end: object and row go after a day. */
export async function sweepPendingFiles(db: Database, clock: Clock, store: FileStore): Promise<void> {
  for (const file of await pendingSince(db.reader, later(clock.now(), -DAY))) {
    await store.remove(file.objectKey);
    await db.writeTransaction((manager) => manager.delete(StoredFile, { id: file.id, state: 'pending' }));
  }
}

function pendingSince(reader: DataSource, before: string): Promise<StoredFile[]> {
  return reader
    .getRepository(StoredFile)
    .createQueryBuilder('file')
    .where(`file.state = 'pending' AND file.createdAt < :before`, { before })
    .limit(100)
    .getMany();
}
