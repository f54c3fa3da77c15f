import { sql, type SQL } from 'drizzle-orm';

/**
 * What a return cost the shop, in cents; not a booked figure. Needs alias s (the return's row of repairs).
 *
 * Labor given away at the door rate: hours that the shop pays itself, or that nobody was charged for; what the maker
 * pays under warranty is not given away. Hours stand per line where lines have them, else on the repair. Parts not
 * paid: the cost of part lines that the shop pays itself or that went out at no price.
 */
export const costOfReturn = (doorRateCents: number): SQL => sql`(
  SELECT round(${doorRateCents} * coalesce(
      CASE WHEN count(x.labor_hours) > 0
        THEN sum(x.labor_hours) FILTER (WHERE ${isGivenAway(sql`coalesce(x.pay_type, s.pay_type)`, sql`x.labor_amount_cents`)})
        ELSE CASE WHEN ${isGivenAway(sql`s.pay_type`, sql`s.labor_amount_cents`)} THEN s.labor_hours ELSE 0 END
      END, 0))::float8
    + coalesce(sum(x.cost_cents) FILTER (WHERE x.kind = 'part'
        AND ${isGivenAway(sql`coalesce(x.pay_type, s.pay_type)`, sql`x.amount_cents`)}), 0)::float8
  FROM repair_lines x WHERE x.shop_id = s.shop_id AND x.repair_id = s.id)`;

function isGivenAway(payType: SQL, chargedCents: SQL): SQL {
  return sql`(${payType} = 'shop' OR ${payType} IS DISTINCT FROM 'warranty' AND coalesce(${chargedCents}, 0) = 0)`;
}
