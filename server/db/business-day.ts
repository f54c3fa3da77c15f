import { TZDate } from '@date-fns/tz';
import { format } from 'date-fns';
import { missing } from '../http/errors';
import type { Transaction } from './client';
import { shops } from './schema/index';

/** The business date in the zone of the transaction's shop. */
export async function businessDay(tx: Transaction, now: Date): Promise<string> {
  const [shop] = await tx.select({ timeZone: shops.timeZone }).from(shops);
  if (!shop) throw missing('shop');
  return format(new TZDate(now, shop.timeZone), 'yyyy-MM-dd');
}
