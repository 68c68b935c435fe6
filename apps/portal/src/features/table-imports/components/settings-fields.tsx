import type { ImportSettings } from '@trammel/shared/table-import';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';

export interface SettingsFieldsProps {
  format: 'csv' | 'xlsx';
  sheets: readonly string[];
  value: ImportSettings;
  onChange: (value: ImportSettings) => void;
  disabled: boolean;
}

/** How the file is read: suggested from the file, shown, and changeable. */
export function SettingsFields({ format, sheets, value, onChange, disabled }: SettingsFieldsProps) {
  const set = (patch: Partial<ImportSettings>) => onChange({ ...value, ...patch });
  return (
    <div className="grid grid-cols-2 gap-3 sm:grid-cols-3 lg:grid-cols-6">
      {format === 'csv' ? (
        <>
          <SelectField
            id="import-encoding"
            label="Encoding"
            disabled={disabled}
            value={value.encoding}
            onChange={(encoding) => set({ encoding })}
            options={[
              { value: 'utf-8', label: 'UTF-8' },
              { value: 'utf-16le', label: 'UTF-16 LE' },
              { value: 'utf-16be', label: 'UTF-16 BE' },
              { value: 'windows-1252', label: 'Windows-1252' },
            ]}
          />
          <SelectField
            id="import-delimiter"
            label="Between cells"
            disabled={disabled}
            value={value.delimiter}
            onChange={(delimiter) => set({ delimiter })}
            options={[
              { value: ',', label: 'comma ,' },
              { value: ';', label: 'semicolon ;' },
              { value: '\t', label: 'tab' },
              { value: '|', label: 'bar |' },
            ]}
          />
        </>
      ) : (
        <SelectField
          id="import-sheet"
          label="Sheet"
          disabled={disabled}
          value={value.sheet ?? ''}
          onChange={(sheet) => set({ sheet })}
          options={sheets.map((sheet) => ({ value: sheet, label: sheet }))}
        />
      )}
      <SelectField
        id="import-decimal"
        label="Decimal sign"
        disabled={disabled}
        value={value.decimalSign}
        onChange={(decimalSign) =>
          set({ decimalSign, groupSign: value.groupSign === decimalSign ? '' : value.groupSign })
        }
        options={[
          { value: '.', label: 'point 12.5' },
          { value: ',', label: 'comma 12,5' },
        ]}
      />
      <SelectField
        id="import-group"
        label="Thousands mark"
        disabled={disabled}
        value={value.groupSign}
        onChange={(groupSign) => set({ groupSign })}
        options={[
          { value: '', label: 'none' },
          { value: ' ', label: 'space 1 000' },
          { value: "'", label: 'apostrophe 1’000' },
          { value: '.', label: 'point 1.000', disabled: value.decimalSign === '.' },
          { value: ',', label: 'comma 1,000', disabled: value.decimalSign === ',' },
        ]}
      />
      <TextField
        id="import-header"
        label="Line of the header"
        mono
        inputMode="numeric"
        disabled={disabled}
        value={String(value.headerLine)}
        onChange={(text) => /^\d{1,3}$/.test(text) && set({ headerLine: Number(text) })}
      />
    </div>
  );
}
