import type { ReadingImportPreview, ReadingMapping } from '@trammel/shared/table-import';
import type { PieceResponse } from '@trammel/shared/measurements';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField, type Option } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';

export interface ReadingMappingFieldsProps {
  preview: ReadingImportPreview;
  pieces: readonly PieceResponse[];
  disabled: boolean;
  onChange: (mapping: ReadingMapping) => void;
}

type Layout = 'long' | 'characteristics' | 'pieces';

const layoutOf = (mapping: ReadingMapping | null): Layout =>
  mapping === null ? 'characteristics' : mapping.layout === 'long' ? 'long' : mapping.rowsAre;

/** Which columns hold what, for tables with one row a reading, a characteristic or a piece. */
export function ReadingMappingFields({ preview, pieces, disabled, onChange }: ReadingMappingFieldsProps) {
  const { mapping, columns } = preview;
  const layout = layoutOf(mapping);
  const options: Option<string>[] = columns.map((column) => ({
    value: String(column.index),
    label: column.header,
  }));
  const withNone = [{ value: '', label: 'none' }, ...options];
  const start = (next: Layout) => {
    const last = columns.length - 1;
    if (next === 'long')
      onChange({
        layout: 'long',
        balloon: 0,
        piece: Math.min(1, last),
        value: last,
        stream: null,
        unit: null,
      });
    else onChange({ layout: 'wide', rowsAre: next, key: 0, columns: {}, stream: null });
  };
  const column = (
    name: string,
    label: string,
    value: number | null,
    take: (index: number | null) => void,
    optional = false,
  ) => (
    <SelectField
      id={`reading-${name}`}
      label={label}
      disabled={disabled}
      value={value === null ? '' : String(value)}
      onChange={(text) => take(text === '' ? null : Number(text))}
      options={optional ? withNone : options}
    />
  );
  return (
    <section className="flex flex-col gap-2">
      <h2>Columns</h2>
      {mapping === null && (
        <Notice tone="attention" title="The headers do not say where the readings are">
          Choose how the rows lie and which columns hold balloon number, piece and value.
        </Notice>
      )}
      <div className="grid gap-3 sm:grid-cols-3 lg:grid-cols-6">
        <SelectField
          id="reading-layout"
          label="One row is"
          disabled={disabled}
          value={layout}
          onChange={start}
          options={[
            { value: 'long', label: 'a reading' },
            { value: 'characteristics', label: 'a characteristic' },
            { value: 'pieces', label: 'a piece' },
          ]}
        />
        {mapping?.layout === 'long' && (
          <>
            {column('balloon', 'Balloon number', mapping.balloon, (balloon) =>
              onChange({ ...mapping, balloon: balloon ?? 0 }),
            )}
            {column('piece', 'Piece', mapping.piece, (piece) => onChange({ ...mapping, piece: piece ?? 0 }))}
            {column('value', 'Value', mapping.value, (value) => onChange({ ...mapping, value: value ?? 0 }))}
            {column('stream', 'Stream', mapping.stream, (stream) => onChange({ ...mapping, stream }), true)}
            {column('unit', 'Unit', mapping.unit, (unit) => onChange({ ...mapping, unit }), true)}
          </>
        )}
        {mapping?.layout === 'wide' &&
          column('key', mapping.rowsAre === 'pieces' ? 'Piece' : 'Balloon number', mapping.key, (key) =>
            onChange({ ...mapping, key: key ?? 0 }),
          )}
        {mapping?.layout === 'wide' &&
          mapping.rowsAre === 'pieces' &&
          column('stream', 'Stream', mapping.stream, (stream) => onChange({ ...mapping, stream }), true)}
      </div>
      {(mapping === null || mapping.layout === 'wide') && (
        <WideColumns
          preview={preview}
          mapping={
            mapping ?? { layout: 'wide', rowsAre: 'characteristics', key: 0, columns: {}, stream: null }
          }
          pieces={pieces}
          disabled={disabled}
          onChange={onChange}
        />
      )}
    </section>
  );
}

type Wide = Extract<ReadingMapping, { layout: 'wide' }>;

function WideColumns({
  preview,
  mapping,
  pieces,
  disabled,
  onChange,
}: ReadingMappingFieldsProps & { mapping: Wide }) {
  const assign = (index: number, label: string | null) => {
    const columns = { ...mapping.columns };
    if (label === null) delete columns[String(index)];
    else columns[String(index)] = label;
    onChange({ ...mapping, columns });
  };
  const ofPieces = mapping.rowsAre === 'pieces';
  return (
    <ul className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
      {preview.columns.slice(0, 300).map((column) => {
        if (column.index === mapping.key) return null;
        const label = mapping.columns[String(column.index)];
        const known = pieces.some((piece) => piece.label === label);
        const hint = <span className="figures block truncate">{column.sample.join(' · ') || 'empty'}</span>;
        const id = `reading-column-${column.index}`;
        return (
          <li key={column.index} className="min-w-0 border border-rule bg-sheet p-2">
            {ofPieces ? (
              <TextField
                id={id}
                label={<span className="break-words">{column.header}</span>}
                hint={<>{hint}Balloon number; empty leaves it out</>}
                mono
                disabled={disabled}
                value={label ?? ''}
                onChange={(text) => assign(column.index, text.trim() === '' ? null : text.trim())}
              />
            ) : (
              <SelectField
                id={id}
                label={<span className="break-words">{column.header}</span>}
                hint={hint}
                disabled={disabled}
                value={label ?? ''}
                onChange={(text) => assign(column.index, text === '' ? null : text)}
                options={[
                  { value: '', label: 'leave out' },
                  ...(label !== undefined && !known
                    ? [{ value: label, label: `${label} (as named in the file)` }]
                    : []),
                  ...(label === undefined
                    ? [{ value: column.header, label: `${column.header} (as named in the file)` }]
                    : []),
                  ...pieces.map((piece) => ({ value: piece.label, label: `piece ${piece.label}` })),
                ]}
              />
            )}
          </li>
        );
      })}
    </ul>
  );
}
