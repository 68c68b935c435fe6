import { randomBytes, randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { DAY, HOUR, later } from '../clock.ts';
import { sha256Hex } from '../database/canonical-json.ts';
import { AccountToken } from '../database/entities/account-token.entity.ts';

export type TokenKind = AccountToken['kind'];

const lifetime: Record<TokenKind, number> = { invitation: 7 * DAY, 'password-reset': HOUR };

/** Makes a secret that goes out by mail and sets a password once. Only its hash is stored; earlier ones die with it. */
export async function issueAccountToken(
  manager: EntityManager,
  userId: string,
  kind: TokenKind,
  now: string,
): Promise<string> {
  const secret = randomBytes(32).toString('base64url');
  await manager.delete(AccountToken, { userId });
  await manager.insert(AccountToken, {
    id: randomUUID(),
    userId,
    kind,
    tokenHash: hashOfToken(secret),
    createdAt: now,
    expiresAt: later(now, lifetime[kind]),
  });
  return secret;
}

export function hashOfToken(secret: string): string {
  return sha256Hex(secret);
}
