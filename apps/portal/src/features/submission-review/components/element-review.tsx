import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { FileResponse } from '@trammel/shared/documents';
import type { ElementResponse } from '@trammel/shared/submissions';
import { Button } from '../../../components/ui/button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { Day, Moment } from '../../../components/ui/time.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { decideElement, reviewElementsQuery } from '../api.ts';
import { MarkBadge } from './mark-badge.tsx';

interface ElementReviewProps {
  submissionId: string;
  mayReview: boolean;
  onOpenFile: (file: FileResponse) => void;
}

const stateWords: Record<ElementResponse['state'], string> = {
  open: 'nothing stated',
  submitted: 'submitted',
  'kept-at-supplier': 'kept at the supplier',
  'not-applicable': 'said not to apply',
};

/** Elements with their files, each marked by itself. */
export function ElementReview({ submissionId, mayReview, onOpenFile }: ElementReviewProps) {
  const { data } = useSuspenseQuery(reviewElementsQuery(submissionId));
  const client = useQueryClient();
  const refresh = () => void client.invalidateQueries({ queryKey: ['submission', submissionId] });
  return (
    <section aria-label="Elements">
      <h2 className="mb-2">Elements</h2>
      <ul className="border-t border-rule">
        {data.items
          .filter((element) => element.demand !== 'not-required')
          .map((element) => (
            <ElementRow
              key={`${element.id} ${element.markVersion}`}
              submissionId={submissionId}
              element={element}
              mayReview={mayReview}
              onOpenFile={onOpenFile}
              onMarked={refresh}
            />
          ))}
      </ul>
    </section>
  );
}

interface ElementRowProps extends ElementReviewProps {
  element: ElementResponse;
  onMarked: () => void;
}

function ElementRow({ submissionId, element, mayReview, onOpenFile, onMarked }: ElementRowProps) {
  const [open, setOpen] = useState(false);
  const [remark, setRemark] = useState(element.mark?.remark ?? '');
  const [internalRemark, setInternal] = useState(element.mark?.internalRemark ?? '');
  const [failure, setFailure] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const mark = async (wanted: 'accepted' | 'refused' | 'questioned' | null) => {
    if (wanted !== 'accepted' && wanted !== null && remark.trim() === '') {
      setOpen(true);
      setFailure(new Error('Say to the supplier what is wrong or what is asked.'));
      return;
    }
    setBusy(true);
    setFailure(null);
    try {
      await decideElement(submissionId, element.id, element.markVersion, {
        mark: wanted,
        remark: remark.trim(),
        internalRemark: internalRemark.trim(),
      });
      onMarked();
    } catch (error) {
      setFailure(error);
    } finally {
      setBusy(false);
    }
  };
  return (
    <li className="flex flex-col gap-2 border-b border-rule bg-sheet px-3 py-2">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
        <span className="min-w-0 flex-1 basis-56 font-medium">{element.label}</span>
        <span className="text-pencil">{stateWords[element.state]}</span>
        {element.statedRevision !== '' && (
          <span className="figures text-pencil">rev {element.statedRevision}</span>
        )}
        {element.dated && <Day on={element.dated} />}
        <MarkBadge mark={element.mark?.mark ?? null} />
        {mayReview && (
          <span className="flex flex-wrap gap-1">
            <Button size="small" weight="plain" busy={busy} onClick={() => void mark('accepted')}>
              Accept
            </Button>
            <Button size="small" weight="plain" onClick={() => void mark('refused')}>
              Refuse
            </Button>
            <Button size="small" weight="plain" onClick={() => void mark('questioned')}>
              Ask
            </Button>
            <Button size="small" weight="quiet" aria-expanded={open} onClick={() => setOpen(!open)}>
              Remarks
            </Button>
          </span>
        )}
      </div>
      {(element.reason || element.note) && (
        <p className="whitespace-pre-line">{[element.reason, element.note].filter(Boolean).join(' ')}</p>
      )}
      {element.files.length > 0 && (
        <ul className="flex flex-wrap gap-2">
          {element.files.map((file) => (
            <li key={file.id}>
              <Button size="small" weight="quiet" onClick={() => onOpenFile(file)}>
                {file.name}
              </Button>
            </li>
          ))}
        </ul>
      )}
      {element.mark?.remark && !open && (
        <p>
          To the supplier: {element.mark.remark}{' '}
          <span className="caption">
            {element.mark.by}, <Moment at={element.mark.at} />
          </span>
        </p>
      )}
      {failure !== null && (
        <Notice tone="failure" title="Not marked">
          {failure instanceof Error && failure.name === 'Error' ? failure.message : reasonOf(failure)}
        </Notice>
      )}
      {mayReview && open && (
        <div className="grid gap-3 md:grid-cols-2">
          <TextArea
            id={`element-remark-${element.id}`}
            label="Remark to the supplier"
            value={remark}
            onChange={setRemark}
            rows={2}
          />
          <TextArea
            id={`element-internal-${element.id}`}
            label="Internal remark"
            hint="Never shown to the supplier"
            value={internalRemark}
            onChange={setInternal}
            rows={2}
          />
        </div>
      )}
    </li>
  );
}
