import type { PartLife } from '../../../shared/parts';
import type { Column } from '../../components/ui/data-table';
import type { Ages } from '../../lib/ages';
import type { Formats } from '../../lib/format';

export type LifeTableRow = PartLife['kaplanMeier'][number] & { number: string | null };

/** The curve's steps. */
export function lifeColumns(ages: Ages, formats: Formats, isApart: boolean): Column<LifeTableRow>[] {
  const number: Column<LifeTableRow> = { id: 'number', header: 'Part number', value: (row) => row.number };
  return [
    ...(isApart ? [number] : []),
    {
      id: 'age',
      header: `Age, ${ages.unit}`,
      value: (row) => ages.inUnit(row.time),
      cell: (row) => ages.of(row.time),
      align: 'right',
      isRowHeader: true,
    },
    {
      id: 'running',
      header: 'Running before',
      value: (row) => row.atRisk,
      cell: (row) => formats.count(row.atRisk),
      align: 'right',
    },
    {
      id: 'failed',
      header: 'Failed here',
      value: (row) => row.failures,
      cell: (row) => formats.count(row.failures),
      align: 'right',
    },
    {
      id: 'share',
      header: 'Still running after',
      value: (row) => row.survival,
      cell: (row) => formats.percent(row.survival),
      align: 'right',
    },
    {
      id: 'limits',
      header: '95\u202f% limits',
      value: (row) => row.lower,
      cell: (row) => (row.lower === null || row.upper === null ? '–' : formats.percentRange(row)),
      align: 'right',
      only: 'screen',
      isSortable: false,
    },
    { id: 'lower', header: 'Limit below', value: (row) => row.lower, only: 'spreadsheet' },
    { id: 'upper', header: 'Limit above', value: (row) => row.upper, only: 'spreadsheet' },
  ];
}
