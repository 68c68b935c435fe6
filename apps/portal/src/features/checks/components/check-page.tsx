import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Finding } from '@trammel/shared/checks';
import { Button } from '../../../components/ui/button.tsx';
import { Copyable } from '../../../components/ui/copyable.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { VerdictMark } from '../../../components/ui/verdict-mark.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { checkQuery, runOfficialCheck } from '../api.ts';
import { FindingList } from './finding-list.tsx';

interface CheckPageProps {
  submissionId: string;
  /** The supplier may run the official check while the package is open. */
  mayRun: boolean;
  hrefOf: (finding: Finding) => string | null;
}

/** The check of a package: verdict, what stands in the way, and by what it was judged. */
export function CheckPage({ submissionId, mayRun, hrefOf }: CheckPageProps) {
  const { data: check } = useSuspenseQuery(checkQuery(submissionId));
  const client = useQueryClient();
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<unknown>(null);
  const run = async () => {
    setBusy(true);
    setFailure(null);
    try {
      const stored = await runOfficialCheck(submissionId);
      await client.invalidateQueries({ queryKey: ['submission', submissionId] });
      showToast({ text: `Official check stored: ${stored.counts.stops} stop submission` });
    } catch (error) {
      setFailure(error);
    } finally {
      setBusy(false);
    }
  };
  return (
    <div className="flex flex-col gap-5">
      <div className="flex flex-wrap items-center gap-x-6 gap-y-2 border border-rule bg-sheet px-3 py-2">
        <VerdictMark verdict={check.verdict} />
        <span>
          {check.kind === 'live' ? 'As the package stands now' : 'Official check'},{' '}
          <Moment at={check.checkedAt} />
        </span>
        <span className="text-pencil">{check.method}</span>
        <span className="flex items-center gap-2 text-pencil">
          inputs <Copyable value={check.inputsDigest} what="digest of the inputs" shorten={12} />
        </span>
        {mayRun && (
          <Button weight="plain" size="small" busy={busy} onClick={() => void run()}>
            Store an official check
          </Button>
        )}
      </div>
      {failure !== null && (
        <Notice tone="failure" title="The check did not run">
          {reasonOf(failure)}
        </Notice>
      )}
      <FindingList findings={check.findings} hrefOf={hrefOf} truncated={check.truncated} />
    </div>
  );
}
