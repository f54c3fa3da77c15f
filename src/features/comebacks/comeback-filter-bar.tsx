import { useSuspenseQuery } from '@tanstack/react-query';
import { DayRange } from '../../components/ui/day-range';
import { Segmented } from '../../components/ui/segmented';
import { Select } from '../../components/ui/select';
import { STATUS_OPTIONS, type ComebackFilters } from './comeback-filters';
import { technicianRatesQuery } from './queries';

type Props = {
  filters: ComebackFilters;
  status: string;
  hasTechnicians: boolean;
  onChange: (changes: Record<string, string | undefined>) => void;
};

/** What is shown: how far it is decided, of which work, whose. */
export function ComebackFilterBar({ filters, status, hasTechnicians, onChange }: Props) {
  return (
    <div className="mb-4 flex flex-wrap items-center gap-x-5 gap-y-2" data-screen-only>
      <Segmented
        label="Which comebacks"
        value={status}
        options={STATUS_OPTIONS}
        onChange={(next) => onChange({ status: next })}
      />
      <DayRange label="First repair done" from={filters.from} to={filters.to} onChange={onChange} />
      {hasTechnicians && (
        <TechnicianPicker
          value={filters.technicianId ?? ''}
          onChange={(technicianId) => onChange({ technicianId: technicianId || undefined })}
        />
      )}
    </div>
  );
}

function TechnicianPicker({ value, onChange }: { value: string; onChange: (id: string) => void }) {
  const { data } = useSuspenseQuery(technicianRatesQuery({}));
  const people = [...data.data].sort((a, b) => a.label.localeCompare(b.label));
  return (
    <Select
      look="picker"
      label="Who did the first repair"
      value={value}
      onChange={onChange}
      options={[
        { value: '', label: 'everybody’s work' },
        ...people.map(({ key, label }) => ({ value: key, label })),
      ]}
    />
  );
}
