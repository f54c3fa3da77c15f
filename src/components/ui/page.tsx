import type { ReactNode } from 'react';

type Props = {
  title: ReactNode;
  /** The same in plain text, for the browser's tab, where the title is more than text. */
  documentTitle?: string;
  /** Choices that say what the page is about: month, model, clock. They stand beside the title. */
  pickers?: ReactNode;
  /** One short remark beside the pickers. */
  aside?: ReactNode;
  actions?: ReactNode;
  /** The finding in one sentence, as a `Finding`. */
  finding?: ReactNode;
  children?: ReactNode;
};

/** Every page: title, scribe line, the sentence, then the picture and the rows. */
export function Page({ title, documentTitle, pickers, aside, actions, finding, children }: Props) {
  return (
    <div className="flex flex-col gap-6">
      <title>{`${documentTitle ?? (typeof title === 'string' ? title : '')} · Witness Mark`}</title>
      <header>
        <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
          <h1 tabIndex={-1} className="text-title font-heading outline-none">
            {title}
          </h1>
          {pickers && <div className="flex flex-wrap items-baseline gap-x-4">{pickers}</div>}
          {aside && <p className="text-sm text-dim">{aside}</p>}
          {actions && (
            <div className="ml-auto flex flex-wrap items-center gap-x-4 gap-y-2 text-table" data-screen-only>
              {actions}
            </div>
          )}
        </div>
        <div className="scribe mt-2.5" aria-hidden="true" />
      </header>
      {finding}
      {children}
    </div>
  );
}
