import type { ComponentProps } from 'react';
import { classNames } from '../../lib/class-names';

type Look = 'primary' | 'quiet' | 'danger' | 'text';

const LOOKS: Record<Look, string> = {
  primary: 'border border-layout bg-layout text-on-layout px-4 hover:brightness-110',
  quiet: 'border border-edge bg-sheet text-ink px-4 hover:bg-wash',
  danger: 'border border-oxide bg-sheet text-oxide px-4 hover:bg-wash',
  text: 'px-1 -mx-1 text-layout hover:underline underline-offset-3',
};

type Props = ComponentProps<'button'> & {
  look?: Look;
  /** Says that the work is under way, and takes no second press. */
  isBusy?: boolean;
};

export function Button({
  look = 'quiet',
  isBusy = false,
  className,
  disabled,
  type = 'button',
  ...rest
}: Props) {
  return (
    <button
      type={type}
      disabled={disabled || isBusy}
      aria-busy={isBusy || undefined}
      className={classNames(buttonClass(look), 'disabled:opacity-60', className)}
      {...rest}
    />
  );
}

/** The same look for a link. */
export function buttonClass(look: Look = 'quiet'): string {
  return classNames(
    'inline-flex min-h-11 items-center justify-center gap-2 rounded-bench font-label desk:min-h-9 no-underline',
    LOOKS[look],
  );
}
