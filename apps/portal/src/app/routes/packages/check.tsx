import type { Finding } from '@trammel/shared/checks';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { CheckPage } from '../../../features/checks/components/check-page.tsx';
import { paths } from '../../../lib/paths.ts';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  return (
    <PackageFrame>
      {(submission) => (
        <CheckPage
          submissionId={submission.id}
          mayRun={submission.abilities.measure}
          hrefOf={(finding) => hrefOf(submission, finding)}
        />
      )}
    </PackageFrame>
  );
}

function hrefOf(submission: SubmissionResponse, { place }: Finding): string | null {
  if (place.kind === 'element' || place.kind === 'stream' || place.kind === 'piece')
    return paths.evidence(submission.id);
  if (place.kind === 'warrant') return paths.warrant(submission.id);
  if (place.balloon !== null)
    return `${paths.measurements(submission.id)}?q=${encodeURIComponent(place.balloon)}`;
  return null;
}
