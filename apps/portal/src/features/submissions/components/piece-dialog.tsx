import { useQueryClient } from '@tanstack/react-query';
import type { PieceResponse } from '@trammel/shared/measurements';
import { changePieceRequest, type SubmissionResponse } from '@trammel/shared/submissions';
import { Button } from '../../../components/ui/button.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { useForm } from '../../../lib/use-form.ts';
import { changePiece, submissionKey } from '../api.ts';

interface PieceDialogProps {
  submission: SubmissionResponse;
  piece: PieceResponse;
  onClose: () => void;
}

export function PieceDialog({ submission, piece, onClose }: PieceDialogProps) {
  const client = useQueryClient();
  const form = useForm({
    initial: { label: piece.label, streamId: piece.streamId, madeOn: piece.madeOn, lot: piece.lot },
    schema: changePieceRequest,
    onSubmit: async (_values, body) => {
      await changePiece(piece, body);
      await client.invalidateQueries({ queryKey: submissionKey(submission.id) });
      onClose();
    },
  });
  const madeOn = form.field('madeOn');
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Piece ${piece.label}`}
      footer={
        <>
          <Button weight="primary" busy={form.busy} busyLabel="Saving…" onClick={() => void form.submit()}>
            Save
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      <form className="flex flex-col gap-3" onSubmit={(event) => void form.submit(event)}>
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        <TextField {...form.field('label')} label="Label or serial number" mono maxLength={60} />
        <DateField
          {...madeOn}
          label="Made on"
          optional
          value={madeOn.value ?? ''}
          onChange={(day) => madeOn.onChange(day === '' ? null : day)}
        />
        <TextField {...form.field('lot')} label="Lot or heat" optional mono maxLength={200} />
        <button type="submit" hidden aria-hidden="true" tabIndex={-1} />
      </form>
    </Dialog>
  );
}
