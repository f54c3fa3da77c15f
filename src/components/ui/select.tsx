import { Select as Radix } from 'radix-ui';
import { classNames } from '../../lib/class-names';
import { Check, ChevronDown } from './icons';

export type Option = { value: string; label: string; isDisabled?: boolean };

type Props = {
  value: string;
  onChange: (value: string) => void;
  options: readonly Option[];
  /** Needed where no Field gives the control its label. */
  label?: string;
  placeholder?: string;
  /** `picker`: blue words beside a page's title. */
  look?: 'field' | 'picker';
  isDisabled?: boolean;
  className?: string;
  id?: string;
  'aria-describedby'?: string | undefined;
  'aria-invalid'?: true | undefined;
};

/** Radix knows no empty value; this stands for it inside. */
const EMPTY = '\u0000';

const TRIGGERS = {
  field: 'control w-full justify-between',
  picker: 'min-h-11 desk:min-h-7 font-label text-layout rounded-bench',
};

export function Select({
  value,
  onChange,
  options,
  label,
  placeholder,
  look = 'field',
  isDisabled,
  ...rest
}: Props) {
  const { className, ...control } = rest;
  const hasEmpty = options.some((option) => option.value === '');
  return (
    <Radix.Root
      value={value === '' && hasEmpty ? EMPTY : value}
      onValueChange={(next) => onChange(next === EMPTY ? '' : next)}
      disabled={isDisabled ?? false}
    >
      <Radix.Trigger
        aria-label={label}
        className={classNames(
          'inline-flex min-w-0 items-center gap-1.5 text-left',
          TRIGGERS[look],
          className,
        )}
        {...control}
      >
        <span className="truncate">
          <Radix.Value placeholder={placeholder} />
        </span>
        <Radix.Icon className="shrink-0">
          <ChevronDown />
        </Radix.Icon>
      </Radix.Trigger>
      <Radix.Portal>
        <Radix.Content
          position="popper"
          sideOffset={4}
          className="z-50 max-h-[min(24rem,var(--radix-select-content-available-height))] min-w-[var(--radix-select-trigger-width)] overflow-hidden rounded-bench border border-edge bg-sheet text-ink shadow-bench"
        >
          <Radix.Viewport>
            {options.map((option) => (
              <Radix.Item
                key={option.value}
                value={option.value === '' ? EMPTY : option.value}
                disabled={option.isDisabled ?? false}
                className="flex min-h-11 cursor-pointer items-center justify-between gap-4 border-l-3 border-transparent px-3 outline-none select-none data-[disabled]:text-dim data-[highlighted]:border-layout data-[highlighted]:bg-wash data-[state=checked]:font-heading desk:min-h-8"
              >
                <Radix.ItemText>{option.label}</Radix.ItemText>
                <Radix.ItemIndicator>
                  <Check />
                </Radix.ItemIndicator>
              </Radix.Item>
            ))}
          </Radix.Viewport>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
