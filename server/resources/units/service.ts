import { z } from 'zod';
import type { UnitWhole, unitQuery } from '../../../shared/machines';
import { businessDay } from '../../db/business-day';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { missing } from '../../http/errors';
import { maySeePeople } from '../../http/permission';
import { findUnit, findUnits, findVisits, type UnitListedRow } from './queries';
import { timelineOf } from './timeline';

const cursorKey = z.tuple([z.string(), z.uuid()]);

export async function listUnits(deps: Deps, actor: Actor, query: z.output<typeof unitQuery>) {
  const { limit, cursor, ...filter } = query;
  const after = decodeCursor(cursor, cursorKey);
  const rows = await withShop(deps.database, actor.shopId, (tx) =>
    findUnits(tx, filter, { after, rows: limit + 1, searchesCustomers: maySeePeople(actor) }),
  );
  const { data, nextCursor } = pageOf(rows, limit, ({ sortKey, id }) => [sortKey, id]);
  return { data: data.map(presentListed), nextCursor };
}

/** @throws missing */
export function readUnit(deps: Deps, actor: Actor, id: string): Promise<UnitWhole> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const unit = await findUnit(tx, id);
    if (!unit) throw missing('unit');
    const visits = await findVisits(tx, id);
    return {
      ...presentListed(unit),
      customer: maySeePeople(actor) ? unit.customer : null,
      knownFromOn: unit.knownFromOn,
      isRegistered: unit.isRegistered,
      engines: unit.engines,
      ...timelineOf(unit, visits, await businessDay(tx, deps.now())),
    };
  });
}

function presentListed(row: UnitListedRow) {
  const { id, name, identity, serial, unitRef, model, inServiceOn, useClass } = row;
  const { repairs, lastRepairOn, lastMeterHours } = row;
  return {
    ...{ id, name, identity, serial, unitRef, model, inServiceOn, useClass },
    ...{ repairs, lastRepairOn, lastMeterHours },
  };
}
