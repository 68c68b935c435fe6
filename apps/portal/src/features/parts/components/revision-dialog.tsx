import { useQueryClient } from '@tanstack/react-query';
import { changeRevisionRequest, type RevisionResponse } from '@trammel/shared/parts';
import { Button } from '../../../components/ui/button.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { useForm } from '../../../lib/use-form.ts';
import { changeRevision, revisionQuery } from '../api.ts';
import { factsOf } from '../revision-facts.ts';

type Values = Omit<ReturnType<typeof factsOf>, 'drawingDate'> & { drawingDate: string };

/** What stands in the title block of the drawing. */
export function RevisionDialog({ revision, onClose }: { revision: RevisionResponse; onClose: () => void }) {
  const client = useQueryClient();
  const toBody = (values: Values) => ({
    ...values,
    drawingDate: values.drawingDate === '' ? null : values.drawingDate,
  });
  const form = useForm<Values, unknown>({
    initial: { ...factsOf(revision), drawingDate: revision.drawingDate ?? '' },
    schema: { safeParse: (values: Values) => changeRevisionRequest.safeParse(toBody(values)) },
    onSubmit: async (values) => {
      const saved = await changeRevision(revision.id, revision.version, toBody(values));
      client.setQueryData(revisionQuery(revision.id).queryKey, saved);
      await client.invalidateQueries({ queryKey: ['part', revision.partId] });
      onClose();
    },
  });
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Drawing details of revision ${revision.code}`}
      footer={
        <>
          <Button weight="primary" busy={form.busy} busyLabel="Saving…" onClick={() => void form.submit()}>
            Save the details
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      <form className="flex flex-col gap-4" onSubmit={(event) => void form.submit(event)} noValidate>
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        <div className="grid gap-4 sm:grid-cols-2">
          <TextField {...form.field('code')} label="Revision" mono autoComplete="off" />
          <DateField {...form.field('drawingDate')} label="Date of the drawing" optional />
          <TextField {...form.field('changeOrder')} label="Change order" mono optional />
          <TextField
            {...form.field('generalTolerance')}
            label="General tolerance note"
            hint="As on the drawing, such as ISO 2768-mK"
            optional
          />
          <SelectField
            {...form.field('tolerancingStandard')}
            label="Tolerancing standard"
            options={[
              { value: 'iso', label: 'ISO' },
              { value: 'asme', label: 'ASME' },
            ]}
          />
          <SelectField
            {...form.field('roundingRule')}
            label="Reading a limit"
            options={[
              { value: 'absolute', label: 'absolute: as it stands' },
              { value: 'astm-e29', label: 'ASTM E29 rounding method' },
            ]}
          />
        </div>
        <TextArea {...form.field('note')} label="Note" optional rows={3} />
      </form>
    </Dialog>
  );
}
