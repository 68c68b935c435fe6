import { useQueryClient } from '@tanstack/react-query';
import { createRevisionRequest, type PartResponse, type RevisionResponse } from '@trammel/shared/parts';
import { Button } from '../../../components/ui/button.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { useForm } from '../../../lib/use-form.ts';
import { createRevision } from '../api.ts';
import { nextCode } from '../revision-words.ts';

export interface NextRevisionDialogProps {
  part: PartResponse;
  onClose: () => void;
  onCreated: (revision: RevisionResponse) => void;
}

/** Starts the next drawing revision, as a rule as a copy of the newest. */
export function NextRevisionDialog({ part, onClose, onCreated }: NextRevisionDialogProps) {
  const client = useQueryClient();
  const [newest] = part.revisions;
  const form = useForm({
    initial: { code: nextCode(newest?.code ?? ''), from: newest?.id ?? '' },
    schema: {
      safeParse: ({ code, from }: { code: string; from: string }) =>
        createRevisionRequest.safeParse({ code, copyFromRevisionId: from === '' ? null : from }),
    },
    onSubmit: async (_values, body: Parameters<typeof createRevision>[1]) => {
      const revision = await createRevision(part.id, body);
      await client.invalidateQueries({ queryKey: ['part', part.id] });
      onCreated(revision);
    },
  });
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Next revision of ${part.number}`}
      footer={
        <>
          <Button weight="primary" busy={form.busy} busyLabel="Creating…" onClick={() => void form.submit()}>
            Create the revision
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      <form className="flex flex-col gap-4" onSubmit={(event) => void form.submit(event)} noValidate>
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        <TextField {...form.field('code')} label="Revision" mono className="w-40" autoComplete="off" />
        <SelectField
          {...form.field('from')}
          label="Characteristics"
          hint="A copied characteristic stays the same one: both revisions can be compared row by row."
          options={[
            ...part.revisions.map((revision) => ({
              value: revision.id,
              label: `Copy of revision ${revision.code} (${revision.characteristicCount})`,
            })),
            { value: '', label: 'Start with none' },
          ]}
        />
      </form>
    </Dialog>
  );
}
