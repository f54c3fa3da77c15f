import type { CascadeVisit } from '../../analytics/cascades/types';
import type { LineReason } from '../../analytics/types';
import { unseenShop, type UnseenShop } from './unseen-shop';

/** The visits of an unseen shop's file, as the import would hand them on: without a detour over the database. */
export function visitsOf({ csv }: Pick<UnseenShop, 'csv'>): CascadeVisit[] {
  const [header = '', ...rows] = csv.trimEnd().split('\r\n');
  const column = new Map(header.split(',').map((name, at) => [name, at]));
  const visits = new Map<
    string,
    CascadeVisit & { lines: { component: string; reason: LineReason | null }[] }
  >();
  for (const row of rows) {
    const cells = row.split(',');
    const cell = (name: string) => cells[column.get(name) ?? -1] ?? '';
    const number = cell('repair_number');
    let visit = visits.get(number);
    if (!visit) {
      const hours = cell('meter_hours');
      visit = {
        unitId: cell('unit_serial'),
        model: cell('model'),
        day: Date.parse(cell('opened_on')) / 86_400_000,
        hours: hours === '' ? null : Number(hours),
        lines: [],
        visitId: number,
      };
      visits.set(number, visit);
    }
    visit.lines.push({
      component: cell('component'),
      reason: (cell('line_reason') || null) as LineReason | null,
    });
  }
  return [...visits.values()];
}

const LINES_A_UNIT = 18;

export function unseenVisits(lines: number): CascadeVisit[] {
  const unitsPerModel = Math.ceil(lines / (8 * LINES_A_UNIT));
  return visitsOf(unseenShop({ seed: 4600, models: 8, unitsPerModel, years: 4.5 }));
}
