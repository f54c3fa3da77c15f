import type { ImportState } from '../../../shared/imports';
import type { Formats } from '../../lib/format';
import { ANALYSIS_WORDS, isUnderWay, KINDS, stateWords } from './import-words';

type Props = { state: ImportState; formats: Formats };

/** How far it is, said as it changes: read out politely, and shown as a bar while rows are read. */
export function Progress({ state, formats }: Props) {
  const { rowsRead, rowsTotal } = state;
  return (
    <div>
      <p role="status" className="font-label">
        {wordsOf(state, formats)}
      </p>
      {isUnderWay(state) && (
        <progress
          aria-label="Rows read"
          className="mt-2 h-2 w-full max-w-[30rem] accent-layout"
          {...(rowsTotal ? { max: rowsTotal, value: rowsRead } : {})}
        />
      )}
    </div>
  );
}

function wordsOf(state: ImportState, formats: Formats): string {
  const { one, file } = KINDS[state.kind];
  const said = stateWords(state, formats);
  switch (state.status) {
    case 'queued':
    case 'running':
      return `The ${file} ${state.status === 'queued' ? said : `are ${said}`}.`;
    case 'failed':
      return `It failed: ${state.error ?? 'the reason is in the server’s log'}. Nothing was taken in.`;
    case 'undone':
      return `It was taken back. ${ANALYSIS_WORDS[state.analysis].replace('include it', 'no longer include it')}`;
    case 'done': {
      const rows = formats.counted(state.rowsRead, 'row');
      return state.isDryRun
        ? `Tried with ${rows}: nothing was taken in.`
        : `${rows} read, ${formats.counted(state.created + state.updated, one)} taken in or changed. ${ANALYSIS_WORDS[state.analysis]}`;
    }
  }
}
