import type { auditVerification } from '@trammel/shared/audit';
import type { z } from 'zod';
import { LoadFailure } from '../../../components/ui/loading.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { countOf } from '../../../lib/format.ts';

export interface VerificationResultProps {
  result: z.infer<typeof auditVerification> | null;
  error: Error | null;
  onRetry: () => void;
}

export function VerificationResult({ result, error, onRetry }: VerificationResultProps) {
  if (error) return <LoadFailure what="The verification" error={error} onRetry={onRetry} />;
  if (result === null) return null;
  if (result.sound) {
    return (
      <Notice tone="success" live title="The chain is sound">
        {countOf(result.rows, 'entry', 'entries')} verified from the first to the last.
      </Notice>
    );
  }
  return (
    <Notice tone="failure" live title={`The chain is broken at entry ${result.firstBroken ?? 'unknown'}`}>
      {result.reason ?? 'The reason is not known.'} Entries before it are sound. Stop working on this data and
      compare it with the last backup.
    </Notice>
  );
}
