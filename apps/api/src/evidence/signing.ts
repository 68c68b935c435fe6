import { createHash, createPrivateKey, createPublicKey, sign, verify, type KeyObject } from 'node:crypto';

/** The server's Ed25519 key. It shows later change; it does not prove that the person alone could sign. */
export interface Signer {
  readonly keyId: string;
  sign(digest: string): string;
  verify(digest: string, signature: string): boolean;
}

export function createSigner(privateKeyPem: string): Signer {
  const privateKey: KeyObject = createPrivateKey(privateKeyPem);
  const publicKey = createPublicKey(privateKey);
  const keyId = createHash('sha256')
    .update(publicKey.export({ type: 'spki', format: 'der' }))
    .digest('hex')
    .slice(0, 16);
  return {
    keyId,
    sign: (digest) => sign(null, Buffer.from(digest, 'hex'), privateKey).toString('base64'),
    verify: (digest, signature) =>
      verify(null, Buffer.from(digest, 'hex'), publicKey, Buffer.from(signature, 'base64')),
  };
}
