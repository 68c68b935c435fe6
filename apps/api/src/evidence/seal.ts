import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { SealedPackage } from '../database/entities/sealed-package.entity.ts';
import { Signature } from '../database/entities/signature.entity.ts';
import type { Deed } from '../http/deed.ts';
import type { Signer } from './signing.ts';

export interface Sealing {
  readonly submissionId: string;
  readonly stage: 'warrant' | 'disposition';
  readonly meaning: string;
  readonly statement: string;
  readonly role: string;
  /** Canonical JSON of everything the signature covers, and its digest. */
  readonly canonical: string;
  readonly digest: string;
  readonly auditHead: string;
}

/** Keeps what was signed and who signed it, in one transaction; neither can be changed afterwards. */
export async function seal(
  manager: EntityManager,
  deed: Pick<Deed, 'actor' | 'now'>,
  signer: Signer,
  sealing: Sealing,
): Promise<Signature> {
  const { submissionId, stage, canonical, digest } = sealing;
  await manager.insert(SealedPackage, {
    id: randomUUID(),
    submissionId,
    stage,
    canonical,
    digest,
    sealedAt: deed.now,
  });
  const signature = manager.create(Signature, {
    id: randomUUID(),
    submissionId,
    stage,
    userId: deed.actor.userId,
    name: deed.actor.name,
    role: sealing.role,
    organisationName: deed.actor.organisationName,
    meaning: sealing.meaning,
    statement: sealing.statement,
    digest,
    keyId: signer.keyId,
    signatureValue: signer.sign(digest),
    auditHead: sealing.auditHead,
    signedAt: deed.now,
  });
  await manager.insert(Signature, signature);
  return signature;
}

/** The title a person signs under; the role where none is given. */
export function signingRole(actor: Deed['actor'], fallback: string): string {
  return actor.title === '' ? fallback : actor.title;
}
