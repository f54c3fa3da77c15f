import { Link } from 'react-router';
import type { ImportState } from '../../../shared/imports';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { KINDS, nameOf, stateWords } from './import-words';

export function importColumns(formats: Formats): Column<ImportState>[] {
  const columns: Column<ImportState>[] = [
    {
      id: 'name',
      header: 'File',
      value: nameOf,
      cell: (state) => (
        <>
          <Link to={paths.import(state.id)}>{nameOf(state)}</Link>
          <span className="block text-sm text-dim">{KINDS[state.kind].file}</span>
        </>
      ),
      isRowHeader: true,
      className: 'min-w-[11rem]',
    },
    {
      id: 'when',
      header: 'When',
      value: ({ createdAt }) => createdAt,
      cell: ({ createdAt, startedBy }) => (
        <>
          {formats.instant(createdAt)}
          {startedBy && <span className="block text-sm text-dim">{startedBy}</span>}
        </>
      ),
      className: 'whitespace-nowrap',
    },
    { id: 'who', header: 'Who', value: ({ startedBy }) => startedBy, only: 'spreadsheet' },
    {
      id: 'state',
      header: 'What became of it',
      value: (state) => stateWords(state, formats),
      cell: (state) => (
        <>
          <span className={state.status === 'failed' || state.rejected > 0 ? 'text-oxide' : ''}>
            {stateWords(state, formats)}
          </span>
          {state.error && <span className="block text-sm text-dim">{state.error}</span>}
          {state.status === 'done' && !state.isDryRun && state.analysis !== 'ready' && (
            <span className="block text-sm text-dim">figures do not include it yet</span>
          )}
        </>
      ),
      className: 'min-w-[14rem]',
    },
    {
      id: 'rows',
      header: 'Rows',
      value: ({ rowsRead }) => rowsRead,
      cell: ({ rowsRead }) => formats.count(rowsRead),
      align: 'right',
    },
  ];
  return columns.map((column) => ({ ...column, isSortable: false }));
}
