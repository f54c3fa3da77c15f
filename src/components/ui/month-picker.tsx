import { Select } from './select';

type Props = {
  /** 'YYYY-MM', oldest first. */
  months: readonly string[];
  /** Empty where the month in question is none of them. */
  value: string;
  onChange: (month: string) => void;
  format: (month: string) => string;
  label?: string;
};

/** Chooses a month of those that there are; the latest stands on top. */
export function MonthPicker({ months, value, onChange, format, label = 'Month' }: Props) {
  return (
    <Select
      look="picker"
      label={label}
      value={value}
      placeholder="Choose a month"
      onChange={onChange}
      options={[...months].reverse().map((month) => ({ value: month, label: format(month) }))}
    />
  );
}
