import { useSuspenseQuery } from '@tanstack/react-query';
import { Button } from '../../../components/ui/button.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { reasonCodes } from '@trammel/shared/dispositions';
import { reasonTargetsQuery } from '../api.ts';
import { reasonWords } from '../disposition-words.ts';

export interface ReasonEntry {
  code: string;
  /** `row:<id>`, `element:<id>` or empty. */
  target: string;
  text: string;
}

interface ReasonsFieldProps {
  submissionId: string;
  value: ReasonEntry[];
  onChange: (value: ReasonEntry[]) => void;
  errorOf: (path: string) => string | undefined;
  idOf: (path: string) => string;
}

/** Reasons of a rejection, each tied to a characteristic or an element; refused rows can be taken over at once. */
export function ReasonsField({ submissionId, value, onChange, errorOf, idOf }: ReasonsFieldProps) {
  const { data } = useSuspenseQuery(reasonTargetsQuery(submissionId));
  const change = (index: number, patch: Partial<ReasonEntry>) =>
    onChange(value.map((entry, at) => (at === index ? { ...entry, ...patch } : entry)));
  const targets = [
    { value: '', label: 'Nothing in particular' },
    ...data.elements
      .filter((element) => element.demand !== 'not-required')
      .map((element) => ({ value: `element:${element.id}`, label: element.label })),
    ...data.rows.map((row) => ({
      value: `row:${row.characteristic.id}`,
      label: `Balloon ${row.characteristic.balloon} ${row.characteristic.description}`,
    })),
  ];
  const refused = [
    ...data.rows
      .filter((row) => row.decision.mark === 'refused')
      .map((row) => ({
        code: row.verdict === 'out-of-tolerance' ? 'out-of-tolerance' : 'other',
        target: `row:${row.characteristic.id}`,
        text: row.decision.remark,
      })),
    ...data.elements
      .filter((element) => element.mark?.mark === 'refused')
      .map((element) => ({
        code: 'element-content',
        target: `element:${element.id}`,
        text: element.mark?.remark ?? '',
      })),
  ].filter((entry) => !value.some((known) => known.target === entry.target));
  return (
    <fieldset id={idOf('reasons')} className="flex flex-col gap-3" tabIndex={-1}>
      <legend className="mb-1 font-semibold">Reasons</legend>
      {errorOf('reasons') && <p className="text-vermilion">{errorOf('reasons')}</p>}
      {value.map((entry, index) => (
        <div
          key={index}
          className="grid gap-3 border border-rule p-3 md:grid-cols-[12rem_minmax(0,1fr)_minmax(0,1.5fr)_auto]"
        >
          <SelectField
            id={idOf(`reasons.${index}.code`)}
            label="Kind"
            value={entry.code}
            onChange={(code) => change(index, { code })}
            options={reasonCodes.map((code) => ({ value: code, label: reasonWords[code] }))}
          />
          <SelectField
            id={idOf(`reasons.${index}.characteristicId`)}
            label="Concerns"
            value={entry.target}
            onChange={(target) => change(index, { target })}
            options={targets}
            error={errorOf(`reasons.${index}.characteristicId`) ?? errorOf(`reasons.${index}.elementId`)}
          />
          <TextField
            id={idOf(`reasons.${index}.text`)}
            label="What is wrong"
            value={entry.text}
            onChange={(text) => change(index, { text })}
            error={errorOf(`reasons.${index}.text`)}
          />
          <Button
            size="small"
            weight="quiet"
            className="self-end"
            aria-label={`Remove reason ${index + 1}`}
            onClick={() => onChange(value.filter((_, at) => at !== index))}
          >
            Remove
          </Button>
        </div>
      ))}
      <div className="flex flex-wrap gap-2">
        <Button
          size="small"
          weight="plain"
          onClick={() => onChange([...value, { code: 'out-of-tolerance', target: '', text: '' }])}
        >
          Add a reason
        </Button>
        {refused.length > 0 && (
          <Button size="small" weight="plain" onClick={() => onChange([...value, ...refused])}>
            Take over {refused.length} refused
          </Button>
        )}
      </div>
    </fieldset>
  );
}
