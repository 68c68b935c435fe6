import { Button } from '../../../components/ui/button.tsx';
import { DateField, TextField } from '../../../components/ui/text-field.tsx';

export interface ConditionEntry {
  text: string;
  owner: string;
  dueOn: string;
}

interface ConditionsFieldProps {
  value: ConditionEntry[];
  onChange: (value: ConditionEntry[]) => void;
  errorOf: (path: string) => string | undefined;
  idOf: (path: string) => string;
}

/** Conditions of an interim approval: what, who, by when. */
export function ConditionsField({ value, onChange, errorOf, idOf }: ConditionsFieldProps) {
  const change = (index: number, patch: Partial<ConditionEntry>) =>
    onChange(value.map((entry, at) => (at === index ? { ...entry, ...patch } : entry)));
  return (
    <fieldset id={idOf('conditions')} className="flex flex-col gap-3" tabIndex={-1}>
      <legend className="mb-1 font-semibold">Conditions</legend>
      {errorOf('conditions') && <p className="text-vermilion">{errorOf('conditions')}</p>}
      {value.map((entry, index) => (
        <div
          key={index}
          className="grid gap-3 border border-rule p-3 md:grid-cols-[minmax(0,2fr)_minmax(0,1fr)_11rem_auto]"
        >
          <TextField
            id={idOf(`conditions.${index}.text`)}
            label="What must happen"
            value={entry.text}
            onChange={(text) => change(index, { text })}
            error={errorOf(`conditions.${index}.text`)}
          />
          <TextField
            id={idOf(`conditions.${index}.owner`)}
            label="Owner"
            value={entry.owner}
            onChange={(owner) => change(index, { owner })}
            error={errorOf(`conditions.${index}.owner`)}
          />
          <DateField
            id={idOf(`conditions.${index}.dueOn`)}
            label="Due on"
            value={entry.dueOn}
            onChange={(dueOn) => change(index, { dueOn })}
            error={errorOf(`conditions.${index}.dueOn`)}
          />
          <Button
            size="small"
            weight="quiet"
            className="self-end"
            aria-label={`Remove condition ${index + 1}`}
            onClick={() => onChange(value.filter((_, at) => at !== index))}
          >
            Remove
          </Button>
        </div>
      ))}
      <div>
        <Button
          size="small"
          weight="plain"
          onClick={() => onChange([...value, { text: '', owner: '', dueOn: '' }])}
        >
          Add a condition
        </Button>
      </div>
    </fieldset>
  );
}
