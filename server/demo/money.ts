/** Door rates of the last six seasons, oldest first, in cents an hour (common practice, no source). */
const DOOR_RATES_CENTS = [8500, 8900, 9500, 9900, 10500, 11000] as const;
const PRICE_RISE_PER_YEAR = 0.03;
const COST_SHARE = 0.66;

export const centsText = (cents: number): string => (cents / 100).toFixed(2);

export function doorRateCents(yearsAgo: number): number {
  const season = Math.min(DOOR_RATES_CENTS.length - 1, Math.max(0, Math.floor(6 - yearsAgo)));
  return DOOR_RATES_CENTS[season] ?? 11000;
}

/** What a part sold for so many years ago, against its list price of today. */
export const priceThenCents = (listCents: number, yearsAgo: number): number =>
  Math.max(99, Math.round(listCents * (1 - PRICE_RISE_PER_YEAR) ** Math.max(0, yearsAgo)));

export const costCents = (priceCents: number): number => Math.round(priceCents * COST_SHARE);
