import { z } from 'zod';

export const id = z.uuid();
/** A business date in the shop's zone. */
export const day = z.iso.date().refine((text) => !text.startsWith('0000'), 'There is no year 0000.');
export const instant = z.iso.datetime();
export const cents = z.number().int();
export const interval = z.strictObject({ lower: z.number().nullable(), upper: z.number().nullable() });

/** A list, and only a list, answers so. */
export const listOf = <Item extends z.ZodType>(item: Item) =>
  z.strictObject({ data: z.array(item), nextCursor: z.string().nullable() });

export const pageQuery = z.strictObject({
  limit: z.coerce.number().int().min(1).max(1000).default(100),
  cursor: z.string().max(2000).optional(),
});

export const idParams = z.strictObject({ id });

export const PRODUCT_TYPES = [
  'lawn_tractor',
  'zero_turn',
  'walk_behind',
  'handheld',
  'snow',
  'utility',
  'other',
] as const;
export const USE_CLASSES = ['homeowner', 'commercial', 'rental', 'municipal'] as const;
export const TICKET_TYPES = ['repair', 'setup', 'counter_sale', 'internal'] as const;
export const LINE_KINDS = ['part', 'labor', 'work', 'fee', 'note'] as const;
export const LINE_REASONS = ['failed', 'maintenance', 'preventive', 'damage', 'upgrade'] as const;
export const WORK_DONE = [
  'adjusted',
  'cleaned',
  'repaired',
  'tightened',
  'tested_good',
  'nothing_found',
] as const;
export const PAY_TYPES = ['customer', 'warranty', 'shop'] as const;
export const COMPONENT_KINDS = ['unset', 'service_item', 'only_when_bad', 'depends'] as const;
export const CLOCKS = ['hours', 'days'] as const;

/** A component, unit, model or repair named where it is linked to. */
export const named = z.strictObject({ id, name: z.string() });
export type Named = z.infer<typeof named>;
