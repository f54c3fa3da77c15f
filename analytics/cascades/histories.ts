import type { CascadeOptions, CascadeVisit, CascadeWarning, ObservedUnit } from './types';

/** All that was replaced in one unit on one day, however many tickets it took. */
export type Occasion = {
  day: number;
  hours: number | null;
  visitIds: string[];
  /** Components replaced as failed or damaged, ascending; `damaged` is the subset coded so. */
  failed: number[];
  damaged: number[];
  /** Components replaced for any reason, ascending: each starts a new life. */
  replaced: number[];
};

export type UnitHistory = {
  unitId: string;
  occasions: Occasion[];
  fromDay: number;
  toDay: number;
  /** Until when a missing return is known not to have happened. */
  judgedToDay: number;
  fromHours: number | null;
  toHours: number | null;
};

export type ModelHistory = { model: string; units: UnitHistory[] };

export type Histories = {
  models: ModelHistory[];
  components: string[];
  visits: number;
  linesKnown: number;
  linesUnknown: number;
  warnings: Set<CascadeWarning>;
};

const byCode = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0);

const addSorted = (list: number[], value: number) => {
  let at = list.length;
  while (at > 0 && (list[at - 1] ?? 0) > value) at -= 1;
  if (list[at - 1] !== value) list.splice(at, 0, value);
};

type Draft = { model: string; unitId: string; visits: CascadeVisit[] };

const draftUnits = (visits: readonly CascadeVisit[], lastDay: number) => {
  const models = new Map<string, Map<string, Draft>>();
  let later = 0;
  for (const visit of visits) {
    if (visit.day > lastDay) {
      later += 1;
      continue;
    }
    let units = models.get(visit.model);
    if (!units) models.set(visit.model, (units = new Map()));
    const draft = units.get(visit.unitId);
    if (draft) draft.visits.push(visit);
    else units.set(visit.unitId, { model: visit.model, unitId: visit.unitId, visits: [visit] });
  }
  return { models, later };
};

/** Groups visits by model and unit, in an order that does not depend on the order of the rows. */
export const buildHistories = (
  visits: readonly CascadeVisit[],
  options: CascadeOptions,
  asOfDay: number,
): Histories => {
  const warnings = new Set<CascadeWarning>();
  const { models: drafts, later } = draftUnits(visits, asOfDay);
  if (later > 0) warnings.add('visitsAfterAsOf');
  const register = new Map<string, Map<string, ObservedUnit>>();
  for (const unit of options.units ?? []) {
    let units = register.get(unit.model);
    if (!units) register.set(unit.model, (units = new Map()));
    units.set(unit.unitId, unit);
    let drafted = drafts.get(unit.model);
    if (!drafted) drafts.set(unit.model, (drafted = new Map()));
    if (!drafted.has(unit.unitId)) drafted.set(unit.unitId, { ...unit, visits: [] });
  }
  if (!options.units) warnings.add('noUnits');

  const names = new Set<string>();
  for (const units of drafts.values())
    for (const { visits: own } of units.values())
      for (const { lines } of own) for (const { component } of lines) names.add(component);
  const components = [...names].sort(byCode);
  const indexOf = new Map(components.map((name, index) => [name, index]));
  const unknownFails = options.unknownReasons === 'failed';
  const counts = { visits: 0, linesKnown: 0, linesUnknown: 0 };

  const occasionsOf = (own: CascadeVisit[]): Occasion[] => {
    own.sort((a, b) => a.day - b.day);
    const occasions: Occasion[] = [];
    for (const visit of own) {
      counts.visits += 1;
      let occasion = occasions.at(-1);
      if (occasion?.day !== visit.day) {
        occasion = { day: visit.day, hours: null, visitIds: [], failed: [], damaged: [], replaced: [] };
        occasions.push(occasion);
      }
      if (visit.hours !== null) occasion.hours = Math.max(occasion.hours ?? visit.hours, visit.hours);
      if (visit.visitId !== undefined && !occasion.visitIds.includes(visit.visitId))
        occasion.visitIds.push(visit.visitId);
      for (const { component, reason } of visit.lines) {
        const index = indexOf.get(component) ?? 0;
        addSorted(occasion.replaced, index);
        if (reason === null) counts.linesUnknown += 1;
        else counts.linesKnown += 1;
        if (reason === 'failed' || reason === 'damage' || (reason === null && unknownFails))
          addSorted(occasion.failed, index);
        if (reason === 'damage') addSorted(occasion.damaged, index);
      }
    }
    occasions.forEach(({ visitIds }) => visitIds.sort(byCode));
    return occasions;
  };

  const unitOf = (draft: Draft): UnitHistory => {
    const occasions = occasionsOf(draft.visits);
    const known = register.get(draft.model)?.get(draft.unitId);
    const first = occasions[0]?.day ?? known?.fromDay ?? 0;
    const last = occasions.at(-1)?.day ?? known?.fromDay ?? 0;
    if (known && (first < known.fromDay || last > known.toDay)) warnings.add('visitsOutsideUnit');
    const fromDay = Math.min(first, known?.fromDay ?? first);
    const toDay = Math.max(last, Math.min(known?.toDay ?? last, asOfDay));
    return {
      unitId: draft.unitId,
      occasions,
      fromDay,
      toDay,
      judgedToDay: known ? toDay : asOfDay,
      fromHours: known?.fromHours ?? null,
      toHours: known && known.toDay <= asOfDay ? (known.toHours ?? null) : null,
    };
  };

  const models = [...drafts]
    .sort(([a], [b]) => byCode(a, b))
    .map(([model, units]) => ({
      model,
      units: [...units.values()].sort((a, b) => byCode(a.unitId, b.unitId)).map(unitOf),
    }));
  return { models, components, ...counts, warnings };
};
