import { PackageOverview } from '../../../features/submissions/components/package-overview.tsx';
import { RequestActs } from '../../../features/requests/components/request-acts.tsx';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  return (
    <PackageFrame>
      {(submission) => (
        <PackageOverview
          submission={submission}
          acts={<RequestActs requestId={submission.requestId} submissionId={submission.id} />}
        />
      )}
    </PackageFrame>
  );
}
