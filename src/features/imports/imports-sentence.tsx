import type { ImportState } from '../../../shared/imports';
import { Finding, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { isUnderWay, KINDS, nameOf } from './import-words';

type Props = { rows: readonly ImportState[]; formats: Formats };

/** What came in last, and what of it waits to be mended. */
export function ImportsSentence({ rows, formats }: Props) {
  const last = rows.find(({ isDryRun, status }) => !isDryRun && status !== 'undone');
  if (!last) return null;
  const { one } = KINDS[last.kind];
  if (isUnderWay(last)) return <Finding>{nameOf(last)} is on its way in.</Finding>;
  if (last.status === 'failed') {
    return (
      <Finding>
        The last file, {nameOf(last)}, <Over>failed</Over>; nothing of it was taken in.
      </Finding>
    );
  }
  return (
    <Finding>
      The last file, {nameOf(last)}, brought <Strong>{formats.counted(last.created, `new ${one}`)}</Strong>
      {last.updated > 0 && ` and changed ${formats.count(last.updated)}`}
      {last.rejected > 0 ? (
        <>
          ; <Over>{formats.count(last.rejected)} rejected</Over> {last.rejected === 1 ? 'waits' : 'wait'} to
          be mended.
        </>
      ) : (
        '; nothing was rejected.'
      )}
    </Finding>
  );
}
