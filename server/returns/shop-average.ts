import { sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '../db/client';
import { selectRows } from '../db/rows';
import type { Actor } from '../http/actor';
import { permissionFor } from '../http/permission';

/** From so many technicians on, one's own rate and the shop's do not give away another's. */
const ENOUGH_TECHNICIANS = 4;

/** Whether the shop's rates must be kept from someone who may see only their own. */
export async function hidesShopAverage(tx: Transaction, actor: Actor): Promise<boolean> {
  return permissionFor(actor, 'technicianRates') === 'own' && areFewTechnicians(tx);
}

/** The same on pages that people see who may see no rates at all. */
export async function hidesRates(tx: Transaction, actor: Actor): Promise<boolean> {
  return permissionFor(actor, 'rates') === '-' || hidesShopAverage(tx, actor);
}

async function areFewTechnicians(tx: Transaction): Promise<boolean> {
  const [row] = await selectRows(
    tx,
    z.object({ technicians: z.number() }),
    sql`SELECT count(DISTINCT rt.technician_id)::int AS technicians FROM repair_technicians rt
      JOIN repair_facts f ON f.shop_id = rt.shop_id AND f.repair_id = rt.repair_id AND f.left_out IS NULL`,
  );
  const technicians = row?.technicians ?? 0;
  return technicians > 0 && technicians < ENOUGH_TECHNICIANS;
}
