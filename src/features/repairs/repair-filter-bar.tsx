import { Link } from 'react-router';
import type { Named } from '../../../shared/basics';
import { DayRange } from '../../components/ui/day-range';
import { SearchBox } from '../../components/ui/search-box';
import { Select } from '../../components/ui/select';
import { paths } from '../../paths';
import { hasFilters, type RepairFilters } from './repair-filters';

type Props = { filters: RepairFilters; models: readonly Named[]; onChange: (changes: RepairFilters) => void };

/** One box for words, then when, which model, and whether it came back. */
export function RepairFilterBar({ filters, models, onChange }: Props) {
  return (
    <div className="mb-4 flex flex-wrap items-center gap-x-5 gap-y-2" data-screen-only>
      <SearchBox
        key={filters.q ?? ''}
        label="Number, name, words"
        value={filters.q ?? ''}
        onSearch={(q) => onChange({ q })}
      />
      <DayRange
        label="Done"
        from={filters.from}
        to={filters.to}
        onChange={(days) => onChange(cleared(days))}
      />
      <Select
        look="picker"
        label="Model"
        value={filters.modelId ?? ''}
        onChange={(modelId) => onChange({ modelId })}
        options={[
          { value: '', label: 'all models' },
          ...models.map(({ id, name }) => ({ value: id, label: name })),
        ]}
      />
      <Select
        look="picker"
        label="Came back"
        value={filters.cameBack ?? ''}
        onChange={(cameBack) => onChange({ cameBack })}
        options={[
          { value: '', label: 'came back or not' },
          { value: 'yes', label: 'came back' },
          { value: 'no', label: 'did not come back' },
        ]}
      />
      {hasFilters(filters) && (
        <Link to={paths.repairs()} className="inline-flex min-h-11 items-center text-table desk:min-h-7">
          Show all
        </Link>
      )}
    </div>
  );
}

/** An emptied day goes out of the address. */
const cleared = (days: { from?: string | undefined; to?: string | undefined }): RepairFilters =>
  Object.fromEntries(Object.entries(days).map(([name, day]) => [name, day ?? '']));
