import { useQueryClient } from '@tanstack/react-query';
import { changePartRequest, createPartRequest, type PartResponse } from '@trammel/shared/parts';
import { Button } from '../../../components/ui/button.tsx';
import { Checkbox } from '../../../components/ui/choice-fields.tsx';
import { Dialog } from '../../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { useForm } from '../../../lib/use-form.ts';
import { changePart, createPart, partQuery } from '../api.ts';

interface Values {
  number: string;
  name: string;
  material: string;
  commodity: string;
  unitSystem: 'metric' | 'inch';
  safetyOrRegulatory: boolean;
  firstRevision: string;
}

export interface PartDialogProps {
  /** Null for a new part. */
  part: PartResponse | null;
  onClose: () => void;
  onSaved: (part: PartResponse) => void;
}

export function PartDialog({ part, onClose, onSaved }: PartDialogProps) {
  const client = useQueryClient();
  const form = useForm<Values, unknown>({
    initial: {
      number: part?.number ?? '',
      name: part?.name ?? '',
      material: part?.material ?? '',
      commodity: part?.commodity ?? '',
      unitSystem: part?.unitSystem ?? 'metric',
      safetyOrRegulatory: part?.safetyOrRegulatory ?? false,
      firstRevision: part ? 'A' : '',
    },
    schema: part
      ? { safeParse: ({ firstRevision: _first, ...facts }: Values) => changePartRequest.safeParse(facts) }
      : createPartRequest,
    onSubmit: async ({ firstRevision, ...facts }) => {
      const saved = part
        ? await changePart(part.id, part.version, facts)
        : await createPart({ ...facts, firstRevision });
      client.setQueryData(partQuery(saved.id).queryKey, saved);
      await client.invalidateQueries({ queryKey: ['parts'] });
      onSaved(saved);
    },
  });
  return (
    <Dialog
      open
      onClose={onClose}
      title={part ? `Change part ${part.number}` : 'New part'}
      footer={
        <>
          <Button weight="primary" busy={form.busy} busyLabel="Saving…" onClick={() => void form.submit()}>
            {part ? 'Save the part' : 'Create the part'}
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </>
      }
    >
      <form className="flex flex-col gap-4" onSubmit={(event) => void form.submit(event)} noValidate>
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        <TextField {...form.field('number')} label="Part number" mono autoComplete="off" />
        <TextField {...form.field('name')} label="Name" autoComplete="off" />
        {!part && (
          <TextField
            {...form.field('firstRevision')}
            label="First revision"
            hint="As the drawing names it, such as A or 01"
            mono
            className="w-40"
          />
        )}
        <div className="grid gap-4 sm:grid-cols-2">
          <TextField {...form.field('material')} label="Material" optional />
          <TextField
            {...form.field('commodity')}
            label="How it is made"
            hint="turned, moulded, cast"
            optional
          />
        </div>
        <SelectField
          {...form.field('unitSystem')}
          label="Units of the drawing"
          className="w-40"
          options={[
            { value: 'metric', label: 'metric' },
            { value: 'inch', label: 'inch' },
          ]}
        />
        <Checkbox
          {...form.field('safetyOrRegulatory')}
          label="Safety or regulatory part"
          hint="Its packages carry the caution that an approval here does not replace the design authority's."
        />
        <button type="submit" className="sr-only" tabIndex={-1} aria-hidden="true" />
      </form>
    </Dialog>
  );
}
