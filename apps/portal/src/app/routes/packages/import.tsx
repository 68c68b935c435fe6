import { useParams } from 'react-router-dom';
import { ReadingImport } from '../../../features/table-imports/components/reading-import.tsx';
import { paths } from '../../../lib/paths.ts';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  const { submissionId = '' } = useParams();
  return (
    <PackageFrame>
      {() => (
        <div className="flex flex-col gap-3">
          <h2>Import readings</h2>
          <ReadingImport
            key={submissionId}
            submissionId={submissionId}
            backTo={paths.measurements(submissionId)}
          />
        </div>
      )}
    </PackageFrame>
  );
}
