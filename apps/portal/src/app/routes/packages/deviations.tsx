import { useSuspenseQuery } from '@tanstack/react-query';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { DeviationsPage } from '../../../features/deviations/components/deviations-page.tsx';
import { piecesQuery } from '../../../features/submissions/api.ts';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  return <PackageFrame>{(submission) => <Deviations submission={submission} />}</PackageFrame>;
}

function Deviations({ submission }: { submission: SubmissionResponse }) {
  const { data } = useSuspenseQuery(piecesQuery(submission.id));
  const streamNames = new Map(data.streams.map((stream) => [stream.id, stream.name]));
  return (
    <DeviationsPage
      submissionId={submission.id}
      streamNames={streamNames}
      mayAsk={submission.abilities.askDeviation}
    />
  );
}
