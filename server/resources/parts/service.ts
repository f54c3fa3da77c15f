import { z } from 'zod';
import type { partListed, partQuery } from '../../../shared/parts';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { missing } from '../../http/errors';
import { findPart, findParts, type PartRow } from './queries';

const cursorKey = z.tuple([z.string(), z.string()]);

export async function listParts(deps: Deps, actor: Actor, query: z.output<typeof partQuery>) {
  const { limit, cursor, ...filter } = query;
  const after = decodeCursor(cursor, cursorKey);
  const rows = await withShop(deps.database, actor.shopId, (tx) =>
    findParts(tx, filter, { after, rows: limit + 1 }),
  );
  const { data, nextCursor } = pageOf(rows, limit, ({ sortKey }) => sortKey);
  return { data: data.map(presentPart), nextCursor };
}

/** @throws missing */
export async function readPart(deps: Deps, actor: Actor, id: string) {
  const row = await withShop(deps.database, actor.shopId, (tx) => findPart(tx, id));
  if (!row) throw missing('part');
  return presentPart(row);
}

function presentPart({ sortKey: _, ...row }: PartRow): z.output<typeof partListed> {
  return row;
}
