import { fireEvent, render, screen, within } from '@testing-library/react';
import { createMemoryRouter, RouterProvider } from 'react-router';
import { describe, expect, it, vi } from 'vitest';
import { DataTable, type Column } from '../../src/components/ui/data-table';

type Row = { id: string; name: string; hours: number | null };

const ROWS: Row[] = [
  { id: '1', name: 'Belt 10', hours: 40 },
  { id: '2', name: 'Belt 9', hours: 300 },
  { id: '3', name: '=Clutch', hours: null },
];
const COLUMNS: Column<Row>[] = [
  { id: 'name', header: 'Part', value: (row) => row.name, isRowHeader: true },
  {
    id: 'hours',
    header: 'Hours',
    value: (row) => row.hours,
    cell: (row) => `${row.hours ?? '–'} h`,
    align: 'right',
  },
  { id: 'secret', header: 'Raw', value: (row) => row.id, only: 'spreadsheet' },
];

function show(props: Partial<Parameters<typeof DataTable<Row>>[0]> = {}, entry = '/') {
  const router = createMemoryRouter(
    [
      {
        path: '/',
        element: (
          <DataTable caption="Parts" rows={ROWS} columns={COLUMNS} rowId={(row) => row.id} {...props} />
        ),
      },
    ],
    { initialEntries: [entry] },
  );
  render(<RouterProvider router={router} />);
  return router;
}

const order = () => screen.getAllByRole('rowheader').map((cell) => cell.textContent);
const header = (name: string) => screen.getByRole('columnheader', { name });

describe('DataTable', () => {
  it('is named by its caption and shows rows as given', () => {
    show();
    expect(screen.getByRole('table', { name: 'Parts' })).toBeTruthy();
    expect(order()).toEqual(['Belt 10', 'Belt 9', '=Clutch']);
    expect(screen.queryByText('Raw')).toBeNull();
  });

  it('sorts as people count, and says which way', () => {
    show();
    fireEvent.click(within(header('Part')).getByRole('button'));
    expect(order()).toEqual(['=Clutch', 'Belt 9', 'Belt 10']);
    expect(header('Part').getAttribute('aria-sort')).toBe('ascending');
    fireEvent.click(within(header('Hours')).getByRole('button'));
    expect(order()).toEqual(['Belt 9', 'Belt 10', '=Clutch']);
    expect(header('Hours').getAttribute('aria-sort')).toBe('descending');
    expect(header('Part').getAttribute('aria-sort')).toBeNull();
  });

  it('keeps the sort in the address where asked to, and leaves the rest of it alone', () => {
    const router = show({ sortKey: 'sort' }, '/?q=belt&sort=-hours');
    expect(order()).toEqual(['Belt 9', 'Belt 10', '=Clutch']);
    fireEvent.click(within(header('Hours')).getByRole('button'));
    const search = new URLSearchParams(router.state.location.search);
    expect(search.get('sort')).toBe('hours');
    expect(search.get('q')).toBe('belt');
    expect(order()).toEqual(['=Clutch', 'Belt 10', 'Belt 9']);
  });

  it('saves the rows as they are sorted, with formulas made harmless', async () => {
    const blobs: Blob[] = [];
    vi.stubGlobal(
      'URL',
      Object.assign(URL, { createObjectURL: (blob: Blob) => (blobs.push(blob), 'blob:x') }),
    );
    URL.revokeObjectURL = () => undefined;
    HTMLAnchorElement.prototype.click = () => undefined;
    show({ spreadsheet: 'parts', initialSort: { id: 'hours', desc: true } });
    fireEvent.click(screen.getByRole('button', { name: 'Spreadsheet' }));
    const text = new TextDecoder().decode(await blobs[0]?.arrayBuffer());
    expect(text).toBe("Part,Hours,Raw\r\nBelt 9,300,2\r\nBelt 10,40,1\r\n'=Clutch,,3\r\n");
  });

  it('says what is empty, and offers more only where there is more', () => {
    const onMore = vi.fn();
    show({ more: { hasMore: true, isLoading: false, onMore } });
    fireEvent.click(screen.getByRole('button', { name: 'Show more rows' }));
    expect(onMore).toHaveBeenCalledOnce();
  });

  it('shows its empty state in place of a bare head', () => {
    show({ rows: [], empty: <p>No parts yet.</p> });
    expect(screen.getByText('No parts yet.')).toBeTruthy();
    expect(screen.queryByRole('table')).toBeNull();
  });
});
