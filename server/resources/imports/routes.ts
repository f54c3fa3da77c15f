import type { Request } from 'express';
import { pipeline } from 'node:stream/promises';
import { idParams, pageQuery } from '../../../shared/basics';
import {
  createImportForm,
  filePreview,
  importList,
  importState,
  previewForm,
  rejectionList,
} from '../../../shared/imports';
import type { Deps } from '../../deps';
import { invalid } from '../../http/errors';
import { route, type Route } from '../../http/route';
import { readImport } from '../../imports/import-state';
import { rejectedCsv } from '../../imports/rejected-csv';
import { undoImport } from '../../imports/undo-import';
import { receiveFile } from './receive-file';
import { listImports, listRejections, previewUpload, startImport, type Upload } from './service';

const TAG = 'imports';
const READ = { area: 'imports', verb: 'read' } as const;
const WRITE = { area: 'imports', verb: 'write' } as const;

/** Files of records: the first look, the import, what became of it, and the way back. */
export function importRoutes(deps: Deps): Route[] {
  const before = receiveFile(deps.config.dataDir);
  return [
    route({
      method: 'post',
      path: '/imports/preview',
      tag: TAG,
      summary: 'Look at a file (multipart: file, kind) without importing it',
      access: WRITE,
      before,
      body: previewForm,
      answer: filePreview,
      handle: ({ actor, body, request }) => previewUpload(deps, actor, requireUpload(request), body.kind),
    }),
    route({
      method: 'post',
      path: '/imports',
      tag: TAG,
      summary: 'Import a file (multipart: file or spoolId, kind, mapping as JSON, dryRun)',
      access: WRITE,
      before,
      body: createImportForm,
      answer: importState,
      status: 202,
      handle: async ({ actor, body, request, response }) => {
        const state = await startImport(deps, actor, request.file, body);
        response.location(`/api/v1/imports/${state.id}`);
        return state;
      },
    }),
    route({
      method: 'get',
      path: '/imports',
      tag: TAG,
      summary: 'Imports, the latest first',
      access: READ,
      query: pageQuery,
      answer: importList,
      handle: ({ actor, query }) => listImports(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/imports/:id',
      tag: TAG,
      summary: 'How far an import is, and whether the figures include it',
      access: READ,
      params: idParams,
      answer: importState,
      handle: ({ actor, params }) => readImport(deps.database, actor.shopId, params.id),
    }),
    route({
      method: 'get',
      path: '/imports/:id/rejections',
      tag: TAG,
      summary: 'Rows that did not go in, what is wrong and how it is mended',
      access: READ,
      params: idParams,
      query: pageQuery,
      answer: rejectionList,
      handle: ({ actor, params, query }) => listRejections(deps, actor, params.id, query),
    }),
    route({
      method: 'get',
      path: '/imports/:id/rejected.csv',
      tag: TAG,
      summary: 'The rejected rows as they stood, to correct and send again',
      access: READ,
      params: idParams,
      handle: async ({ actor, params, response }) => {
        const state = await readImport(deps.database, actor.shopId, params.id);
        response.type('text/csv; charset=utf-8').attachment(`rejected-${state.id}.csv`);
        await pipeline(rejectedCsv(deps.database, actor.shopId, params.id), response);
      },
    }),
    route({
      method: 'post',
      path: '/imports/:id/undo',
      tag: TAG,
      summary: 'Take an import back, where nothing later rests on it',
      access: WRITE,
      params: idParams,
      answer: importState,
      handle: ({ actor, params }) => undoImport(deps, actor, params.id),
    }),
  ];
}

function requireUpload(request: Request): Upload {
  if (request.file) return request.file;
  throw invalid('Send one file.', [
    { path: '/file', message: 'Send the file as “file” in a multipart form.' },
  ]);
}
