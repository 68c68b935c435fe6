import type { SignatureResponse } from '@trammel/shared/submissions';
import type { Signature } from '../database/entities/signature.entity.ts';

export function presentSignature(signature: Signature): SignatureResponse {
  const { name, role, organisationName, meaning, signedAt, digest, keyId } = signature;
  return { name, role, organisation: organisationName, meaning, signedAt, digest, keyId };
}
