import type { GeometricSpec } from '@trammel/shared/characteristics';
import { Checkbox } from '../../../components/ui/choice-fields.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { geometricTypes } from '../characteristic-words.ts';

/** Feature control frame: which tolerance, its zone, material condition, and whose size gives the bonus. */
export function GeometricFields({
  value,
  onChange,
}: {
  value: GeometricSpec;
  onChange: (value: GeometricSpec) => void;
}) {
  const bonus = value.modifier !== 'RFS';
  return (
    <fieldset className="grid gap-4 border border-rule p-3 sm:grid-cols-3">
      <legend className="px-1 font-medium">Geometric tolerance</legend>
      <SelectField
        id="geometric-type"
        label="Of"
        value={value.type}
        onChange={(type) => onChange({ ...value, type })}
        options={geometricTypes.map((type) => ({ value: type, label: type.replace('-', ' ') }))}
      />
      <TextField
        id="geometric-datums"
        label="Datums"
        hint="A|B|C"
        mono
        optional
        value={value.datums}
        onChange={(datums) => onChange({ ...value, datums })}
      />
      <div className="self-end">
        <Checkbox
          id="geometric-diametral"
          label="Diametral zone Ø"
          value={value.diametral}
          onChange={(diametral) => onChange({ ...value, diametral })}
        />
      </div>
      <SelectField
        id="geometric-modifier"
        label="Material condition"
        value={value.modifier}
        onChange={(modifier) =>
          onChange({ ...value, modifier, sizeBalloon: modifier === 'RFS' ? null : value.sizeBalloon })
        }
        options={[
          { value: 'RFS', label: 'RFS, no bonus' },
          { value: 'MMC', label: 'MMC' },
          { value: 'LMC', label: 'LMC' },
        ]}
      />
      {bonus && (
        <>
          <SelectField
            id="geometric-feature"
            label="Feature"
            value={value.feature}
            onChange={(feature) => onChange({ ...value, feature })}
            options={[
              { value: 'internal', label: 'internal, a hole' },
              { value: 'external', label: 'external, a shaft' },
            ]}
          />
          <TextField
            id="geometric-size"
            label="Bonus from the size of balloon"
            hint="The departure of that piece's size from its material limit widens the zone"
            mono
            value={value.sizeBalloon ?? ''}
            onChange={(text) => onChange({ ...value, sizeBalloon: text.trim() || null })}
          />
        </>
      )}
    </fieldset>
  );
}
