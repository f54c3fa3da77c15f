import type { CascadeVisit } from '../../analytics/cascades';
import { unseenShop } from '../bench/unseen-shop';
import { between, seeded } from './shop/random';

const REASONS = ['failed', 'maintenance', 'preventive', 'damage', 'upgrade'] as const;
const DAY_MS = 86_400_000;

/**
 * A shop of the other simulator, where every model has its own links (and may have two names the other way round),
 * with habits drawn anew for each shop: one in four reads no meter, one in four never codes damage.
 */
export const differingShop = (settings: { seed: number; models: number; unitsPerModel: number }) => {
  const random = seeded(settings.seed * 2246822519 + 31);
  const habits = {
    returnDays: between(random, 5, 25),
    weakestLink: between(random, 0.3, 0.8),
    cureWithResultant: between(random, 0.6, 1),
    codedDamage: random() < 0.25 ? 0 : between(random, 0.1, 0.6),
  };
  const hasHours = random() < 0.75;
  const { csv, planted: links } = unseenShop({ ...settings, ...habits, years: 5 });
  const [head = '', ...rows] = csv.trim().split('\r\n');
  const columns = head.split(',');
  const visits = new Map<string, CascadeVisit & { lines: CascadeVisit['lines'][number][] }>();
  for (const row of rows) {
    const cells = row.split(',');
    const cell = (name: string) => cells[columns.indexOf(name)] ?? '';
    const number = cell('repair_number');
    let visit = visits.get(number);
    if (!visit) {
      const hours = cell('meter_hours');
      visit = {
        unitId: cell('unit_serial'),
        model: cell('model'),
        day: Date.parse(cell('opened_on')) / DAY_MS,
        hours: hasHours && hours !== '' ? Number(hours) : null,
        lines: [],
      };
      visits.set(number, visit);
    }
    const reason = REASONS.find((one) => one === cell('line_reason')) ?? null;
    visit.lines.push({ component: cell('component'), reason });
  }
  const failedTogether = (model: string, causal: string, resultant: string) =>
    [...visits.values()].filter(({ model: own, lines }) => {
      const hasFailed = (name: string) =>
        lines.some(
          ({ component, reason }) => component === name && (reason === 'failed' || reason === 'damage'),
        );
      return own === model && hasFailed(causal) && hasFailed(resultant);
    }).length;
  const planted = new Map(
    links.map(({ model, causal, resultant }) => [
      `${model}|${causal}|${resultant}`,
      failedTogether(model, causal, resultant),
    ]),
  );
  return { visits: [...visits.values()], units: [], planted, implied: new Set<string>() };
};
