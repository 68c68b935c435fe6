import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useCallback } from 'react';
import { sheetQuery } from '../../../features/measurements/api.ts';
import { MeasurementSheet } from '../../../features/measurements/components/measurement-sheet.tsx';
import { paths } from '../../../lib/paths.ts';
import { PackageFrame } from './package-frame.tsx';

export function Component() {
  return <PackageFrame>{(submission) => <Sheet submissionId={submission.id} />}</PackageFrame>;
}

function Sheet({ submissionId }: { submissionId: string }) {
  const client = useQueryClient();
  const { data } = useSuspenseQuery(sheetQuery(submissionId));
  const onSaved = useCallback(() => {
    void client.invalidateQueries({ queryKey: ['submission', submissionId, 'head'] });
    void client.invalidateQueries({ queryKey: ['submission', submissionId, 'check'] });
  }, [client, submissionId]);
  return (
    <MeasurementSheet
      key={submissionId}
      submissionId={submissionId}
      sheet={data}
      importHref={paths.readingImport(submissionId)}
      onSaved={onSaved}
    />
  );
}
