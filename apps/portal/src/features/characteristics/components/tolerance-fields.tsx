import type { StatedTolerance } from '@trammel/metrology/tolerance-notation';
import { Checkbox } from '../../../components/ui/choice-fields.tsx';
import { NumberTextField } from '../../../components/ui/number-text-field.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';

const formWords: Record<StatedTolerance['form'], string> = {
  symmetric: '± symmetric',
  deviations: 'upper and lower deviation',
  limits: 'two limits',
  max: 'one limit, maximum',
  min: 'one limit, minimum',
  fit: 'fit class of ISO 286',
  general: 'general tolerance ISO 2768-1',
  none: 'none',
};
const forms = Object.keys(formWords) as StatedTolerance['form'][];

const nominalOf = (stated: StatedTolerance): string => ('nominal' in stated ? (stated.nominal ?? '') : '');

/** The same requirement begun in another form; what both forms have is taken along. */
function inForm(form: StatedTolerance['form'], stated: StatedTolerance, geometric: boolean): StatedTolerance {
  const nominal = nominalOf(stated);
  const upper = 'upper' in stated ? stated.upper : '';
  const lower = 'lower' in stated ? stated.lower : '';
  switch (form) {
    case 'symmetric':
      return { form, nominal, tolerance: '' };
    case 'deviations':
      return { form, nominal, upper: '', lower: '' };
    case 'limits':
      return { form, lower, upper, nominal: nominal || null };
    case 'max':
      return { form, upper, zeroBound: geometric };
    case 'min':
      return { form, lower };
    case 'fit':
      return { form, nominal, fitClass: 'H7' };
    case 'general':
      return { form, nominal, generalClass: 'm', feature: 'linear' };
    case 'none':
      return { form, nominal: nominal || null };
  }
}

export interface ToleranceFieldsProps {
  stated: StatedTolerance;
  unit: string;
  geometric: boolean;
  onChange: (stated: StatedTolerance) => void;
}

/** Every way a drawing gives a tolerance. */
export function ToleranceFields({ stated, unit, geometric, onChange }: ToleranceFieldsProps) {
  const number = (name: string, label: string, value: string, take: (text: string) => StatedTolerance) => (
    <NumberTextField
      key={name}
      id={`tolerance-${name}`}
      label={label}
      unit={unit}
      value={value}
      onChange={(text) => onChange(take(text))}
    />
  );
  return (
    <fieldset className="grid gap-4 border border-rule p-3 sm:grid-cols-3">
      <legend className="px-1 font-medium">Tolerance</legend>
      <SelectField
        id="tolerance-form"
        label="Given as"
        value={stated.form}
        onChange={(form) => onChange(inForm(form, stated, geometric))}
        options={forms.map((value) => ({ value, label: formWords[value] }))}
      />
      {'nominal' in stated &&
        number('nominal', 'Nominal', stated.nominal ?? '', (text) =>
          stated.form === 'limits' || stated.form === 'none'
            ? { ...stated, nominal: text || null }
            : { ...stated, nominal: text },
        )}
      {stated.form === 'symmetric' &&
        number('plus-minus', '±', stated.tolerance, (tolerance) => ({ ...stated, tolerance }))}
      {stated.form === 'deviations' && [
        number('upper', 'Upper deviation', stated.upper, (upper) => ({ ...stated, upper })),
        number('lower', 'Lower deviation', stated.lower, (lower) => ({ ...stated, lower })),
      ]}
      {stated.form === 'limits' && [
        number('lower', 'Lower limit', stated.lower, (lower) => ({ ...stated, lower })),
        number('upper', 'Upper limit', stated.upper, (upper) => ({ ...stated, upper })),
      ]}
      {stated.form === 'max' && [
        number('upper', geometric ? 'Width of the zone' : 'Upper limit', stated.upper, (upper) => ({
          ...stated,
          upper,
        })),
        <div key="zero" className="self-end">
          <Checkbox
            id="tolerance-zero"
            label="Zero is a natural bound"
            hint="No value can be below it"
            value={stated.zeroBound}
            onChange={(zeroBound) => onChange({ ...stated, zeroBound })}
          />
        </div>,
      ]}
      {stated.form === 'min' &&
        number('lower', 'Lower limit', stated.lower, (lower) => ({ ...stated, lower }))}
      {stated.form === 'fit' && (
        <TextField
          id="tolerance-fit"
          label="Fit class"
          hint="Capital letter for a hole, small for a shaft: H7, g6"
          mono
          value={stated.fitClass}
          onChange={(fitClass) => onChange({ ...stated, fitClass: fitClass.trim() })}
        />
      )}
      {stated.form === 'general' && (
        <>
          <SelectField
            id="tolerance-class"
            label="Class"
            value={stated.generalClass}
            onChange={(generalClass) => onChange({ ...stated, generalClass })}
            options={[
              { value: 'f', label: 'f fine' },
              { value: 'm', label: 'm medium' },
              { value: 'c', label: 'c coarse' },
              { value: 'v', label: 'v very coarse' },
            ]}
          />
          <SelectField
            id="tolerance-feature"
            label="Of a"
            value={stated.feature}
            onChange={(feature) => onChange({ ...stated, feature })}
            options={[
              { value: 'linear', label: 'linear size' },
              { value: 'radius-chamfer', label: 'radius or chamfer' },
              { value: 'angular', label: 'angle' },
            ]}
          />
          {stated.feature === 'angular' && (
            <NumberTextField
              id="tolerance-leg"
              label="Shorter leg"
              unit="mm"
              value={stated.shorterLeg ?? ''}
              onChange={(shorterLeg) => onChange({ ...stated, shorterLeg })}
            />
          )}
        </>
      )}
    </fieldset>
  );
}
