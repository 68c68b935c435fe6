import { createHmac, timingSafeEqual } from 'node:crypto';
import { appendFile, readFile } from 'node:fs/promises';
import type { Anchor } from './verify-audit.ts';

export class AnchorsBroken extends Error {}

/**
 * Heads of the audit chain in a file beside the database, a line each, under a key that is not in the database: whoever
 * rewrites the database cannot make the file agree.
 */
export class AuditAnchors {
  constructor(
    private readonly file: string,
    private readonly key: Buffer,
  ) {}

  async note(head: Anchor | null, now: string): Promise<void> {
    if (!head) return;
    const text = `${head.sequence} ${head.hash} ${now}`;
    await appendFile(this.file, `${text} ${this.seal(text)}\n`, { mode: 0o600 });
  }

  /** Throws `AnchorsBroken` when a line was not written with the key. */
  async read(): Promise<Anchor[]> {
    const content = await readFile(this.file, 'utf8').catch((error: NodeJS.ErrnoException) => {
      if (error.code === 'ENOENT') return '';
      throw error;
    });
    return content
      .split('\n')
      .filter((line) => line !== '')
      .map((line, at) => this.readLine(line, at + 1));
  }

  private readLine(line: string, number: number): Anchor {
    const cut = line.lastIndexOf(' ');
    const text = line.slice(0, cut);
    const seal = Buffer.from(line.slice(cut + 1));
    const expected = Buffer.from(this.seal(text));
    if (seal.length !== expected.length || !timingSafeEqual(seal, expected)) {
      throw new AnchorsBroken(`Line ${number} of the file of anchors was changed.`);
    }
    const [sequence, hash = ''] = text.split(' ');
    return { sequence: Number(sequence), hash };
  }

  private seal(text: string): string {
    return createHmac('sha256', this.key).update(text).digest('hex');
  }
}
