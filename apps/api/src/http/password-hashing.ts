import { hash, verify } from '@node-rs/argon2';
import { TooMany } from './problems.ts';

/** The package exports this as a const enum, which does not exist at run time. */
const argon2id = 2;

/** OWASP's minimum for Argon2id: 19 MiB, two passes, one lane. */
const parameters = { algorithm: argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;
const currentPrefix = '$argon2id$v=19$m=19456,t=2,p=1$';

/** Two at a time keep the other requests going on two cores; beyond the queue the caller is told to wait. */
const atOnce = 2;
const longestQueue = 60;

export class PasswordHashing {
  private running = 0;
  private readonly waiting: (() => void)[] = [];
  private dummy: Promise<string> | undefined;

  hash(password: string): Promise<string> {
    return this.inTurn(() => hash(password.normalize('NFC'), parameters));
  }

  verify(stored: string, password: string): Promise<boolean> {
    return this.inTurn(() => verify(stored, password.normalize('NFC')));
  }

  /** Takes as long as a real verification, for an address nobody has. */
  async verifyNothing(password: string): Promise<false> {
    this.dummy ??= this.hash('a password that opens nothing');
    await this.verify(await this.dummy, password);
    return false;
  }

  isOutdated(stored: string): boolean {
    return !stored.startsWith(currentPrefix);
  }

  private async inTurn<T>(work: () => Promise<T>): Promise<T> {
    if (this.running >= atOnce) {
      if (this.waiting.length >= longestQueue)
        throw new TooMany(5, 'Many people are signing in. Try again in a few seconds.');
      await new Promise<void>((resolve) => this.waiting.push(resolve));
    } else {
      this.running += 1;
    }
    try {
      return await work();
    } finally {
      const next = this.waiting.shift();
      if (next) next();
      else this.running -= 1;
    }
  }
}
