import { useQueryClient } from '@tanstack/react-query';
import type { CharacteristicsResponse } from '@trammel/shared/characteristics';
import { useCallback, useEffect, useRef, useState, type Dispatch } from 'react';
import { ApiProblem, NetworkFailure, reasonOf } from '../../lib/api-problem.ts';
import type { AutosaveState } from '../../lib/autosave.ts';
import { characteristicsQuery, saveCharacteristics } from './api.ts';
import { unsavedOf, type TableAction, type TableState } from './table-model.ts';
import { checkRow, columnOf, rowOf, type RowFault, type TableRow } from './table-row.ts';

const delayMs = 1200;
const retryMs = 5000;

export interface TableSaving {
  readonly state: AutosaveState;
  readonly savedAt: Date | null;
  /** Refusals of the server, by key of the row. */
  readonly refused: ReadonlyMap<string, readonly RowFault[]>;
  readonly failure: string | null;
  /** The table as someone else left it, when it moved on under this one. */
  readonly theirs: CharacteristicsResponse | null;
  readonly takeTheirs: () => void;
  /** Goes on from their versions and writes these rows over theirs. */
  readonly keepMine: () => void;
  readonly saveNow: () => void;
}

/** Saves complete rows a moment after the last change; what is incomplete waits on the page until it is mended. */
export function useTableSaving(
  revisionId: string,
  table: TableState,
  dispatch: Dispatch<TableAction>,
  enabled: boolean,
): TableSaving {
  const client = useQueryClient();
  const [state, setState] = useState<AutosaveState>('untouched');
  const [savedAt, setSavedAt] = useState<Date | null>(null);
  const [refused, setRefused] = useState<ReadonlyMap<string, readonly RowFault[]>>(new Map());
  const [failure, setFailure] = useState<string | null>(null);
  const [theirs, setTheirs] = useState<CharacteristicsResponse | null>(null);
  const [attempt, setAttempt] = useState(0);
  const busy = useRef(false);
  const latest = useRef(table);
  useEffect(() => {
    latest.current = table;
  }, [table]);

  const save = useCallback(async () => {
    if (busy.current) return;
    const unsaved = unsavedOf(latest.current);
    const ready = unsaved.rows.flatMap((row) => {
      const { input } = checkRow(row);
      return input ? [{ row, body: { ...input, id: row.id, version: row.version } }] : [];
    });
    if (ready.length === 0 && unsaved.removed.length === 0) {
      setState(unsaved.rows.length > 0 ? 'waiting' : 'saved');
      return;
    }
    busy.current = true;
    setState('saving');
    const sent: TableRow[] = ready.map(({ row }) => row);
    try {
      const answer = await saveCharacteristics(revisionId, {
        rows: ready.map(({ body }) => body),
        removed: [...unsaved.removed],
      });
      client.setQueryData(characteristicsQuery(revisionId).queryKey, answer);
      dispatch({ type: 'stored', rows: answer.items.map(rowOf), sent });
      void client.invalidateQueries({ queryKey: ['revision', revisionId] });
      setRefused(new Map());
      setFailure(null);
      setState('saved');
      setSavedAt(new Date());
    } catch (error) {
      if (error instanceof ApiProblem && error.is('stale-version')) {
        setTheirs(error.problem.current as CharacteristicsResponse);
        setState('conflict');
      } else if (error instanceof ApiProblem && error.is('invalid')) {
        setRefused(faultsByRow(error, sent));
        setFailure(reasonOf(error));
        setState('refused');
      } else if (error instanceof NetworkFailure) {
        setState('offline');
        setTimeout(() => setAttempt((before) => before + 1), retryMs);
      } else {
        setFailure(reasonOf(error));
        setState('refused');
      }
    } finally {
      busy.current = false;
    }
  }, [client, dispatch, revisionId]);

  useEffect(() => {
    if (!enabled || theirs !== null) return;
    const { rows, removed } = unsavedOf(table);
    if (rows.length === 0 && removed.length === 0) return;
    const timer = setTimeout(() => void save(), delayMs);
    return () => clearTimeout(timer);
  }, [enabled, table, save, theirs, attempt]);

  return {
    state,
    savedAt,
    refused,
    failure,
    theirs,
    keepMine: () => {
      if (theirs) dispatch({ type: 'rebase', rows: theirs.items.map(rowOf) });
      setTheirs(null);
      setState('waiting');
    },
    takeTheirs: () => {
      if (theirs) {
        client.setQueryData(characteristicsQuery(revisionId).queryKey, theirs);
        dispatch({ type: 'replace', rows: theirs.items.map(rowOf) });
      }
      setTheirs(null);
      setState('untouched');
    },
    saveNow: () => void save(),
  };
}

/** `/rows/3/tolerance/upper` names the fourth row that was sent. */
function faultsByRow(error: ApiProblem, sent: readonly TableRow[]): Map<string, RowFault[]> {
  const faults = new Map<string, RowFault[]>();
  for (const { pointer, detail } of error.problem.errors ?? []) {
    const [, , index = '', field = ''] = pointer.split('/');
    const row = sent[Number(index)];
    if (row)
      faults.set(row.key, [...(faults.get(row.key) ?? []), { column: columnOf(field), message: detail }]);
  }
  return faults;
}
