import type { ImportKind, ImportState } from '../../../shared/imports';
import type { Formats } from '../../lib/format';

/** What each kind of file is, and what one record of it is. */
export const KINDS: Record<ImportKind, { file: string; one: string; about: string }> = {
  repairs: {
    file: 'closed repairs',
    one: 'repair',
    about: 'One row for each part or labor line; only a number and the day it was closed must be there.',
  },
  units: {
    file: 'register of machines',
    one: 'machine',
    about: 'Machines you sold or look after: they count as seen even while nothing breaks.',
  },
  parts: {
    file: 'parts list',
    one: 'part',
    about: 'Which number is what, and which newer number took its place.',
  },
};

const SOURCES: Record<ImportState['source'], string> = {
  file: 'a file',
  batch: 'another program',
  shell: 'the command line',
};

export const KIND_OPTIONS = (Object.keys(KINDS) as ImportKind[]).map((value) => ({
  value,
  label: KINDS[value].file,
}));

/** How an import is called: by its file, else by where it came from. */
export const nameOf = ({ fileName, source }: Pick<ImportState, 'fileName' | 'source'>): string =>
  fileName ?? `From ${SOURCES[source]}`;

export const isUnderWay = ({ status }: ImportState): boolean => status === 'queued' || status === 'running';

/** Nothing is going to change by itself any more. */
export const isSettled = (state: ImportState): boolean =>
  !isUnderWay(state) && (state.isDryRun || (state.analysis !== 'pending' && state.analysis !== 'running'));

/** "120 new, 3 changed, 40 as before, 2 rejected" */
export function countsOf(state: ImportState, formats: Formats): string {
  const counts: [number, string][] = [
    [state.created, 'new'],
    [state.updated, 'changed'],
    [state.unchanged, 'as before'],
    [state.rejected, 'rejected'],
  ];
  const said = counts
    .filter(([count]) => count > 0)
    .map(([count, word]) => `${formats.count(count)} ${word}`);
  return said.length === 0 ? 'no rows' : said.join(', ');
}

/** Where an import stands, in words. */
export function stateWords(state: ImportState, formats: Formats): string {
  const { status, isDryRun, rowsRead, rowsTotal } = state;
  switch (status) {
    case 'queued':
      return 'waits for its turn';
    case 'running':
      return rowsTotal === null
        ? `being read, ${formats.counted(rowsRead, 'row')} so far`
        : `being read, row ${formats.count(rowsRead)} of ${formats.count(rowsTotal)}`;
    case 'failed':
      return 'failed, nothing was taken in';
    case 'undone':
      return 'taken back';
    case 'done':
      return isDryRun ? `only tried: ${countsOf(state, formats)}` : countsOf(state, formats);
  }
}

export const ANALYSIS_WORDS: Record<ImportState['analysis'], string> = {
  pending: 'The figures will be worked out anew in a moment.',
  running: 'The figures are being worked out anew.',
  ready: 'The figures include it.',
  failed: 'The figures could not be worked out anew; the earlier ones stand. The next import tries again.',
};
