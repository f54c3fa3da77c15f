import { useId, type ReactNode } from 'react';
import { classNames } from '../../lib/class-names';

/** What a control takes over, so that its label, hint and error are read out with it. */
export type ControlProps = {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
};

type Props = {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
  className?: string;
  children: (control: ControlProps) => ReactNode;
};

/** Joins label, control, hint and error by id. */
export function Field({ label, hint, error, className, children }: Props) {
  const id = useId();
  const described = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ');
  return (
    <div className={classNames('flex min-w-0 flex-col gap-1', className)}>
      <label htmlFor={id} className="text-table font-label">
        {label}
      </label>
      {children({ id, 'aria-describedby': described || undefined, 'aria-invalid': error ? true : undefined })}
      {hint && (
        <p id={`${id}-hint`} className="text-sm text-dim">
          {hint}
        </p>
      )}
      {error && (
        <p id={`${id}-error`} className="text-sm text-oxide" role="alert">
          {error}
        </p>
      )}
    </div>
  );
}
