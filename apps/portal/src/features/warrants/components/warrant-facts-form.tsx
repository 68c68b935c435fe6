import { useQueryClient } from '@tanstack/react-query';
import { saveWarrantRequest, type WarrantFacts, type WarrantResponse } from '@trammel/shared/warrants';
import { Button } from '../../../components/ui/button.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { NumberTextField } from '../../../components/ui/number-text-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { useForm } from '../../../lib/use-form.ts';
import { saveWarrant, warrantQuery } from '../api.ts';

type Values = Record<keyof WarrantFacts, string>;

const orNull = (text: string) => (text.trim() === '' ? null : text.trim());
const bodyOf = (values: Values): WarrantFacts => ({
  runOn: orNull(values.runOn),
  runHours: orNull(values.runHours),
  runQuantity: orNull(values.runQuantity) === null ? null : Number(values.runQuantity),
  partMassKg: orNull(values.partMassKg),
  productionTool: values.productionTool,
  materialReport: values.materialReport,
  exceptions: values.exceptions,
  comment: values.comment,
});

/** What the supplier states about the run; a draft until the signature. */
export function WarrantFactsForm({ warrant }: { warrant: WarrantResponse }) {
  const client = useQueryClient();
  const { facts } = warrant;
  const form = useForm<Values, WarrantFacts>({
    initial: {
      runOn: facts.runOn ?? '',
      runHours: facts.runHours ?? '',
      runQuantity: facts.runQuantity?.toString() ?? '',
      partMassKg: facts.partMassKg ?? '',
      productionTool: facts.productionTool,
      materialReport: facts.materialReport,
      exceptions: facts.exceptions,
      comment: facts.comment,
    },
    schema: {
      safeParse: (value) => saveWarrantRequest.safeParse(bodyOf(value as Values)),
    },
    onSubmit: async (_values, body) => {
      const saved = await saveWarrant(warrant, body);
      client.setQueryData(warrantQuery(warrant.submissionId).queryKey, saved);
      await client.invalidateQueries({ queryKey: ['submission', warrant.submissionId] });
      showToast({ text: 'Warrant facts saved' });
    },
  });
  return (
    <form
      className="flex flex-col gap-4 border border-rule bg-sheet p-4"
      onSubmit={(event) => void form.submit(event)}
    >
      <h2>Run and part</h2>
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <div className="grid gap-4 sm:grid-cols-2 lg:grid-cols-4">
        <DateField {...form.field('runOn')} label="Run on" />
        <NumberTextField {...form.field('runHours')} label="Length of the run" unit="h" optional />
        <TextField {...form.field('runQuantity')} label="Pieces made" inputMode="numeric" mono />
        <NumberTextField {...form.field('partMassKg')} label="Mass of one part" unit="kg" optional />
        <TextField {...form.field('productionTool')} label="Production tool" optional />
        <TextField {...form.field('materialReport')} label="Material report" optional />
        <TextArea {...form.field('exceptions')} label="Exceptions" optional rows={2} />
        <TextArea {...form.field('comment')} label="Comment" optional rows={2} />
      </div>
      <div>
        <Button type="submit" weight="plain" busy={form.busy}>
          Save
        </Button>
      </div>
    </form>
  );
}
