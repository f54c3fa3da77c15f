import { eq, inArray, sql } from 'drizzle-orm';
import type { Transaction } from '../db/client';
import {
  components,
  families,
  familyModels,
  memberships,
  models,
  technicianNames,
  technicians,
  users,
} from '../db/schema/index';
import { COMPONENTS, type Component } from './components';
import type { Millrace } from './simulate-millrace';

/** What a shop's people would have told the program: which models share what, and whom the initials mean. */
export async function arrangeShop(tx: Transaction, shopId: string, shop: Millrace): Promise<void> {
  await saveFamilies(tx, shopId, shop);
  await nameTechnicians(tx, shop);
}

/** Said once for each component, it settles the lines that give no reason; belts, blades and the like stay unsaid. */
export async function sayHowReplaced(tx: Transaction): Promise<void> {
  for (const component of COMPONENTS) {
    await tx
      .update(components)
      .set({ kind: kindOf(component) })
      .where(eq(components.name, component.name));
  }
}

const ELECTRIC: readonly string[] = ['PTO drive', 'charging', 'starting', 'safety circuit', 'ignition'];

function kindOf({ life, servicedShare, system }: Component): string {
  if (!life) return 'service_item';
  return servicedShare === undefined && ELECTRIC.includes(system) ? 'only_when_bad' : 'depends';
}

async function saveFamilies(tx: Transaction, shopId: string, shop: Millrace): Promise<void> {
  const known = await tx.select({ id: models.id, maker: models.maker, model: models.model }).from(models);
  for (const family of shop.families) {
    const [saved] = await tx
      .insert(families)
      .values({ shopId, name: family.name, nameKey: family.name.toLowerCase() })
      .returning({ id: families.id });
    const members = known.filter((one) =>
      family.models.some(({ maker, model }) => maker === one.maker && model === one.model),
    );
    if (!saved || members.length === 0) continue;
    await tx
      .insert(familyModels)
      .values(members.map(({ id }) => ({ shopId, familyId: saved.id, modelId: id })));
  }
}

/** Every spelling of a technician is brought under one person, who carries the full name. */
async function nameTechnicians(tx: Transaction, shop: Millrace): Promise<void> {
  for (const { name, spellings } of shop.people.technicians) {
    const found = await tx
      .select({ id: technicianNames.id, technicianId: technicianNames.technicianId })
      .from(technicianNames)
      .where(inArray(technicianNames.spelling, spellings));
    const [kept, ...others] = [...new Set(found.map(({ technicianId }) => technicianId))];
    if (kept === undefined) continue;
    if (others.length > 0) {
      await tx.execute(sql`
        INSERT INTO repair_technicians (shop_id, repair_id, technician_id)
        SELECT shop_id, repair_id, ${kept} FROM repair_technicians WHERE technician_id IN ${others}
        ON CONFLICT DO NOTHING`);
      await tx
        .update(technicianNames)
        .set({ technicianId: kept })
        .where(inArray(technicianNames.technicianId, others));
      await tx.delete(technicians).where(inArray(technicians.id, others));
    }
    const [member] = await tx
      .select({ id: users.id })
      .from(users)
      .innerJoin(memberships, eq(memberships.userId, users.id))
      .where(eq(users.displayName, name));
    await tx
      .update(technicians)
      .set({ displayName: name, userId: member?.id ?? null })
      .where(eq(technicians.id, kept));
  }
}

/** The service manager has looked at what came back until a month ago; the rest still waits. */
export async function decideOldComebacks(
  tx: Transaction,
  by: { managerId: string; asOf: string },
): Promise<void> {
  await tx.execute(sql`
    INSERT INTO comeback_decisions (shop_id, return_repair_id, status, reason, decided_by_user_id)
    SELECT c.shop_id, c.return_repair_id,
      CASE WHEN c.suggested_reason = 'unrelated' THEN 'dismissed' ELSE 'confirmed' END, c.suggested_reason, ${by.managerId}
    FROM comebacks c JOIN repairs r ON r.shop_id = c.shop_id AND r.id = c.return_repair_id
    WHERE r.work_on < ${by.asOf}::date - 30
    ON CONFLICT DO NOTHING`);
}
