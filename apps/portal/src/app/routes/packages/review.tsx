import { lazy, Suspense, useState } from 'react';
import type { FileResponse } from '@trammel/shared/documents';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { LinkButton } from '../../../components/ui/link-button.tsx';
import { Loading } from '../../../components/ui/loading.tsx';
import { ElementReview } from '../../../features/submission-review/components/element-review.tsx';
import { ReviewWorkspace } from '../../../features/submission-review/components/review-workspace.tsx';
import { paths } from '../../../lib/paths.ts';
import { PackageFrame } from './package-frame.tsx';

const FileViewer = lazy(() =>
  import('../../../features/documents/components/file-viewer.tsx').then((module) => ({
    default: module.FileViewer,
  })),
);

export function Component() {
  return <PackageFrame>{(submission) => <Review submission={submission} />}</PackageFrame>;
}

function Review({ submission }: { submission: SubmissionResponse }) {
  const [file, setFile] = useState<FileResponse | null>(null);
  const { drawing } = submission.revision;
  return (
    <div className="flex flex-col gap-6">
      <ReviewWorkspace
        submissionId={submission.id}
        mayReview={submission.abilities.review}
        deviationsHref={paths.deviations(submission.id)}
        drawing={drawing && (() => <Viewer file={drawing} />)}
      />
      <ElementReview
        submissionId={submission.id}
        mayReview={submission.abilities.review}
        onOpenFile={setFile}
      />
      {submission.side === 'customer' && (
        <p className="no-print">
          <LinkButton to={paths.disposition(submission.id)}>Go to the disposition</LinkButton>
        </p>
      )}
      <Dialog open={file !== null} onClose={() => setFile(null)} title={file?.name ?? ''} width="wide">
        {file && <Viewer file={file} />}
      </Dialog>
    </div>
  );
}

function Viewer({ file }: { file: FileResponse }) {
  return (
    <Suspense fallback={<Loading label="Opening the viewer" />}>
      <FileViewer key={file.id} file={file} />
    </Suspense>
  );
}
