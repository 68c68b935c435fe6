import { describe, expect, it } from 'vitest';
import { commandOf } from './table-keys.ts';
import {
  readBlock,
  reduceTable,
  startTable,
  unsavedOf,
  type TableAction,
  type TableState,
} from './table-model.ts';
import { checkRow, emptyRow, tableColumns, type TableRow } from './table-row.ts';

const saved = (id: string, balloon: string, version = 1): TableRow => {
  const row = emptyRow(id, balloon, 'mm');
  return {
    ...row,
    id,
    version,
    cells: { ...row.cells, description: `Feature ${balloon}`, nominal: '25.00', tolerance: '±0.05' },
  };
};
const run = (state: TableState, ...actions: TableAction[]) => actions.reduce(reduceTable, state);
const cellsOf = (state: TableState, column: (typeof tableColumns)[number]) =>
  state.rows.map((row) => row.cells[column]);
const nominal = tableColumns.indexOf('nominal');

describe('the table of characteristics', () => {
  it('lays a pasted block over the cells from the active one on and adds the rows that are missing', () => {
    const state = run(startTable([saved('a', '1')]), {
      type: 'paste',
      place: { row: 0, column: nominal },
      block: readBlock('25\t±0.1\tmm\r\n8\tH7\tmm\r\n'),
    });
    expect(cellsOf(state, 'nominal')).toEqual(['25', '8']);
    expect(cellsOf(state, 'tolerance')).toEqual(['±0.1', 'H7']);
    expect(cellsOf(state, 'balloon')).toEqual(['1', '2']);
  });

  it('undoes and redoes edits, pastes, added and removed rows one by one', () => {
    const start = startTable([saved('a', '1'), saved('b', '2')]);
    const after = run(
      start,
      { type: 'edit', place: { row: 0, column: nominal }, text: '30' },
      { type: 'remove', row: 1 },
      { type: 'add', after: 0 },
    );
    expect(cellsOf(after, 'balloon')).toEqual(['1', '2']);
    expect(after.rows[1]?.id).toBeNull();
    const back = run(after, { type: 'undo' }, { type: 'undo' });
    expect(back.rows.map((row) => row.id)).toEqual(['a', 'b']);
    expect(cellsOf(back, 'nominal')).toEqual(['30', '25.00']);
    expect(cellsOf(run(back, { type: 'undo' }), 'nominal')).toEqual(['25.00', '25.00']);
    expect(unsavedOf(run(back, { type: 'undo' }))).toEqual({ rows: [], removed: [] });
    const again = run(back, { type: 'redo' }, { type: 'redo' });
    expect(again.rows.map((row) => row.id)).toEqual(['a', null]);
  });

  it('knows what the server does not have, and takes over what it stored without losing what was typed since', () => {
    const start = run(startTable([saved('a', '1')]), { type: 'add', after: 0 });
    expect(unsavedOf(start).rows).toEqual([]);
    const [, added] = start.rows;
    if (!added) throw new Error('No row was added.');
    const typed = run(start, { type: 'edit', place: { row: 1, column: nominal }, text: '8' });
    expect(unsavedOf(typed).rows).toHaveLength(1);
    const sent = typed.rows.slice(1);
    const later = run(typed, { type: 'edit', place: { row: 1, column: nominal }, text: '8.5' });
    const stored = run(later, {
      type: 'stored',
      rows: [saved('a', '1'), { ...saved('b', '2'), cells: { ...(typed.rows[1]?.cells ?? added.cells) } }],
      sent,
    });
    expect(stored.rows[1]).toMatchObject({ key: added.key, id: 'b', version: 1 });
    expect(stored.rows[1]?.cells.nominal).toBe('8.5');
    expect(unsavedOf(stored).rows.map((row) => row.id)).toEqual(['b']);
  });

  it('brings a removed row that was saved meanwhile back as a new one', () => {
    const removed = run(startTable([saved('a', '1'), saved('b', '2')]), { type: 'remove', row: 1 });
    const stored = run(removed, { type: 'stored', rows: [saved('a', '1', 1)], sent: [] }, { type: 'undo' });
    expect(stored.rows.map((row) => row.id)).toEqual(['a', null]);
    expect(unsavedOf(stored)).toMatchObject({ removed: [] });
  });

  it('reads quoted cells with tabs and line breaks as a spreadsheet writes them', () => {
    expect(readBlock('1\t"a ""b"""\n2\t"two\nlines"\n')).toEqual([
      ['1', 'a "b"'],
      ['2', 'two lines'],
    ]);
    expect(readBlock('only')).toEqual([['only']]);
  });
});

describe('a row of the table', () => {
  const row = (cells: Partial<TableRow['cells']>): TableRow => {
    const base = saved('a', '1');
    return { ...base, cells: { ...base.cells, ...cells } };
  };

  it('shows its limits as it is typed, exactly', () => {
    expect(checkRow(row({ nominal: '25', tolerance: 'k6' }))).toMatchObject({
      limits: { lower: '25.002', upper: '25.015' },
      faults: [],
    });
    expect(checkRow(row({ nominal: '2.50', tolerance: '+0,2/-0,1' })).limits).toMatchObject({
      lower: '2.40',
      upper: '2.70',
    });
    expect(
      checkRow(row({ nominal: '', tolerance: '0.15', kind: 'geometric', description: 'Flatness' })).input,
    ).toMatchObject({
      tolerance: { form: 'max', upper: '0.15', zeroBound: true },
      geometric: { type: 'flatness' },
    });
  });

  it.each([
    [{ balloon: 'twelve' }, 'balloon'],
    [{ description: '' }, 'description'],
    [{ kind: 'thing' }, 'kind'],
    [{ tolerance: '0.1' }, 'tolerance'],
    [{ nominal: '', tolerance: '±0.1' }, 'nominal'],
    [{ unit: 'furlong' }, 'unit'],
    [{ decimals: '12' }, 'decimals'],
    [{ class: 'important' }, 'class'],
    [{ nominal: '1', tolerance: 'H7', unit: 'in' }, 'tolerance'],
  ] as const)('names the cell that is wrong in %o', (cells, column) => {
    const checked = checkRow(row(cells));
    expect(checked.input).toBeNull();
    expect(checked.faults.map((fault) => fault.column)).toContain(column);
  });
});

describe('a key in the table', () => {
  const press = (
    key: string,
    held: Partial<Record<'ctrlKey' | 'metaKey' | 'altKey' | 'shiftKey', true>> = {},
  ) => commandOf({ key, ctrlKey: false, metaKey: false, altKey: false, shiftKey: false, ...held }, 3);

  it('begins a cell with signs that need AltGr or option', () => {
    expect(press('±', { altKey: true, shiftKey: true })).toEqual({ do: 'type', text: '±' });
    expect(press('µ', { altKey: true, ctrlKey: true })).toEqual({ do: 'type', text: 'µ' });
    expect(press('7')).toEqual({ do: 'type', text: '7' });
  });

  it('leaves the shortcuts of the browser alone', () => {
    expect(press('f', { altKey: true })).toBeNull();
    expect(press('r', { ctrlKey: true })).toBeNull();
    expect(press('z', { metaKey: true, shiftKey: true })).toEqual({ do: 'redo' });
  });
});
