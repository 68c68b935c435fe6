import {
  emptyRow,
  isBlank,
  tableColumns,
  type RowDetails,
  type TableColumn,
  type TableRow,
} from './table-row.ts';

export interface Place {
  readonly row: number;
  readonly column: number;
}

interface Step {
  readonly rows: readonly TableRow[];
  readonly active: Place;
}

/** Rows as they stand on the page, what the server has of them, and the way back. */
export interface TableState {
  readonly rows: readonly TableRow[];
  readonly active: Place;
  /** Rows as last read or saved, by id. */
  readonly saved: ReadonlyMap<string, TableRow>;
  readonly past: readonly Step[];
  readonly future: readonly Step[];
}

export type TableAction =
  | { readonly type: 'move'; readonly place: Place }
  | { readonly type: 'edit'; readonly place: Place; readonly text: string }
  | { readonly type: 'paste'; readonly place: Place; readonly block: readonly (readonly string[])[] }
  | {
      readonly type: 'details';
      readonly key: string;
      readonly cells: Partial<Record<TableColumn, string>>;
      readonly details: RowDetails;
    }
  | { readonly type: 'add'; readonly after: number }
  | { readonly type: 'remove'; readonly row: number }
  | { readonly type: 'undo' }
  | { readonly type: 'redo' }
  | { readonly type: 'stored'; readonly rows: readonly TableRow[]; readonly sent: readonly TableRow[] }
  | { readonly type: 'replace'; readonly rows: readonly TableRow[] }
  /** Takes the versions of these rows as the ones to write over; rows that are gone become new ones. */
  | { readonly type: 'rebase'; readonly rows: readonly TableRow[] };

const mostSteps = 200;
const mostRows = 2000;
let lastKey = 0;

export function startTable(rows: readonly TableRow[]): TableState {
  return { rows, active: { row: 0, column: 0 }, saved: savedOf(rows), past: [], future: [] };
}

const savedOf = (rows: readonly TableRow[]): Map<string, TableRow> =>
  new Map(rows.flatMap((row) => (row.id === null ? [] : [[row.id, row] as const])));

const newKey = (): string => `new-${(lastKey += 1)}`;

function nextBalloon(rows: readonly TableRow[]): string {
  const numbers = rows.map((row) => Number(/^\d+/.exec(row.cells.balloon)?.[0] ?? 0));
  return String(Math.max(0, ...numbers) + 1);
}

function newRow(rows: readonly TableRow[]): TableRow {
  return emptyRow(newKey(), nextBalloon(rows), rows.at(-1)?.cells.unit ?? 'mm');
}

export function reduceTable(state: TableState, action: TableAction): TableState {
  switch (action.type) {
    case 'move':
      return { ...state, active: within(action.place, state.rows.length) };
    case 'edit':
      return edited(state, action.place, action.text);
    case 'paste':
      return pasted(state, action.place, action.block);
    case 'details':
      return changed(
        state,
        state.rows.map((row) =>
          row.key === action.key
            ? { ...row, cells: { ...row.cells, ...action.cells }, details: action.details }
            : row,
        ),
      );
    case 'add': {
      if (state.rows.length >= mostRows) return state;
      const at = Math.min(action.after + 1, state.rows.length);
      const rows = [...state.rows.slice(0, at), newRow(state.rows), ...state.rows.slice(at)];
      return changed(state, rows, { row: at, column: 0 });
    }
    case 'remove':
      return changed(
        state,
        state.rows.filter((_, index) => index !== action.row),
        within({ ...state.active, row: Math.min(action.row, state.rows.length - 2) }, state.rows.length - 1),
      );
    case 'undo':
      return stepped(state, 'past', 'future');
    case 'redo':
      return stepped(state, 'future', 'past');
    case 'stored':
      return stored(state, action.rows, action.sent);
    case 'rebase': {
      const saved = savedOf(action.rows);
      const rows = state.rows.map((row) => {
        const theirs = row.id === null ? undefined : saved.get(row.id);
        return theirs ? { ...row, version: theirs.version } : { ...row, id: null, version: null };
      });
      const mine = new Set(rows.map((row) => row.id));
      return {
        ...state,
        rows: [...rows, ...action.rows.filter((row) => !mine.has(row.id) && !state.saved.has(row.id ?? ''))],
        saved,
      };
    }
    case 'replace':
      return { ...startTable(action.rows), active: within(state.active, action.rows.length) };
  }
}

const within = ({ row, column }: Place, rows: number): Place => ({
  row: Math.max(0, Math.min(row, rows - 1)),
  column: Math.max(0, Math.min(column, tableColumns.length - 1)),
});

function changed(state: TableState, rows: readonly TableRow[], active = state.active): TableState {
  const past = [...state.past.slice(1 - mostSteps), { rows: state.rows, active: state.active }];
  return { ...state, rows, active: within(active, rows.length), past, future: [] };
}

function edited(state: TableState, place: Place, text: string): TableState {
  const row = state.rows[place.row];
  const column = tableColumns[place.column];
  if (!row || !column || row.cells[column] === text) return state;
  const next = { ...row, cells: { ...row.cells, [column]: text } };
  return changed(
    state,
    state.rows.map((other, index) => (index === place.row ? next : other)),
    place,
  );
}

/** A block lies over the cells from the active one on; rows that are missing are added below. */
function pasted(state: TableState, place: Place, block: readonly (readonly string[])[]): TableState {
  const rows = [...state.rows];
  for (const [down, texts] of block.entries()) {
    const at = place.row + down;
    if (at >= mostRows) break;
    const row = rows[at] ?? newRow(rows);
    const cells = { ...row.cells };
    for (const [across, text] of texts.entries()) {
      const column = tableColumns[place.column + across];
      if (column) cells[column] = text.trim();
    }
    rows[at] = { ...row, cells };
  }
  return changed(state, rows, place);
}

function stepped(state: TableState, from: 'past' | 'future', to: 'past' | 'future'): TableState {
  const step = state[from].at(-1);
  if (!step) return state;
  const here = { rows: state.rows, active: state.active };
  return {
    ...state,
    // What was saved meanwhile keeps its identity: undo changes contents, not whose row it is.
    rows: step.rows.map((row) => identified(row, state)),
    active: within(step.active, step.rows.length),
    [from]: state[from].slice(0, -1),
    [to]: [...state[to], here],
  };
}

function identified(row: TableRow, state: TableState): TableRow {
  const now = state.rows.find((other) => other.key === row.key);
  if (now) return { ...row, id: now.id, version: now.version };
  const kept = row.id === null ? undefined : state.saved.get(row.id);
  return kept ? { ...row, version: kept.version } : { ...row, id: null, version: null };
}

/** Takes over ids and versions of what was saved; what was typed meanwhile stays. */
function stored(state: TableState, fresh: readonly TableRow[], sent: readonly TableRow[]): TableState {
  const byBalloon = new Map(fresh.map((row) => [row.cells.balloon, row]));
  const sentOf = new Map(sent.map((row) => [row.key, row]));
  const byId = new Map(fresh.flatMap((row) => (row.id === null ? [] : [[row.id, row] as const])));
  const rows = state.rows.map((row) => {
    const before = sentOf.get(row.key);
    const now = before
      ? byBalloon.get(before.cells.balloon.trim())
      : row.id === null
        ? undefined
        : byId.get(row.id);
    if (!now) return row;
    const untouched = before?.cells === row.cells && before.details === row.details;
    return untouched ? { ...now, key: row.key } : { ...row, id: now.id, version: now.version };
  });
  return { ...state, rows, saved: savedOf(fresh) };
}

const sameContent = (a: TableRow, b: TableRow): boolean =>
  tableColumns.every((column) => a.cells[column] === b.cells[column]) &&
  JSON.stringify(a.details) === JSON.stringify(b.details);

export interface Unsaved {
  readonly rows: readonly TableRow[];
  readonly removed: readonly { readonly id: string; readonly version: number }[];
}

/** What the server does not have yet. */
export function unsavedOf(state: TableState): Unsaved {
  const rows = state.rows.filter((row) => {
    const saved = row.id === null ? undefined : state.saved.get(row.id);
    return saved ? !sameContent(row, saved) : !isBlank(row);
  });
  const present = new Set(state.rows.map((row) => row.id));
  const removed = [...state.saved.values()]
    .filter((row) => !present.has(row.id))
    .map((row) => ({ id: row.id ?? '', version: row.version ?? 0 }));
  return { rows, removed };
}

/** Text of a spreadsheet's clipboard as a block: tabs between cells, quotes around cells with line breaks. */
export function readBlock(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  const cell = /("(?:[^"]|"")*"|[^\t\r\n]*)(\t|\r\n|\r|\n|$)/y;
  while (cell.lastIndex < text.length) {
    const match = cell.exec(text);
    if (!match) break;
    const [, raw = '', end = ''] = match;
    row.push(
      raw.startsWith('"')
        ? raw
            .slice(1, -1)
            .replaceAll('""', '"')
            .replace(/\s*[\r\n]+\s*/g, ' ')
        : raw,
    );
    if (end !== '\t') {
      rows.push(row);
      row = [];
    }
  }
  if (row.length > 0) rows.push(row);
  return rows;
}
