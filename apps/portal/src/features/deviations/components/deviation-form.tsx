import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import {
  askDeviationRequest,
  type AskDeviationRequest,
  type DeviationResponse,
} from '@trammel/shared/deviations';
import { Button } from '../../../components/ui/button.tsx';
import { CheckboxGroup } from '../../../components/ui/choice-fields.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { NumberTextField } from '../../../components/ui/number-text-field.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { useForm } from '../../../lib/use-form.ts';
import { askableQuery, askDeviation, changeDeviation } from '../api.ts';

interface DeviationFormProps {
  submissionId: string;
  /** Changes this one; null asks for a new one. */
  deviation: DeviationResponse | null;
  onDone: () => void;
  onCancel: () => void;
}

type Values = Record<
  | 'characteristicId'
  | 'rangeLower'
  | 'rangeUpper'
  | 'cause'
  | 'risk'
  | 'containment'
  | 'correctiveAction'
  | 'quantity'
  | 'untilOn',
  string
> & { streamIds: string[] };

const orNull = (text: string) => (text.trim() === '' ? null : text.trim());

const bodyOf = (values: Values): AskDeviationRequest => ({
  characteristicId: values.characteristicId,
  streamIds: values.streamIds,
  rangeLower: orNull(values.rangeLower),
  rangeUpper: orNull(values.rangeUpper),
  cause: values.cause,
  risk: values.risk,
  containment: values.containment,
  correctiveAction: values.correctiveAction,
  quantity: orNull(values.quantity) === null ? null : Number(values.quantity),
  untilOn: orNull(values.untilOn),
});

/** Range, cause, containment, and how many pieces or until when. */
export function DeviationForm({ submissionId, deviation, onDone, onCancel }: DeviationFormProps) {
  const { data } = useSuspenseQuery(askableQuery(submissionId));
  const [key] = useState(() => newIdempotencyKey());
  const form = useForm<Values, AskDeviationRequest>({
    initial: {
      characteristicId: deviation?.characteristicId ?? data.characteristics[0]?.id ?? '',
      streamIds: deviation?.streamIds ?? [],
      rangeLower: deviation?.rangeLower ?? '',
      rangeUpper: deviation?.rangeUpper ?? '',
      cause: deviation?.cause ?? '',
      risk: deviation?.risk ?? '',
      containment: deviation?.containment ?? '',
      correctiveAction: deviation?.correctiveAction ?? '',
      quantity: deviation?.quantity?.toString() ?? '',
      untilOn: deviation?.untilOn ?? '',
    },
    schema: {
      safeParse: (value) => {
        const parsed = askDeviationRequest.safeParse(bodyOf(value as Values));
        return parsed.success ? { success: true, data: bodyOf(value as Values) } : parsed;
      },
    },
    onSubmit: async (_values, body) => {
      await (deviation ? changeDeviation(deviation, body) : askDeviation(submissionId, body, key));
      onDone();
    },
  });
  const facts = data.characteristics.find((candidate) => candidate.id === form.values.characteristicId);
  const unit = facts === undefined || facts.unit === '1' ? '' : facts.unit;
  return (
    <form
      className="flex flex-col gap-4 border border-rule bg-sheet p-4"
      onSubmit={(event) => void form.submit(event)}
    >
      <h2>{deviation ? `Change deviation request ${deviation.number}` : 'Ask for a deviation'}</h2>
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <div className="grid gap-4 md:grid-cols-2">
        <SelectField
          {...form.field('characteristicId')}
          label="Characteristic"
          options={data.characteristics.map((row) => ({
            value: row.id,
            label: `${row.balloon} ${row.description}${data.out.has(row.id) ? ', out of tolerance' : ''}`,
          }))}
          hint={
            facts
              ? `Drawn limits: ${facts.lowerLimit ?? 'none'} to ${facts.upperLimit ?? 'none'} ${unit}`
              : undefined
          }
        />
        {data.streams.length > 1 && (
          <CheckboxGroup
            {...form.field('streamIds')}
            label="Streams"
            hint="None chosen means all of them"
            options={data.streams.map((stream) => ({ value: stream.id, label: stream.name }))}
          />
        )}
        <NumberTextField {...form.field('rangeLower')} label="Lowest value asked for" optional unit={unit} />
        <NumberTextField {...form.field('rangeUpper')} label="Highest value asked for" optional unit={unit} />
        <TextArea {...form.field('cause')} label="Cause" rows={3} />
        <TextArea
          {...form.field('containment')}
          label="Containment"
          hint="How the parts are kept safe meanwhile"
          rows={3}
        />
        <TextArea {...form.field('risk')} label="Risk to function" optional rows={3} />
        <TextArea {...form.field('correctiveAction')} label="Corrective action" optional rows={3} />
        <TextField
          {...form.field('quantity')}
          label="Number of pieces"
          hint="A number, a date, or both"
          inputMode="numeric"
          mono
        />
        <DateField {...form.field('untilOn')} label="Until" optional />
      </div>
      <div className="flex flex-wrap gap-2">
        <Button type="submit" weight="primary" busy={form.busy}>
          {deviation ? 'Save changes' : 'Send to the customer'}
        </Button>
        <Button weight="plain" onClick={onCancel}>
          Cancel
        </Button>
      </div>
    </form>
  );
}
