import { createHash, randomUUID } from 'node:crypto';
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { keepFile } from '../features/documents/documents.service.ts';
import type { Deed } from '../http/deed.ts';
import type { FileStore } from '../storage/file-store.ts';

/** Puts a file of the demo into the store the way an upload goes in: row, object, digest read back. */
export async function seedFile(
  deed: Deed,
  store: FileStore,
  dataDir: string,
  name: string,
  content: Buffer,
): Promise<string> {
  const folder = join(dataDir, 'uploads');
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const path = join(folder, randomUUID());
  writeFileSync(path, content);
  const sha256 = createHash('sha256').update(content).digest('hex');
  const file = await keepFile(deed, store, {
    path,
    name,
    mediaType: 'application/pdf',
    size: content.length,
    sha256,
  });
  return file.id;
}
