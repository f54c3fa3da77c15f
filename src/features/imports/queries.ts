import { queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import type { FilePreview, ImportKind, ImportState, Mapping, rejection } from '../../../shared/imports';
import { apiGet, apiSend, apiUrl } from '../../lib/api';
import { listQuery } from '../../lib/list-query';
import { isSettled } from './import-words';

export type Rejection = z.infer<typeof rejection>;

export const importsQuery = listQuery<ImportState>(['imports', 'list'], '/imports', { limit: 50 });

const FIRST_WAIT_MS = 400;
const LONGEST_WAIT_MS = 3000;

/** Asks again until nothing more will change: soon at first, then at leisure. */
export const importQuery = (id: string) =>
  queryOptions({
    queryKey: ['imports', 'detail', id],
    queryFn: ({ signal }) => apiGet<ImportState>(`/imports/${id}`, {}, signal),
    refetchInterval: ({ state }) =>
      state.data && !isSettled(state.data)
        ? Math.min(FIRST_WAIT_MS * 1.2 ** state.dataUpdateCount, LONGEST_WAIT_MS)
        : false,
  });

export const rejectionsQuery = (id: string) =>
  listQuery<Rejection>(['imports', 'rejections', id], `/imports/${id}/rejections`);

export const rejectedCsvUrl = (id: string): string => apiUrl(`/imports/${id}/rejected.csv`);

export function previewFile(file: File, kind: ImportKind): Promise<FilePreview> {
  const form = new FormData();
  form.set('kind', kind);
  form.set('file', file);
  return apiSend<FilePreview>('POST', '/imports/preview', form);
}

type Start = { spoolId: string; kind: ImportKind; mapping: Mapping; isDryRun: boolean };

export function startImport({ spoolId, kind, mapping, isDryRun }: Start): Promise<ImportState> {
  const form = new FormData();
  form.set('kind', kind);
  form.set('spoolId', spoolId);
  form.set('mapping', JSON.stringify(mapping));
  form.set('dryRun', String(isDryRun));
  return apiSend<ImportState>('POST', '/imports', form);
}

export const undoImport = (id: string): Promise<ImportState> =>
  apiSend<ImportState>('POST', `/imports/${id}/undo`);
