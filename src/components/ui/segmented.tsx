import { useId } from 'react';

type Props<Value extends string> = {
  label: string;
  value: Value;
  onChange: (value: Value) => void;
  options: readonly { value: Value; label: string }[];
};

/** Two to four choices in a row; radio buttons underneath, so that the arrow keys work. */
export function Segmented<Value extends string>({ label, value, onChange, options }: Props<Value>) {
  const name = useId();
  return (
    <fieldset className="inline-flex w-fit flex-wrap self-start rounded-bench border border-edge bg-sheet">
      <legend className="sr-only">{label}</legend>
      {options.map((option) => (
        <label
          key={option.value}
          className="relative inline-flex min-h-11 cursor-pointer items-center border-b-2 border-transparent px-3 text-table not-first-of-type:border-l not-first-of-type:border-l-rule has-checked:border-b-layout has-checked:bg-wash has-checked:font-heading has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-layout desk:min-h-8"
        >
          <input
            type="radio"
            name={name}
            className="absolute inset-0 cursor-pointer opacity-0"
            checked={option.value === value}
            onChange={() => onChange(option.value)}
          />
          {option.label}
        </label>
      ))}
    </fieldset>
  );
}
