import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { SignatureResponse } from '@trammel/shared/submissions';
import type { WarrantResponse } from '@trammel/shared/warrants';
import { SignaturePair } from '../../../components/package/signature-pair.tsx';
import { Button } from '../../../components/ui/button.tsx';
import { Copyable } from '../../../components/ui/copyable.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { DownloadLink } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { apiUrl, newIdempotencyKey } from '../../../lib/api-client.ts';
import { ApiProblem, reasonOf } from '../../../lib/api-problem.ts';
import { countOf } from '../../../lib/format.ts';
import { signWarrant, warrantQuery } from '../api.ts';
import { WarrantFactsForm } from './warrant-facts-form.tsx';

interface WarrantPageProps {
  submissionId: string;
  /** What is signed for, in words: `TD-31880 rev B, round 1`. */
  name: string;
  disposition: SignatureResponse | null;
}

/** What the signatory reads, and signs: facts, declaration, what is covered and what is not. */
export function WarrantPage({ submissionId, name, disposition }: WarrantPageProps) {
  const { data: warrant } = useSuspenseQuery(warrantQuery(submissionId));
  const [signing, setSigning] = useState(false);
  return (
    <div className="flex flex-col gap-5">
      {warrant.caution && (
        <Notice tone="attention" title="Safety or regulatory characteristics">
          {warrant.caution}
        </Notice>
      )}
      {warrant.abilities.edit ? (
        <WarrantFactsForm key={warrant.version} warrant={warrant} />
      ) : (
        <Facts warrant={warrant} />
      )}
      <Coverage warrant={warrant} />
      <section aria-label="Declaration" className="border-l-4 border-marking bg-sheet px-4 py-3">
        <p className="caption">Declaration of the signatory</p>
        <p className="max-w-prose">{warrant.declaration}</p>
      </section>
      {warrant.signature === null && warrant.blockers.length > 0 && (
        <Notice tone="attention" title="Cannot be signed yet">
          <ul className="list-disc pl-5">
            {warrant.blockers.map((blocker) => (
              <li key={blocker}>{blocker}</li>
            ))}
          </ul>
        </Notice>
      )}
      <SignaturePair
        warrant={{
          signature: warrant.signature,
          unsigned:
            'Signed by a person with the authority to sign for the supplier; signing submits the package.',
        }}
        disposition={{ signature: disposition, unsigned: 'Signed by the customer after the review.' }}
      />
      <div className="no-print flex flex-wrap gap-2">
        {warrant.abilities.sign && (
          <Button weight="primary" disabled={warrant.blockers.length > 0} onClick={() => setSigning(true)}>
            Sign and submit
          </Button>
        )}
        <DownloadLink href={apiUrl(`/api/submissions/${submissionId}/warrant.pdf`)}>
          Warrant as PDF
        </DownloadLink>
      </div>
      {signing && <SignDialog name={name} warrant={warrant} onClose={() => setSigning(false)} />}
    </div>
  );
}

function Coverage({ warrant }: { warrant: WarrantResponse }) {
  const { counts } = warrant;
  const cells: [string, string][] = [
    ['Characteristics', String(counts.characteristics)],
    ['Rows in tolerance', String(counts.inTolerance)],
    ['Rows out of tolerance', String(counts.out)],
    ['Rows undecided', String(counts.undecided)],
    ['Deviations asked for', String(counts.deviations)],
    ['Elements', String(counts.elements)],
    ['Files', String(counts.files)],
    ['Covers', warrant.streamsCovered.join(', ') || 'nothing'],
  ];
  return (
    <section aria-label="What the warrant covers" className="border border-rule bg-sheet">
      <dl className="grid grid-cols-2 sm:grid-cols-4">
        {cells.map(([caption, value]) => (
          <div key={caption} className="border-r border-b border-rule px-3 py-1.5">
            <dt className="caption">{caption}</dt>
            <dd className="figures break-words">{value}</dd>
          </div>
        ))}
      </dl>
      {warrant.streamsBlocked.map((stream) => (
        <p key={stream.name} className="border-b border-rule px-3 py-1.5">
          <span className="text-vermilion">Not covered:</span> {stream.name}. {stream.reason}
        </p>
      ))}
      <p className="flex flex-wrap items-center gap-2 px-3 py-1.5 text-pencil">
        Digest of the package <Copyable value={warrant.digest} what="digest of the package" shorten={24} />
      </p>
    </section>
  );
}

function Facts({ warrant }: { warrant: WarrantResponse }) {
  const { facts } = warrant;
  const cells: [string, string | null][] = [
    ['Run on', facts.runOn],
    ['Length of the run', facts.runHours && `${facts.runHours} h`],
    ['Pieces made', facts.runQuantity?.toString() ?? null],
    ['Mass of one part', facts.partMassKg && `${facts.partMassKg} kg`],
    ['Production tool', facts.productionTool],
    ['Material report', facts.materialReport],
    ['Exceptions', facts.exceptions],
    ['Comment', facts.comment],
  ];
  return (
    <dl className="grid border-t border-l border-rule bg-sheet sm:grid-cols-4">
      {cells.map(([caption, value]) => (
        <div key={caption} className="border-r border-b border-rule px-3 py-1.5">
          <dt className="caption">{caption}</dt>
          <dd className="break-words whitespace-pre-line">{value || 'not stated'}</dd>
        </div>
      ))}
    </dl>
  );
}

function SignDialog({
  name,
  warrant,
  onClose,
}: {
  name: string;
  warrant: WarrantResponse;
  onClose: () => void;
}) {
  const client = useQueryClient();
  const [key] = useState(() => newIdempotencyKey());
  const [password, setPassword] = useState('');
  const [failure, setFailure] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const sign = async () => {
    setBusy(true);
    setFailure(null);
    try {
      await signWarrant(warrant.submissionId, { password, digest: warrant.digest }, key);
      await client.invalidateQueries({ queryKey: ['submission', warrant.submissionId] });
      showToast({ text: `${name} signed and submitted` });
      onClose();
    } catch (error) {
      setFailure(error);
      if (error instanceof ApiProblem && error.is('stale-version'))
        await client.invalidateQueries({ queryKey: warrantQuery(warrant.submissionId).queryKey });
    } finally {
      setBusy(false);
    }
  };
  const wrongPassword =
    failure instanceof ApiProblem
      ? failure.problem.errors?.find((error) => error.pointer === '/password')?.detail
      : undefined;
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Sign the warrant of ${name}`}
      footer={
        <>
          <Button weight="primary" busy={busy} disabled={password === ''} onClick={() => void sign()}>
            Sign and submit
          </Button>
          <Button weight="plain" onClick={onClose}>
            Not now
          </Button>
        </>
      }
    >
      <form
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          if (password !== '') void sign();
        }}
      >
        {failure !== null && wrongPassword === undefined && (
          <Notice tone="failure" title="Not signed">
            {reasonOf(failure)}
          </Notice>
        )}
        <p>
          The package is frozen by the signature and goes to the customer with{' '}
          {countOf(warrant.counts.characteristics, 'characteristic', 'characteristics')},{' '}
          {countOf(warrant.counts.files, 'file', 'files')} and{' '}
          {countOf(warrant.counts.deviations, 'deviation request', 'deviation requests')}. It cannot be
          changed afterwards; a correction is a new round.
        </p>
        <TextField
          id="sign-password"
          label="Your password"
          type="password"
          autoComplete="current-password"
          value={password}
          onChange={setPassword}
          error={wrongPassword}
        />
      </form>
    </Dialog>
  );
}
