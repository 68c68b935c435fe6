import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { renderPage } from '../../testing/render.tsx';
import { useUrlState } from '../../lib/use-url-state.ts';
import { DataTable, type DataColumn } from './data-table.tsx';

interface Part {
  id: string;
  balloon: string;
  out: number | null;
}

const rows: Part[] = [
  { id: 'a', balloon: '10', out: 1 },
  { id: 'b', balloon: '2', out: null },
  { id: 'c', balloon: '12a', out: 0 },
];
const columns: DataColumn<Part>[] = [
  { id: 'balloon', header: 'Balloon', sort: (row) => row.balloon, cell: (row) => row.balloon },
  { id: 'out', header: 'Out', sortName: 'outCount', sort: (row) => row.out, cell: (row) => row.out ?? '—' },
  { id: 'note', header: 'Note', cell: () => 'x' },
];

function List({ sortHere, items = rows }: { sortHere: boolean; items?: Part[] }) {
  const [view, change] = useUrlState({ sort: '' });
  return (
    <DataTable
      caption="Rows"
      columns={columns}
      rows={items}
      rowId={(row) => row.id}
      rowHref={(row) => `/rows/${row.id}`}
      sort={view.sort}
      onSort={(sort) => change({ sort })}
      sortHere={sortHere}
      empty={<p>No rows yet: the customer adds them.</p>}
    />
  );
}

const firstCells = () =>
  screen
    .getAllByRole('row')
    .slice(1)
    .map((row) => within(row).getAllByRole('cell')[0]?.textContent);

describe('a table', () => {
  it('sorts as people count, says so, and keeps the order in the address', async () => {
    const user = userEvent.setup();
    const page = renderPage(<List sortHere />);
    expect(firstCells()).toEqual(['10', '2', '12a']);
    await user.click(screen.getByRole('button', { name: 'Balloon' }));
    expect(firstCells()).toEqual(['2', '10', '12a']);
    expect(screen.getByRole('columnheader', { name: 'Balloon' })).toHaveAttribute('aria-sort', 'ascending');
    await user.click(screen.getByRole('button', { name: 'Balloon' }));
    expect(firstCells()).toEqual(['12a', '10', '2']);
    expect(page.address()).toBe('/?sort=-balloon');
    expect(screen.getByRole('columnheader', { name: 'Note' })).not.toHaveAttribute('aria-sort');
  });

  it('leaves the order to the server where the server sorts, in the server’s words', async () => {
    const user = userEvent.setup();
    const page = renderPage(<List sortHere={false} />, { at: '/?sort=-outCount' });
    expect(firstCells()).toEqual(['10', '2', '12a']);
    expect(screen.getByRole('columnheader', { name: 'Out' })).toHaveAttribute('aria-sort', 'descending');
    await user.click(screen.getByRole('button', { name: 'Out' }));
    expect(page.address()).toBe('/?sort=outCount');
  });

  it('is walked with the arrows and opened with Enter', async () => {
    const user = userEvent.setup();
    const page = renderPage(<List sortHere />);
    screen.getByRole('link', { name: '10' }).focus();
    await user.keyboard('{ArrowDown}{ArrowDown}{ArrowDown}{ArrowUp}');
    expect(screen.getByRole('link', { name: '2' })).toHaveFocus();
    await user.keyboard('{End}{Enter}');
    expect(page.address()).toBe('/rows/c');
  });

  it('opens the row that is clicked anywhere', async () => {
    const user = userEvent.setup();
    const page = renderPage(<List sortHere />);
    await user.click(screen.getAllByText('x')[1] ?? document.body);
    expect(page.address()).toBe('/rows/b');
  });

  it('says what comes next when it is empty', () => {
    renderPage(<List sortHere items={[]} />);
    expect(screen.queryByRole('table')).not.toBeInTheDocument();
    expect(screen.getByText('No rows yet: the customer adds them.')).toBeVisible();
  });
});
