import { useId } from 'react';
import { TextInput } from './text-input';

type Props = {
  from: string | undefined;
  to: string | undefined;
  onChange: (change: { from?: string | undefined; to?: string | undefined }) => void;
  /** What the days are of: "Work done". */
  label: string;
};

/** Days between which something happened; both belong to it, and either may be left open. */
export function DayRange({ from, to, onChange, label }: Props) {
  return (
    <fieldset className="flex flex-wrap items-center gap-x-2 gap-y-1">
      <legend className="float-left mr-2 text-table text-dim max-sm:w-full">{label}</legend>
      <Day label="from" value={from} onChange={(day) => onChange({ from: day })} />
      <Day label="to" value={to} onChange={(day) => onChange({ to: day })} />
    </fieldset>
  );
}

type DayProps = { label: string; value: string | undefined; onChange: (day: string | undefined) => void };

function Day({ label, value, onChange }: DayProps) {
  const id = useId();
  return (
    <span className="inline-flex items-center gap-1.5">
      <label htmlFor={id} className="text-table text-dim max-sm:w-9">
        {label}
      </label>
      <TextInput
        // Another day in the address is another field; while a year is typed, the field keeps what is typed.
        key={value ?? ''}
        id={id}
        type="date"
        className="w-[9.5rem] text-table"
        defaultValue={value ?? ''}
        onChange={({ target }) => {
          if (target.value === '' ? target.validity.valid : target.value >= '1900')
            onChange(target.value || undefined);
        }}
      />
    </span>
  );
}
