import { useQueryClient } from '@tanstack/react-query';
import { acceptedFiles, maximumFileBytes } from '@trammel/shared/documents';
import type { ElementResponse, SubmissionResponse } from '@trammel/shared/submissions';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { Copyable } from '../../../components/ui/copyable.tsx';
import { FileDrop } from '../../../components/ui/file-drop.tsx';
import { DownloadLink } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { Progress } from '../../../components/ui/progress.tsx';
import { Day, Moment } from '../../../components/ui/time.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { cn } from '../../../lib/cn.ts';
import { countOf, showBytes } from '../../../lib/format.ts';
import { detachFile, fileAddress, reattachFile, submissionKey } from '../api.ts';
import { useElementUploads } from '../use-element-uploads.ts';
import { demandWords } from '../words.ts';
import { ElementForm } from './element-form.tsx';
import { ElementStateMark } from './element-state-mark.tsx';

interface ElementCardProps {
  element: ElementResponse;
  submission: SubmissionResponse;
  editable: boolean;
}

export function ElementCard({ element, submission, editable }: ElementCardProps) {
  const [open, setOpen] = useState(false);
  const panel = `element-${element.id}`;
  const owed = element.demand !== 'not-required' && element.state === 'open';
  return (
    <article
      aria-label={element.label}
      className={cn(
        'border-rule not-first:border-t',
        owed && editable && 'shadow-[inset_3px_0_0_var(--brass)]',
      )}
    >
      <div className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 gap-y-0.5 px-3 py-1 md:grid-cols-[minmax(0,1fr)_128px_152px_64px_72px]">
        <h3 className="min-w-0 font-medium break-words max-md:col-span-2">{element.label}</h3>
        <span className="caption">{demandWords[element.demand]}</span>
        <ElementStateMark state={element.state} />
        <span className="text-pencil">{countOf(element.files.length, 'file', 'files')}</span>
        <Button
          weight="quiet"
          size="small"
          className="no-print justify-self-end"
          aria-expanded={open}
          aria-controls={panel}
          aria-label={`${open ? 'Close' : 'Open'} ${element.label}`}
          onClick={() => setOpen(!open)}
        >
          {open ? 'Close' : editable && !element.derived ? 'Fill in' : 'Details'}
        </Button>
      </div>
      <div id={panel} className={cn('border-t border-rule px-3 py-3', !open && 'hidden')}>
        {open && <ElementPanel element={element} submission={submission} editable={editable} />}
      </div>
    </article>
  );
}

function ElementPanel({ element, submission, editable }: ElementCardProps) {
  const { uploads, failures, start } = useElementUploads(element.id, submission.id);
  return (
    <div className="flex flex-col gap-3">
      {element.derived && (
        <p className="text-pencil">
          Filled from the rest of the package: it counts as submitted, and nothing needs to be attached.
        </p>
      )}
      <FileList element={element} submission={submission} editable={editable} />
      {editable && (
        <FileDrop
          id={`drop-${element.id}`}
          label={`Files for ${element.label}`}
          accept={acceptedFiles.evidence}
          maxBytes={maximumFileBytes}
          multiple
          onFiles={(files) => void start(files)}
        />
      )}
      {uploads.map((upload) => (
        <Progress
          key={upload.key}
          label={`Sending ${upload.name}`}
          done={upload.sent}
          total={upload.total}
          unit="bytes"
          onCancel={upload.cancel}
        />
      ))}
      {failures.map((failure) => (
        <Notice key={failure.key} tone="failure" live title={`${failure.name} was not attached`}>
          {failure.reason}
        </Notice>
      ))}
      {editable ? (
        <ElementForm key={element.id} element={element} submission={submission} />
      ) : (
        <ElementFacts element={element} />
      )}
      {element.mark && (
        <Notice
          tone={element.mark.mark === 'accepted' ? 'success' : 'attention'}
          title={`Reviewer: ${element.mark.mark}`}
        >
          {element.mark.remark}
          <span className="caption block">
            {element.mark.by}, <Moment at={element.mark.at} />
          </span>
        </Notice>
      )}
    </div>
  );
}

function FileList({ element, submission, editable }: ElementCardProps) {
  const client = useQueryClient();
  const [failure, setFailure] = useState<string | null>(null);
  if (element.files.length === 0) return null;
  const refresh = () => client.invalidateQueries({ queryKey: submissionKey(submission.id) });
  const remove = async (fileId: string, name: string) => {
    setFailure(null);
    try {
      await detachFile(element.id, fileId);
      await refresh();
      showToast({
        text: `${name} removed from ${element.label}`,
        undo: () => void reattachFile(element.id, fileId).then(refresh),
      });
    } catch (error) {
      setFailure(reasonOf(error));
    }
  };
  return (
    <>
      <ul aria-label={`Files of ${element.label}`} className="border border-rule">
        {element.files.map((file) => (
          <li
            key={file.id}
            className="flex flex-wrap items-center gap-x-4 gap-y-1 border-rule px-3 py-1 not-first:border-t"
          >
            <span className="min-w-0 flex-1 basis-48 break-all">{file.name}</span>
            <span className="figures text-pencil">{showBytes(file.size)}</span>
            <span className="caption">
              {file.uploadedBy}, <Moment at={file.uploadedAt} />
            </span>
            <Copyable value={file.sha256} what={`SHA-256 of ${file.name}`} shorten={10} />
            <DownloadLink size="small" href={fileAddress(file.id)}>
              Download
            </DownloadLink>
            {editable && (
              <Button
                size="small"
                aria-label={`Remove ${file.name}`}
                onClick={() => void remove(file.id, file.name)}
              >
                Remove
              </Button>
            )}
          </li>
        ))}
      </ul>
      {failure && (
        <Notice tone="failure" live>
          {failure}
        </Notice>
      )}
    </>
  );
}

function ElementFacts({ element }: { element: ElementResponse }) {
  const facts: [string, string][] = [
    ['Reason', element.reason],
    ['Stated part', element.statedPart],
    ['Stated revision', element.statedRevision],
    ['Note', element.note],
  ];
  const shown = facts.filter(([, value]) => value !== '');
  if (shown.length === 0 && element.dated === null) {
    return element.files.length === 0 && !element.derived ? (
      <p className="text-pencil">Nothing was stated.</p>
    ) : null;
  }
  return (
    <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-4 gap-y-0.5">
      {shown.map(([name, value]) => (
        <div key={name} className="contents">
          <dt className="text-pencil">{name}</dt>
          <dd className="break-words whitespace-pre-line">{value}</dd>
        </div>
      ))}
      {element.dated !== null && (
        <div className="contents">
          <dt className="text-pencil">Dated</dt>
          <dd>
            <Day on={element.dated} />
          </dd>
        </div>
      )}
    </dl>
  );
}
