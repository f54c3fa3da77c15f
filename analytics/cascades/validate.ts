import { requireThat } from '../requirement';
import type { CascadeOptions, CascadeVisit } from './types';

const NAME = 'findCascades';

const requireFinite = (value: number | null | undefined, name: string) => {
  requireThat(
    value === null || value === undefined || Number.isFinite(value),
    NAME,
    `${name} to be a finite number`,
  );
};

export const validateCascades = (visits: readonly CascadeVisit[], options: CascadeOptions): void => {
  for (const { day, hours } of visits) {
    requireThat(Number.isFinite(day), NAME, 'every day to be a finite number');
    requireFinite(hours, 'hours where given');
    requireThat(hours === null || hours >= 0, NAME, 'hours ≥ 0');
  }
  for (const unit of options.units ?? []) {
    requireThat(Number.isFinite(unit.fromDay) && Number.isFinite(unit.toDay), NAME, 'units with finite days');
    requireThat(unit.toDay >= unit.fromDay, NAME, 'toDay ≥ fromDay');
    requireFinite(unit.fromHours, 'fromHours where given');
    requireFinite(unit.toHours, 'toHours where given');
  }
  requireFinite(options.asOfDay, 'asOfDay');
  const { windowDays = 90, maxFalseDiscovery = 0.05 } = options;
  requireThat(windowDays > 0 && Number.isFinite(windowDays), NAME, 'windowDays > 0');
  requireThat(maxFalseDiscovery > 0 && maxFalseDiscovery < 1, NAME, 'maxFalseDiscovery between 0 and 1');
  const placed = new Set<string>();
  for (const { models } of options.families ?? [])
    for (const model of new Set(models)) {
      requireThat(!placed.has(model), NAME, 'each model in one family at most');
      placed.add(model);
    }
};
