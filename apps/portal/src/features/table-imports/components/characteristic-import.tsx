import { useQueryClient } from '@tanstack/react-query';
import {
  characteristicColumns,
  type CharacteristicColumn,
  type CharacteristicImportPreview,
  type ImportConfirmed,
  type ImportSettings,
} from '@trammel/shared/table-import';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { DownloadLink, LinkButton } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { countOf, showDecimal } from '../../../lib/format.ts';
import { confirmCharacteristics, remapCharacteristics, sendCharacteristics } from '../api.ts';
import { columnLabels } from '../column-labels.ts';
import { useTableImport } from '../use-table-import.ts';
import { RefusedRows } from './refused-rows.tsx';
import { SettingsFields } from './settings-fields.tsx';
import { TableDrop } from './table-drop.tsx';

type Row = CharacteristicImportPreview['rows'][number];
const actionWords: Record<Row['action'], string> = { add: '+ add', replace: '≠ replace', same: '= as it is' };
const figure = (text: string | null) => (
  <span className="figures">{text === null ? '–' : showDecimal(text)}</span>
);

const columns: DataColumn<Row>[] = [
  { id: 'line', header: 'Line', align: 'end', cell: (row) => <span className="figures">{row.line}</span> },
  { id: 'balloon', header: 'Balloon', cell: (row) => <span className="figures">{row.balloon}</span> },
  {
    id: 'action',
    header: 'Will',
    cell: (row) => (
      <span className={row.action === 'same' ? 'text-pencil' : ''}>{actionWords[row.action]}</span>
    ),
  },
  { id: 'description', header: 'Description', wrap: true, cell: (row) => row.description },
  { id: 'kind', header: 'Kind', from: 'md', cell: (row) => row.kind },
  { id: 'nominal', header: 'Nominal', align: 'end', cell: (row) => figure(row.nominal) },
  { id: 'lower', header: 'Lower limit', align: 'end', cell: (row) => figure(row.lowerLimit) },
  { id: 'upper', header: 'Upper limit', align: 'end', cell: (row) => figure(row.upperLimit) },
  { id: 'unit', header: 'Unit', cell: (row) => row.unit },
];

export interface CharacteristicImportProps {
  revisionId: string;
  /** Where the characteristics are seen. */
  backTo: string;
}

/** A table of characteristics on its way into a draft: file, settings, columns, what would happen, confirmation. */
export function CharacteristicImport({ revisionId, backTo }: CharacteristicImportProps) {
  const client = useQueryClient();
  const flow = useTableImport<CharacteristicImportPreview, ImportConfirmed>((file, sending) =>
    sendCharacteristics(revisionId, file, sending),
  );
  const { preview, outcome } = flow;
  if (outcome) {
    return (
      <Notice
        tone="success"
        live
        title={`${countOf(outcome.written, 'characteristic', 'characteristics')} imported`}
        actions={
          <>
            <LinkButton to={backTo} weight="primary">
              See the characteristics
            </LinkButton>
            <Button onClick={flow.again}>Import another table</Button>
          </>
        }
      >
        {outcome.unchanged} stood there already and {outcome.skipped} refused rows stayed out.
      </Notice>
    );
  }
  const again = (settings: ImportSettings, mapping: CharacteristicImportPreview['mapping']) =>
    preview && flow.remap(() => remapCharacteristics(preview.importId, { settings, mapping }));
  return (
    <div className="flex flex-col gap-5">
      <TableDrop
        id="characteristics-file"
        label={preview ? 'Another file' : 'Table of characteristics'}
        progress={flow.progress}
        failure={flow.failure}
        onFile={flow.start}
        onCancel={flow.cancel}
      />
      {!preview && (
        <div className="flex flex-wrap items-center gap-2">
          <span className="text-pencil">
            Any table with balloon numbers will do. The template has every column:
          </span>
          <DownloadLink href="/api/characteristic-template?format=xlsx" size="small">
            Template XLSX
          </DownloadLink>
          <DownloadLink href="/api/characteristic-template?format=csv" size="small">
            Template CSV
          </DownloadLink>
        </div>
      )}
      {preview && (
        <>
          <section className="flex flex-col gap-2">
            <h2>How {preview.fileName} is read</h2>
            <SettingsFields
              format={preview.format}
              sheets={preview.sheets}
              value={preview.settings}
              disabled={flow.busy}
              onChange={(settings) => again(settings, preview.mapping)}
            />
          </section>
          <MappingFields
            preview={preview}
            disabled={flow.busy}
            onChange={(mapping) => again(preview.settings, mapping)}
          />
          <section className="flex flex-col gap-2">
            <div className="flex flex-wrap items-center justify-between gap-2">
              <h2>
                {preview.counts.add} to add, {preview.counts.replace} to replace, {preview.counts.same} as
                they are
              </h2>
              <Button
                weight="primary"
                busy={flow.busy}
                busyLabel="Working…"
                disabled={preview.counts.add + preview.counts.replace === 0}
                onClick={() =>
                  flow.confirm(async (key) => {
                    const confirmed = await confirmCharacteristics(preview.importId, key);
                    await client.invalidateQueries({ queryKey: ['characteristics', revisionId] });
                    await client.invalidateQueries({ queryKey: ['revision', revisionId] });
                    return confirmed;
                  })
                }
              >
                Import{' '}
                {countOf(preview.counts.add + preview.counts.replace, 'characteristic', 'characteristics')}
              </Button>
            </div>
            <DataTable
              caption="What would be imported"
              columns={columns}
              rows={preview.rows.slice(0, 500)}
              rowId={(row) => String(row.line)}
              empty={
                <p className="text-pencil">
                  No row of this table can be imported as it is read now. Choose its columns above.
                </p>
              }
            />
          </section>
          <RefusedRows issues={preview.refused} total={preview.counts.refused} />
        </>
      )}
    </div>
  );
}

interface MappingProps {
  preview: CharacteristicImportPreview;
  disabled: boolean;
  onChange: (mapping: CharacteristicImportPreview['mapping']) => void;
}

/** Each column of the file beside what it is taken for. */
function MappingFields({ preview, disabled, onChange }: MappingProps) {
  const takenFor = (index: number) =>
    characteristicColumns.find((column) => preview.mapping[column] === index) ?? '';
  const assign = (index: number, column: CharacteristicColumn | '') => {
    const mapping = { ...preview.mapping };
    for (const name of characteristicColumns) if (mapping[name] === index) delete mapping[name];
    if (column !== '') mapping[column] = index;
    onChange(mapping);
  };
  return (
    <section className="flex flex-col gap-2">
      <h2>Columns</h2>
      <ul className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
        {preview.columns.slice(0, 60).map((column) => (
          <li key={column.index} className="min-w-0 border border-rule bg-sheet p-2">
            <SelectField
              id={`import-column-${column.index}`}
              label={<span className="break-words">{column.header}</span>}
              hint={<span className="figures block truncate">{column.sample.join(' · ') || 'empty'}</span>}
              disabled={disabled}
              value={takenFor(column.index)}
              onChange={(name) => assign(column.index, name)}
              options={[
                { value: '' as const, label: 'leave out' },
                ...characteristicColumns.map((name) => ({ value: name, label: columnLabels[name] })),
              ]}
            />
          </li>
        ))}
      </ul>
    </section>
  );
}
