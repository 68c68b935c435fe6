import { closeSync, mkdirSync, openSync, readFileSync, rmSync, writeSync } from 'node:fs';
import { dirname } from 'node:path';

export class AlreadyRunning extends Error {}

/**
 * One process owns a database: the write queue lives in memory. The file holds the owner's process id; an owner that
 * died without removing it is recognised and replaced.
 */
export function takeLock(file: string): () => void {
  mkdirSync(dirname(file), { recursive: true });
  for (let attempt = 0; attempt < 2; attempt += 1) {
    try {
      const handle = openSync(file, 'wx', 0o600);
      writeSync(handle, String(process.pid));
      closeSync(handle);
      return () => rmSync(file, { force: true });
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
      const owner = ownerOf(file);
      if (owner !== undefined && owner !== process.pid && isAlive(owner)) {
        throw new AlreadyRunning(
          `Another instance (process ${owner}) already works on this data folder; stop it first.`,
        );
      }
      rmSync(file, { force: true });
    }
  }
  throw new AlreadyRunning('Another instance took this data folder at the same moment.');
}

function ownerOf(file: string): number | undefined {
  try {
    const id = Number.parseInt(readFileSync(file, 'utf8'), 10);
    return Number.isInteger(id) && id > 0 ? id : undefined;
  } catch {
    return undefined;
  }
}

function isAlive(id: number): boolean {
  try {
    process.kill(id, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
