import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import {
  readingMapping,
  type ImportConfirmed,
  type ReadingImportPreview,
  type ReadingMapping,
} from '@trammel/shared/table-import';
import { unitSymbols } from '@trammel/shared/characteristics';
import { useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { RadioGroup } from '../../../components/ui/choice-fields.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { LinkButton } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { countOf } from '../../../lib/format.ts';
import { confirmReadings, piecesQuery, remapReadings, sendReadings } from '../api.ts';
import { useTableImport } from '../use-table-import.ts';
import { ConflictRows } from './conflict-rows.tsx';
import { ReadingMappingFields } from './reading-mapping-fields.tsx';
import { RefusedRows } from './refused-rows.tsx';
import { SettingsFields } from './settings-fields.tsx';
import { TableDrop } from './table-drop.tsx';

type Sample = ReadingImportPreview['sample'][number];

const columns: DataColumn<Sample>[] = [
  { id: 'line', header: 'Line', align: 'end', cell: (row) => <span className="figures">{row.line}</span> },
  { id: 'balloon', header: 'Balloon', cell: (row) => <span className="figures">{row.balloon}</span> },
  { id: 'piece', header: 'Piece', cell: (row) => <span className="figures">{row.piece}</span> },
  { id: 'text', header: 'Reading', align: 'end', cell: (row) => <span className="figures">{row.text}</span> },
  {
    id: 'converted',
    header: 'In the unit of the drawing',
    align: 'end',
    cell: (row) => (
      <span className="figures text-pencil">
        {row.converted === null ? (row.unit === '1' ? '' : row.unit) : `${row.converted} ${row.unit}`}
      </span>
    ),
  },
];

export interface ReadingImportProps {
  submissionId: string;
  backTo: string;
}

type Choice = 'keep' | 'replace' | 'some';

/** Readings on their way from a file into a package; nothing is written before it is confirmed. */
export function ReadingImport({ submissionId, backTo }: ReadingImportProps) {
  const client = useQueryClient();
  const { data: package_ } = useSuspenseQuery(piecesQuery(submissionId));
  const [choice, setChoice] = useState<Choice>('keep');
  const [chosen, setChosen] = useState<ReadonlySet<string>>(new Set());
  const flow = useTableImport<ReadingImportPreview, ImportConfirmed>((file, sending) => {
    setChoice('keep');
    setChosen(new Set());
    return sendReadings(submissionId, file, sending);
  });
  const { preview, outcome } = flow;
  if (!package_.editable) {
    return (
      <Notice title="Readings can be imported while the package is in preparation">
        This round has been submitted, or the request has not been acknowledged yet.
      </Notice>
    );
  }
  if (outcome) {
    return (
      <Notice
        tone="success"
        live
        title={`${countOf(outcome.written, 'reading', 'readings')} written and judged`}
        actions={
          <>
            <LinkButton to={backTo} weight="primary">
              See the measurements
            </LinkButton>
            <Button onClick={flow.again}>Import another table</Button>
          </>
        }
      >
        {outcome.unchanged} stood there already; {outcome.skipped} were refused or kept as they were.
      </Notice>
    );
  }
  const again = (change: {
    settings?: ReadingImportPreview['settings'];
    mapping?: ReadingMapping | null;
    unit?: string | null;
    newPiecesStreamId?: string | null;
  }) => {
    if (!preview) return;
    const mapping = readingMapping.safeParse(
      change.mapping ??
        preview.mapping ?? { layout: 'wide', rowsAre: 'characteristics', key: 0, columns: {} },
    );
    if (!mapping.success) return;
    flow.remap(() =>
      remapReadings(preview.importId, {
        settings: change.settings ?? preview.settings,
        mapping: mapping.data,
        unit: change.unit === undefined ? preview.unit : change.unit,
        newPiecesStreamId:
          change.newPiecesStreamId === undefined ? preview.newPiecesStreamId : change.newPiecesStreamId,
      }),
    );
  };
  const writes = preview
    ? preview.counts.readings +
      (choice === 'replace' ? preview.counts.conflicts : choice === 'some' ? chosen.size : 0)
    : 0;
  return (
    <div className="flex flex-col gap-5">
      <TableDrop
        id="readings-file"
        label={preview ? 'Another file' : 'Table of readings'}
        progress={flow.progress}
        failure={flow.failure}
        onFile={flow.start}
        onCancel={flow.cancel}
      />
      {!preview && (
        <p className="max-w-prose text-pencil">
          One row a reading, or one row a characteristic with a column for each piece, or one row a piece.
          Balloon numbers and piece labels are matched with the package; values keep every digit.
        </p>
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
              onChange={(settings) => again({ settings })}
            />
          </section>
          <ReadingMappingFields
            preview={preview}
            pieces={package_.pieces}
            disabled={flow.busy}
            onChange={(mapping) => again({ mapping })}
          />
          <div className="grid gap-3 sm:grid-cols-3">
            <SelectField
              id="import-unit"
              label="Unit of the values"
              hint="Where neither header nor column says it"
              disabled={flow.busy}
              value={preview.unit ?? ''}
              onChange={(unit) => again({ unit: unit || null })}
              options={[
                { value: '', label: "the drawing's" },
                ...unitSymbols
                  .filter((unit) => unit !== '1')
                  .map((unit) => ({ value: unit as string, label: unit })),
              ]}
            />
            <SelectField
              id="import-stream"
              label="Stream of new pieces"
              hint="For labels that are not in the package"
              disabled={flow.busy}
              value={preview.newPiecesStreamId ?? ''}
              onChange={(id) => again({ newPiecesStreamId: id || null })}
              options={[
                { value: '', label: 'add no pieces' },
                ...package_.streams.map((stream) => ({ value: stream.id, label: stream.name })),
              ]}
            />
          </div>
          <section className="flex flex-col gap-2">
            <div className="flex flex-wrap items-center justify-between gap-2">
              <h2>
                {countOf(preview.counts.readings, 'new reading', 'new readings')}, {preview.counts.same} as
                they are, {preview.counts.conflicts} with another value
              </h2>
              <Button
                weight="primary"
                busy={flow.busy}
                busyLabel="Working…"
                disabled={writes === 0}
                onClick={() =>
                  flow.confirm(async (key) => {
                    const conflicts = choice === 'some' ? { choice, replace: [...chosen] } : { choice };
                    const confirmed = await confirmReadings(preview.importId, { conflicts }, key);
                    // Sheet, findings and head of the package all hang on its readings.
                    await client.invalidateQueries();
                    return confirmed;
                  })
                }
              >
                Write {countOf(writes, 'reading', 'readings')}
              </Button>
            </div>
            {preview.newPieces.length > 0 && (
              <p>
                {countOf(preview.counts.newPieces, 'piece', 'pieces')} would be added:{' '}
                <span className="figures">{preview.newPieces.slice(0, 20).join(', ')}</span>
                {preview.newPieces.length > 20 && ' and more'}
              </p>
            )}
            <DataTable
              caption="First readings of the file"
              columns={columns}
              rows={preview.sample.slice(0, 25)}
              rowId={(row) => `${row.line}-${row.balloon}-${row.piece}`}
              empty={
                <p className="text-pencil">
                  No new reading is found as the table is read now. Say above which columns hold them.
                </p>
              }
            />
          </section>
          {preview.counts.conflicts > 0 && (
            <section className="flex flex-col gap-3">
              <RadioGroup<Choice>
                id="import-conflicts"
                name="conflicts"
                label="Values that stand there already and differ"
                inline
                value={choice}
                onChange={setChoice}
                options={[
                  { value: 'keep', label: 'keep what is there' },
                  { value: 'replace', label: 'take the file' },
                  { value: 'some', label: 'choose' },
                ]}
              />
              <ConflictRows
                conflicts={preview.conflicts}
                choosing={choice === 'some'}
                chosen={chosen}
                onChosen={setChosen}
              />
            </section>
          )}
          <RefusedRows issues={preview.refused} total={preview.counts.refused} />
        </>
      )}
    </div>
  );
}
