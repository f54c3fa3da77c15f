import type { CascadeVisit, ObservedUnit } from '../../../analytics/cascades';
import { findCascades } from '../../../analytics/cascades';
import type { ShopSettings, SimulatedShop } from '../../calibrate/shop';
import { simulateShop } from '../../calibrate/shop';

export const cascadesOf = (shop: SimulatedShop) =>
  findCascades(shop.visits, shop.units.length > 0 ? { units: shop.units } : {});

export const shops = (count: number, settings: Partial<ShopSettings>, firstSeed: number): SimulatedShop[] =>
  Array.from({ length: count }, (_, at) => simulateShop({ ...settings, seed: firstSeed + at }));

type Reason = 'failed' | 'damage' | 'maintenance' | null;
export type Story = readonly (readonly [day: number, ...components: string[]])[];

/** Units with hand-written visits; every unit is watched from day 0 to 1,000. */
export const tell = (
  stories: readonly Story[],
  {
    model = 'M',
    reason = 'failed',
    prefix = 'unit',
  }: { model?: string; reason?: Reason; prefix?: string } = {},
): { visits: CascadeVisit[]; units: ObservedUnit[] } => ({
  visits: stories.flatMap((story, at) =>
    story.map(([day, ...components]) => ({
      unitId: `${prefix} ${String(at + 1)}`,
      model,
      day,
      hours: null,
      lines: components.map((component) => ({ component, reason })),
    })),
  ),
  units: stories.map((_, at) => ({ unitId: `${prefix} ${String(at + 1)}`, model, fromDay: 0, toDay: 1000 })),
});

export const repeat = (times: number, make: (at: number) => Story): Story[] =>
  Array.from({ length: times }, (_, at) => make(at));
