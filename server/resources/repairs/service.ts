import { z } from 'zod';
import { day } from '../../../shared/basics';
import type { RepairWhole, repairQuery } from '../../../shared/repairs';
import { lastAnalysis } from '../../db/last-analysis';
import { ownTechnicianId } from '../../db/own-technician';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { forbidden, missing } from '../../http/errors';
import { maySeePeople, permissionFor } from '../../http/permission';
import type { Transaction } from '../../db/client';
import { repairConditions, type RepairFilter } from './filters';
import { presentListed, presentRepair } from './present';
import { findLines, findLinks, findRepair, findRepairs, findVersions } from './queries';

const cursorKey = z.tuple([day, z.uuid()]);

export function listRepairs(deps: Deps, actor: Actor, query: z.output<typeof repairQuery>) {
  const { limit, cursor, ...filter } = query;
  const after = decodeCursor(cursor, cursorKey);
  const seesPeople = maySeePeople(actor);
  return withShop(deps.database, actor.shopId, async (tx) => {
    await requireFilterAllowed(tx, actor, filter);
    const conditions = repairConditions(filter, { searchesCustomers: seesPeople });
    const rows = await findRepairs(tx, conditions, { after, rows: limit + 1 });
    return pageOf(
      rows.map((row) => presentListed(row, seesPeople)),
      limit,
      ({ workOn, id }) => [workOn, id],
    );
  });
}

/** Whose work came back is a rate by technician: the same people may ask for it, in this disguise too. */
async function requireFilterAllowed(tx: Transaction, actor: Actor, filter: RepairFilter): Promise<void> {
  if (!filter.technicianId) return;
  if (!maySeePeople(actor)) throw forbidden('Programs read repairs without their technicians.');
  if (!filter.cameBack) return;
  const permission = permissionFor(actor, 'technicianRates');
  const isOwn = permission === 'own' && (await ownTechnicianId(tx, actor)) === filter.technicianId;
  if (permission === '-' || (permission === 'own' && !isOwn)) throw forbidden();
}

/** @throws missing */
export function readRepair(deps: Deps, actor: Actor, id: string): Promise<RepairWhole> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const row = await findRepair(tx, id);
    if (!row) throw missing('repair');
    const lines = await findLines(tx, id);
    const links = await findLinks(tx, id);
    const versions = await findVersions(tx, id);
    const asOf = (await lastAnalysis(tx))?.asOf ?? null;
    return presentRepair(row, { lines, links, versions, asOf }, maySeePeople(actor));
  });
}
