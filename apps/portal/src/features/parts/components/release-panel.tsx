import { useQueryClient } from '@tanstack/react-query';
import type { RevisionResponse } from '@trammel/shared/parts';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { countOf } from '../../../lib/format.ts';
import { releaseRevision, revisionQuery } from '../api.ts';

const shownAtOnce = 8;

/** What stands between a draft and its release, or the release itself. */
export function ReleasePanel({ revision }: { revision: RevisionResponse }) {
  const client = useQueryClient();
  const [asking, setAsking] = useState(false);
  const [key, setKey] = useState(newIdempotencyKey);
  const [all, setAll] = useState(false);
  const blockers = revision.releaseBlockers;
  if (!revision.abilities.edit) return null;
  if (blockers.length > 0) {
    const shown = all ? blockers : blockers.slice(0, shownAtOnce);
    return (
      <Notice
        tone="attention"
        title={`${countOf(blockers.length, 'thing stands', 'things stand')} between revision ${revision.code} and its release`}
        actions={
          blockers.length > shownAtOnce && (
            <Button size="small" onClick={() => setAll(!all)}>
              {all ? 'Show fewer' : `Show all ${blockers.length}`}
            </Button>
          )
        }
      >
        <ul className="list-disc pl-5">
          {shown.map((blocker) => (
            <li key={blocker}>{blocker}</li>
          ))}
        </ul>
      </Notice>
    );
  }
  return (
    <Notice
      tone="success"
      title={`Revision ${revision.code} can be released`}
      actions={
        <Button
          weight="primary"
          onClick={() => {
            setKey(newIdempotencyKey());
            setAsking(true);
          }}
        >
          Release revision {revision.code}
        </Button>
      }
    >
      It has its drawing and {countOf(revision.characteristicCount, 'characteristic', 'characteristics')},
      each with its limits.
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title={`Release revision ${revision.code} of ${revision.partNumber}?`}
        consequence="From then on drawing and characteristics never change, the revision released before is superseded, and open packages of the older one are flagged. Its balloon numbers are given for good."
        confirmLabel="Release the revision"
        onConfirm={async () => {
          const released = await releaseRevision(revision.id, revision.version, key);
          client.setQueryData(revisionQuery(revision.id).queryKey, released);
          await client.invalidateQueries({ queryKey: ['part', revision.partId] });
          await client.invalidateQueries({ queryKey: ['parts'] });
          showToast({ text: `Revision ${released.code} is released.` });
        }}
      />
    </Notice>
  );
}
