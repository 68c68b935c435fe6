import { useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import type { MeasurementSheetResponse } from '@trammel/shared/measurements';
import { Button } from '../../../components/ui/button.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { DownloadLink, LinkButton } from '../../../components/ui/link-button.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { apiUrl } from '../../../lib/api-client.ts';
import { reasonOf } from '../../../lib/api-problem.ts';
import { draftKey } from '../../../lib/draft-storage.ts';
import { countOf } from '../../../lib/format.ts';
import { useSession } from '../../../lib/session.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { SaveQueue, type SaveState } from '../save-queue.ts';
import { SheetModel } from '../sheet-model.ts';
import { UndoStack } from '../undo-stack.ts';
import { FillRowsDialog } from './fill-rows-dialog.tsx';
import { MeasurementGrid } from './measurement-grid.tsx';
import { RowPanel } from './row-panel.tsx';

interface MeasurementSheetProps {
  submissionId: string;
  sheet: MeasurementSheetResponse;
  importHref: string;
  /** Told after each answer of the server, so that counts on the page can follow. */
  onSaved: () => void;
}

const stateWords: Record<SaveState, string> = {
  saved: 'All readings saved',
  saving: 'Saving',
  waiting: 'Not saved yet',
  offline: 'No connection: kept in this browser, sent again by itself',
  failed: 'Not saved',
};

/** The grid with what belongs around it: save state, filter, conflicts, refusals, and the row in hand. */
export function MeasurementSheet({ submissionId, sheet, importHref, onSaved }: MeasurementSheetProps) {
  const { user } = useSession();
  const [model] = useState(() => new SheetModel(sheet));
  const [undo] = useState(() => new UndoStack(model));
  const [queue] = useState(
    () => new SaveQueue(model, submissionId, draftKey(user.id, `readings.${submissionId}`)),
  );
  const [said, announce] = useState(() => {
    const recovered = queue.recover();
    return recovered === 0
      ? ''
      : `${countOf(recovered, 'reading', 'readings')} of an earlier visit taken up again`;
  });
  const [active, setActive] = useState({ row: 0, column: 0 });
  const [filling, setFilling] = useState(false);
  const [view, change] = useUrlState({ q: '', rows: 'all' });
  const state = useSyncExternalStore(queue.subscribe, queue.current);
  const version = useSyncExternalStore(model.subscribe, model.version);

  // Whoever leaves right after typing finds head and findings as they are once the last reading has arrived.
  useEffect(() => () => void queue.stop().then((pending) => pending && onSaved()), [queue, onSaved]);
  useEffect(() => {
    if (state === 'saved' && version > 0) onSaved();
  }, [state, version, onSaved]);

  const shown = useMemo(() => visibleRows(model, view, version), [model, view, version]);
  const activeRow = Math.min(active.row, Math.max(0, shown.length - 1));
  const facts = model.characteristics[shown[activeRow] ?? -1];
  const column = model.columns[active.column];
  const refusals = model.refusals();
  if (model.columns.length === 0) {
    return (
      <EmptyState title="No sample pieces yet">
        Add the pieces of each stream on the evidence page; then their readings go here.
      </EmptyState>
    );
  }
  return (
    <div className="flex flex-col gap-3">
      <div className="flex flex-wrap items-end gap-3">
        <TextField
          id="sheet-search"
          label="Find"
          type="search"
          value={view.q}
          onChange={(q) => change({ q })}
        />
        <SelectField
          id="sheet-rows"
          label="Rows"
          value={view.rows}
          onChange={(rows) => change({ rows })}
          options={[
            { value: 'all', label: 'All' },
            { value: 'missing', label: 'With readings missing' },
            { value: 'out', label: 'Out of tolerance or undecided' },
            { value: 'gauge', label: 'Without gauge or date' },
          ]}
        />
        {sheet.editable && (
          <>
            <Button weight="plain" onClick={() => setFilling(true)}>
              Gauge and date
            </Button>
            <LinkButton to={importHref}>Import a file</LinkButton>
          </>
        )}
        <DownloadLink href={apiUrl(`/api/submissions/${submissionId}/dimensional-results.csv`)}>
          CSV
        </DownloadLink>
        <DownloadLink href={apiUrl(`/api/submissions/${submissionId}/dimensional-results.xlsx`)}>
          XLSX
        </DownloadLink>
        <p role="status" className="ml-auto self-center text-pencil">
          {sheet.editable ? stateWords[state] : 'Frozen with the signature; shown as submitted'}
        </p>
      </div>
      {state === 'failed' && (
        <Notice
          tone="failure"
          title="The last readings were not saved"
          actions={
            <Button size="small" onClick={queue.flush}>
              Try again
            </Button>
          }
        >
          {reasonOf(queue.failure)} They are kept in this browser.
        </Notice>
      )}
      {model.conflicts.size > 0 && (
        <Notice
          tone="attention"
          title={`${countOf(model.conflicts.size, 'reading was', 'readings were')} changed by someone else meanwhile`}
          actions={
            <>
              <Button size="small" onClick={() => model.settleConflicts('mine')}>
                Take mine
              </Button>
              <Button size="small" weight="plain" onClick={() => model.settleConflicts('theirs')}>
                Keep theirs
              </Button>
            </>
          }
        >
          {[...model.conflicts.values()]
            .slice(0, 5)
            .map((conflict) => conflictInWords(model, conflict))
            .join('; ')}
        </Notice>
      )}
      {refusals.length > 0 && (
        <Notice
          tone="failure"
          title={`${countOf(refusals.length, 'entry is', 'entries are')} no reading and not saved`}
        >
          <ul className="list-disc pl-5">
            {refusals.slice(0, 8).map((refusal) => (
              <li key={`${refusal.characteristicId} ${refusal.pieceId}`}>{refusalInWords(model, refusal)}</li>
            ))}
          </ul>
        </Notice>
      )}
      <MeasurementGrid
        key={`${view.q} ${view.rows}`}
        model={model}
        undo={undo}
        editable={sheet.editable}
        shown={shown}
        active={{ row: activeRow, column: active.column }}
        onActive={setActive}
        onSaveNow={queue.flush}
        announce={announce}
      />
      <p role="status" aria-live="polite" className="min-h-5 text-pencil">
        {said}
      </p>
      {facts && column && (
        <RowPanel
          submissionId={submissionId}
          model={model}
          facts={facts}
          streamId={column.streamId}
          editable={sheet.editable}
        />
      )}
      <FillRowsDialog
        submissionId={submissionId}
        model={model}
        shownIds={shown.map((index) => model.characteristics[index]?.id ?? '')}
        open={filling}
        onClose={() => setFilling(false)}
      />
    </div>
  );
}

function visibleRows(model: SheetModel, view: { q: string; rows: string }, _version: number): number[] {
  const wanted = view.q.trim().toLowerCase();
  return model.characteristics.flatMap((facts, index) => {
    if (wanted !== '' && facts.balloon !== wanted && !facts.description.toLowerCase().includes(wanted))
      return [];
    const rows = model.streams
      .filter((stream) => !stream.blocked)
      .map((stream) => model.row(facts.id, stream.id));
    const judged = facts.kind !== 'reference' && facts.kind !== 'basic';
    if (view.rows === 'missing' && !(judged && rows.some((row) => (row?.n ?? 0) < facts.pieces))) return [];
    if (
      view.rows === 'out' &&
      !rows.some((row) => row?.verdict === 'out-of-tolerance' || row?.verdict === 'undecided')
    )
      return [];
    if (
      view.rows === 'gauge' &&
      !(judged && rows.some((row) => row == null || row.gaugeId === null || row.measuredOn === null))
    )
      return [];
    return [index];
  });
}

const nameOf = (model: SheetModel, place: { characteristicId: string; pieceId: string }) => {
  const balloon = model.characteristics.find((facts) => facts.id === place.characteristicId)?.balloon ?? '';
  const piece = model.columns.find((column) => column.piece.id === place.pieceId)?.piece.label ?? '';
  return `balloon ${balloon}, piece ${piece}`;
};

function conflictInWords(
  model: SheetModel,
  conflict: { characteristicId: string; pieceId: string; now: string | null; wanted: string | null },
): string {
  return `${nameOf(model, conflict)}: now ${conflict.now ?? 'empty'}, yours ${conflict.wanted ?? 'empty'}`;
}

function refusalInWords(
  model: SheetModel,
  refusal: { characteristicId: string; pieceId: string; text: string; reason: string },
): string {
  const where = nameOf(model, refusal);
  return `${where.charAt(0).toUpperCase()}${where.slice(1)}: “${refusal.text}”. ${refusal.reason}`;
}
