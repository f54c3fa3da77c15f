import { batch, batchAnswer } from '../../../shared/imports';
import type { Deps } from '../../deps';
import { invalid } from '../../http/errors';
import { route, type Route } from '../../http/route';
import { takeBatch } from './service';

/** Repairs that another program sends. */
export function repairsBatchRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'post',
      path: '/repairs/batch',
      tag: 'imports',
      summary: 'Send up to 5,000 repairs; an Idempotency-Key makes it safe to send again',
      access: { area: 'imports', verb: 'write' },
      body: batch,
      answer: batchAnswer,
      handle: ({ actor, body, request }) =>
        takeBatch(deps, actor, body.repairs, readKey(request.get('idempotency-key'))),
    }),
  ];
}

function readKey(header: string | undefined): string | undefined {
  if (header === undefined || /^[\x21-\x7e]{1,200}$/.test(header)) return header;
  throw invalid('The Idempotency-Key cannot be used.', [
    { path: '', message: 'Send 1 to 200 visible characters, such as a UUID.' },
  ]);
}
