import { WarrantPage } from '../../../features/warrants/components/warrant-page.tsx';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  return (
    <PackageFrame>
      {(submission) => (
        <WarrantPage
          submissionId={submission.id}
          name={`${submission.part.number} rev ${submission.revision.code}, round ${submission.round}`}
          disposition={submission.dispositionSignature}
        />
      )}
    </PackageFrame>
  );
}
