import type { ReactNode } from 'react';
import { Link } from 'react-router';
import type { ImportState } from '../../../shared/imports';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { KINDS } from './import-words';

type Props = { state: ImportState; formats: Formats; links?: ReactNode };

/** What became of the records, and what is worth knowing of them. */
export function Outcome({ state, formats, links }: Props) {
  const { kind, isDryRun, remarks } = state;
  const noun = `${KINDS[kind].one}s`;
  return (
    <div className="flex flex-col gap-4">
      <dl className="grid max-w-[44rem] grid-cols-2 gap-x-6 gap-y-3 sm:grid-cols-4">
        <Count
          name={isDryRun ? `new ${noun}, would be` : `new ${noun}`}
          count={state.created}
          formats={formats}
        />
        <Count name={isDryRun ? 'changed, would be' : 'changed'} count={state.updated} formats={formats} />
        <Count name="as they were" count={state.unchanged} formats={formats} />
        <Count name="rejected" count={state.rejected} formats={formats} isBad />
      </dl>
      {remarks.length > 0 && (
        <ul className="flex max-w-[44rem] flex-col gap-1">
          {remarks.map(({ kind: about, text, count }) => (
            <li key={about} className="grid grid-cols-[4.5rem_1fr] gap-x-3">
              <span className="text-right font-label">{formats.count(count)}</span>
              <span>{text}</span>
            </li>
          ))}
        </ul>
      )}
      {links}
    </div>
  );
}

type CountProps = { name: string; count: number; formats: Formats; isBad?: boolean };

function Count({ name, count, formats, isBad = false }: CountProps) {
  return (
    <div className="flex flex-col-reverse border-l-2 border-rule pl-3">
      <dt className="text-sm text-dim">{name}</dt>
      <dd className={`text-finding font-heading ${isBad && count > 0 ? 'text-oxide' : ''}`}>
        {formats.count(count)}
      </dd>
    </div>
  );
}

/** Where to look next, once the figures include it. */
export function NextLinks({ state, mayRate }: { state: ImportState; mayRate: boolean }) {
  if (state.status !== 'done' || state.isDryRun || state.analysis !== 'ready') return null;
  return (
    <p className="flex flex-wrap gap-x-5 gap-y-1">
      {mayRate && <Link to={paths.month()}>See this month with it</Link>}
      {state.kind === 'repairs' && <Link to={paths.repairs()}>See the repairs</Link>}
      {state.kind === 'parts' && <Link to={paths.parts()}>See the parts</Link>}
    </p>
  );
}
