import { SignaturePair } from '../../../components/package/signature-pair.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { DownloadLink } from '../../../components/ui/link-button.tsx';
import { DispositionForm } from '../../../features/dispositions/components/disposition-form.tsx';
import { DispositionView } from '../../../features/dispositions/components/disposition-view.tsx';
import { apiUrl } from '../../../lib/api-client.ts';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  return (
    <PackageFrame>
      {(submission) => (
        <div className="flex flex-col gap-5">
          {submission.decidedAt !== null ? (
            <DispositionView submissionId={submission.id} side={submission.side} />
          ) : submission.abilities.dispose ? (
            <DispositionForm
              submissionId={submission.id}
              name={`${submission.part.number} rev ${submission.revision.code}`}
            />
          ) : (
            <EmptyState title="Not decided yet">
              {submission.side === 'supplier'
                ? `${submission.customer.name} reviews the package; the decision appears here and comes by mail.`
                : 'A reviewer with the authority to sign decides once the rows are marked.'}
            </EmptyState>
          )}
          <SignaturePair
            warrant={{
              signature: submission.warrantSignature,
              unsigned: 'Signed by the supplier with the submission.',
            }}
            disposition={{
              signature: submission.dispositionSignature,
              unsigned: 'Signed by a person with the authority to sign for the customer.',
            }}
          />
          <p className="no-print">
            <DownloadLink href={apiUrl(`/api/submissions/${submission.id}/dimensional-results.pdf`)}>
              Dimensional results as PDF
            </DownloadLink>
          </p>
        </div>
      )}
    </PackageFrame>
  );
}
