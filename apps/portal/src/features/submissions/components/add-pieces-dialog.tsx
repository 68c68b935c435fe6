import { useQueryClient } from '@tanstack/react-query';
import type { PieceResponse, StreamResponse } from '@trammel/shared/measurements';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { useState, type FormEvent } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { ApiProblem, reasonOf } from '../../../lib/api-problem.ts';
import { countOf } from '../../../lib/format.ts';
import { addPieces, submissionKey } from '../api.ts';
import { labelsFrom } from '../piece-labels.ts';

interface AddPiecesDialogProps {
  submission: SubmissionResponse;
  streams: readonly StreamResponse[];
  taken: readonly PieceResponse[];
  onClose: () => void;
}

export function AddPiecesDialog({ submission, streams, taken, onClose }: AddPiecesDialogProps) {
  const client = useQueryClient();
  const [streamId, setStreamId] = useState(streams[0]?.id ?? '');
  const [typed, setTyped] = useState('');
  const [madeOn, setMadeOn] = useState('');
  const [lot, setLot] = useState('');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const labels = labelsFrom(typed);
  const double = labels.find(
    (label, index) => labels.indexOf(label) < index || taken.some((one) => one.label === label),
  );
  const error = double === undefined ? undefined : `There is already a piece ${double} in this package.`;

  const submit = async (event?: FormEvent) => {
    event?.preventDefault();
    if (busy || labels.length === 0 || error !== undefined) return;
    setBusy(true);
    setFailure(null);
    try {
      await addPieces(
        submission.id,
        labels.map((label) => ({ label, streamId, madeOn: madeOn === '' ? null : madeOn, lot })),
      );
      await client.invalidateQueries({ queryKey: submissionKey(submission.id) });
      onClose();
    } catch (reason) {
      const first = reason instanceof ApiProblem ? reason.problem.errors?.[0]?.detail : undefined;
      setFailure(first ?? reasonOf(reason));
      setBusy(false);
    }
  };

  return (
    <Dialog
      open
      onClose={onClose}
      title="Add sample pieces"
      footer={
        <>
          <Button weight="primary" busy={busy} busyLabel="Adding…" onClick={() => void submit()}>
            {labels.length === 0 ? 'Add pieces' : `Add ${countOf(labels.length, 'piece', 'pieces')}`}
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      <form className="flex flex-col gap-3" onSubmit={(event) => void submit(event)}>
        {failure && (
          <Notice tone="failure" live>
            {failure}
          </Notice>
        )}
        <SelectField
          id="piece-stream"
          label="Stream"
          value={streamId}
          onChange={setStreamId}
          options={streams.map((stream) => ({ value: stream.id, label: stream.name }))}
        />
        <TextArea
          id="piece-labels"
          label="Labels or serial numbers"
          hint="One a line, or as a run: A7..A12."
          error={error}
          value={typed}
          onChange={setTyped}
        />
        <div className="grid gap-3 sm:grid-cols-2">
          <DateField id="piece-made" label="Made on" optional value={madeOn} onChange={setMadeOn} />
          <TextField
            id="piece-lot"
            label="Lot or heat"
            optional
            mono
            maxLength={200}
            value={lot}
            onChange={setLot}
          />
        </div>
      </form>
    </Dialog>
  );
}
