import type { ReactNode } from 'react';
import type { SignatureResponse } from '@trammel/shared/submissions';
import { Copyable } from '../ui/copyable.tsx';
import { MomentWithZone } from '../ui/time.tsx';

export interface SignatureFieldProps {
  /** `Warrant of the supplier`, `Disposition of the customer`. */
  title: string;
  signature: SignatureResponse | null;
  /** While unsigned: who signs and what must happen before. */
  unsigned: ReactNode;
}

export interface SignaturePairProps {
  warrant: Omit<SignatureFieldProps, 'title'>;
  disposition: Omit<SignatureFieldProps, 'title'>;
}

/** The two signatures of a package, side by side on screen, in print and in the PDF. */
export function SignaturePair({ warrant, disposition }: SignaturePairProps) {
  return (
    <section aria-label="Signatures" className="keep-whole grid gap-4 md:grid-cols-2 print:grid-cols-2">
      <SignatureField title="Warrant of the supplier" {...warrant} />
      <SignatureField title="Disposition of the customer" {...disposition} />
    </section>
  );
}

export function SignatureField({ title, signature, unsigned }: SignatureFieldProps) {
  return (
    <div className="flex min-w-0 flex-col border-4 border-double border-graphite bg-sheet p-3">
      <p className="caption">{title}</p>
      {signature === null ? (
        <div className="flex min-h-28 flex-1 flex-col justify-end">
          <div className="mb-1 text-pencil">{unsigned}</div>
          <div className="border-t border-graphite" />
          <p className="caption">not signed</p>
        </div>
      ) : (
        <>
          <p className="mt-4 border-b border-graphite pb-0.5 text-[1.1875rem] leading-6 font-semibold break-words italic">
            {signature.name}
          </p>
          <p className="mt-1">
            {signature.role}, {signature.organisation}
          </p>
          <p>
            <MomentWithZone at={signature.signedAt} />
          </p>
          <p className="mt-2">{signature.meaning}</p>
          <dl className="mt-2 grid grid-cols-[auto_minmax(0,1fr)] items-center gap-x-3 border-t border-rule pt-1 text-[0.8125rem]">
            <dt className="text-pencil">Digest</dt>
            <dd>
              <Copyable value={signature.digest} what="digest of what was signed" shorten={24} />
            </dd>
            <dt className="text-pencil">Key</dt>
            <dd className="figures break-all">{signature.keyId}</dd>
          </dl>
        </>
      )}
    </div>
  );
}
