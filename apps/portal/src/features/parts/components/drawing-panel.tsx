import { useQueryClient } from '@tanstack/react-query';
import { acceptedFiles, maximumFileBytes } from '@trammel/shared/documents';
import type { RevisionResponse } from '@trammel/shared/parts';
import { useRef, useState } from 'react';
import { Copyable } from '../../../components/ui/copyable.tsx';
import { FileDrop } from '../../../components/ui/file-drop.tsx';
import { DownloadLink } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { Progress } from '../../../components/ui/progress.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { showBytes } from '../../../lib/format.ts';
import { changeRevision, revisionQuery, sendDrawing } from '../api.ts';
import { factsOf } from '../revision-facts.ts';

/** The drawing of a revision: sent with progress, shown, and replaced while the revision is a draft. */
export function DrawingPanel({ revision }: { revision: RevisionResponse }) {
  const client = useQueryClient();
  const [sending, setSending] = useState<{ name: string; sent: number; total: number } | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const cancel = useRef<AbortController | null>(null);
  const { drawing } = revision;

  const send = async (file: File) => {
    const controller = new AbortController();
    cancel.current = controller;
    setFailure(null);
    setSending({ name: file.name, sent: 0, total: file.size });
    try {
      const stored = await sendDrawing(
        file,
        (sent, total) => setSending({ name: file.name, sent, total }),
        controller.signal,
      );
      // The table beside it may have been saved meanwhile, which raises the version.
      const now = await client.fetchQuery({ ...revisionQuery(revision.id), staleTime: 0 });
      const saved = await changeRevision(now.id, now.version, { ...factsOf(now), drawingFileId: stored.id });
      client.setQueryData(revisionQuery(revision.id).queryKey, saved);
    } catch (error) {
      if (!controller.signal.aborted) setFailure(reasonOf(error));
    } finally {
      setSending(null);
    }
  };

  return (
    <section className="flex flex-col gap-2">
      <h2>Drawing</h2>
      {drawing ? (
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2 border border-rule bg-sheet px-3 py-2">
          <span className="min-w-0 flex-1 basis-52 font-medium break-words">{drawing.name}</span>
          <span className="figures text-pencil">{showBytes(drawing.size)}</span>
          <span className="text-pencil">
            {drawing.uploadedBy}, <Moment at={drawing.uploadedAt} />
          </span>
          <Copyable value={drawing.sha256} what="SHA-256 of the drawing" shorten={12} />
          <DownloadLink href={`/api/files/${drawing.id}/content`} size="small">
            Download
          </DownloadLink>
        </div>
      ) : (
        !revision.abilities.edit && <p className="text-pencil">This revision has no drawing.</p>
      )}
      {drawing && drawing.mediaType !== 'application/pdf' && (
        <img
          src={`/api/files/${drawing.id}/content`}
          alt={`Drawing of revision ${revision.code}`}
          className="max-h-[70vh] max-w-full self-start border border-rule bg-sheet"
        />
      )}
      {failure && (
        <Notice tone="failure" live title="The drawing was not attached">
          {failure}
        </Notice>
      )}
      {sending && (
        <Progress
          label={sending.sent < sending.total ? `Sending ${sending.name}` : `Checking ${sending.name}`}
          done={sending.sent}
          total={sending.total}
          unit="bytes"
          onCancel={() => cancel.current?.abort()}
        />
      )}
      {revision.abilities.edit && !sending && (
        <FileDrop
          id="drawing-file"
          label={drawing ? 'Replace the drawing' : `Drawing of revision ${revision.code}`}
          accept={acceptedFiles.drawing}
          maxBytes={maximumFileBytes}
          onFiles={([file]) => file && void send(file)}
        />
      )}
    </section>
  );
}
