import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import type { changeShopSettings, ShopSettings } from '../../../shared/administration';
import type { Transaction } from '../../db/client';
import { shops } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { invalid, missing, type FieldError } from '../../http/errors';
import { requestAnalysis } from '../../jobs/request-analysis';

type Change = z.infer<typeof changeShopSettings>;

export const readSettings = (deps: Deps, actor: Actor): Promise<ShopSettings> =>
  withShop(deps.database, actor.shopId, findSettings);

/** Changes settings; where the window of a comeback changes, everything derived is computed anew. */
export async function changeSettings(deps: Deps, actor: Actor, change: Change): Promise<ShopSettings> {
  requireKnownNames(change);
  const { after, isRecomputed } = await withShop(deps.database, actor.shopId, async (tx) => {
    const before = await findSettings(tx);
    if (Object.keys(change).length === 0) return { after: before, isRecomputed: false };
    await tx.update(shops).set(change).where(eq(shops.id, actor.shopId));
    const after = await findSettings(tx);
    const isRecomputed = before.windowDays !== after.windowDays || before.windowHours !== after.windowHours;
    if (isRecomputed) await requestAnalysis(tx, deps, actor.shopId);
    await audit(tx, actor, { action: 'change', subject: 'shop', subjectId: actor.shopId, detail: change });
    return { after, isRecomputed };
  });
  if (isRecomputed) deps.jobs.wake('analysis');
  return after;
}

async function findSettings(tx: Transaction): Promise<ShopSettings> {
  const [row] = await tx
    .select({
      id: shops.id,
      name: shops.name,
      timeZone: shops.timeZone,
      locale: shops.locale,
      currency: shops.currency,
      lengthUnit: shops.lengthUnit,
      temperatureUnit: shops.temperatureUnit,
      windowDays: shops.windowDays,
      windowHours: shops.windowHours,
      doorRateCents: shops.doorRateCents,
    })
    .from(shops);
  if (!row) throw missing('shop');
  return {
    ...row,
    lengthUnit: row.lengthUnit === 'mm' ? 'mm' : 'in',
    temperatureUnit: row.temperatureUnit === 'Cel' ? 'Cel' : 'degF',
  };
}

/** Zones, locales and currencies are those that this runtime can compute and print with. */
function requireKnownNames({ timeZone, locale, currency }: Change): void {
  const errors: FieldError[] = [];
  if (timeZone !== undefined && !canMake(() => new Intl.DateTimeFormat('en', { timeZone })))
    errors.push({ path: '/timeZone', message: 'This is not a time zone, such as America/Chicago.' });
  if (locale !== undefined && !canMake(() => new Intl.NumberFormat(locale)))
    errors.push({ path: '/locale', message: 'This is not a language and country, such as en-US.' });
  if (currency !== undefined && !Intl.supportedValuesOf('currency').includes(currency))
    errors.push({ path: '/currency', message: 'This is not a currency, such as USD.' });
  if (errors.length > 0) throw invalid('The body cannot be used as sent.', errors);
}

function canMake(make: () => unknown): boolean {
  try {
    make();
    return true;
  } catch {
    return false;
  }
}
