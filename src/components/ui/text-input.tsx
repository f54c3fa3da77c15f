import type { ComponentProps } from 'react';
import { classNames } from '../../lib/class-names';

export function TextInput({ className, ...rest }: ComponentProps<'input'>) {
  return <input className={classNames('control w-full', className)} {...rest} />;
}

export function TextArea({ className, rows = 4, ...rest }: ComponentProps<'textarea'>) {
  return <textarea rows={rows} className={classNames('control w-full', className)} {...rest} />;
}

type CheckboxProps = Omit<ComponentProps<'input'>, 'type'> & { label: string };

/** A square that takes a tick, with its words beside it. */
export function Checkbox({ label, className, ...rest }: CheckboxProps) {
  return (
    <label className={classNames('inline-flex min-h-11 items-center gap-2 desk:min-h-8', className)}>
      <input type="checkbox" className="size-[18px] accent-layout" {...rest} />
      {label}
    </label>
  );
}
