import type { UnitClock } from './clock';
import type { Histories, ModelHistory } from './histories';

/** Cumulative hazard of one component of one model between two ages on the chosen clock. */
export type HazardBetween = (component: number, fromAge: number, toAge: number) => number;

const BINS = 16;
/** Failures that the pooled shape of a component counts for, against the model's own. */
const PRIOR_FAILURES = 3;

/** One unit's ages: where its clock starts and ends, and when each replaced component began a new life. */
export type UnitAges = {
  ageAtStart: number;
  ageAtEnd: number;
  /** Age at each occasion, and a window after it. */
  atOccasion: number[];
  afterWindow: number[];
  /** Ascending by component, then by age: replacements of any reason. */
  renewals: { component: number; age: number; day: number; failed: boolean }[];
};

export const unitAges = (model: ModelHistory, clocks: readonly UnitClock[], windowDays: number): UnitAges[] =>
  model.units.map((unit, at) => {
    const clock = clocks[at] ?? ((day: number) => day - unit.fromDay);
    const atOccasion = unit.occasions.map(({ day }) => clock(day));
    const renewals = unit.occasions.flatMap(({ day, replaced, failed }, occasionAt) =>
      replaced.map((component) => ({
        component,
        age: atOccasion[occasionAt] ?? 0,
        day,
        failed: failed.includes(component),
      })),
    );
    renewals.sort((a, b) => a.component - b.component || a.day - b.day);
    return {
      ageAtStart: clock(unit.fromDay),
      ageAtEnd: clock(unit.toDay),
      atOccasion,
      afterWindow: unit.occasions.map(({ day }) => clock(day + windowDays)),
      renewals,
    };
  });

/** Upper edges of the age bins, at equal numbers of failures; the last bin is open. */
const ageEdges = (ages: number[]): number[] => {
  ages.sort((a, b) => a - b);
  const edges = Array.from(
    { length: BINS - 1 },
    (_, at) => ages[Math.floor(((at + 1) * ages.length) / BINS)] ?? 0,
  );
  return [...new Set(edges.filter((edge) => edge > 0))];
};

const addExposure = (
  into: Float64Array,
  at: number,
  edges: readonly number[],
  from: number,
  to: number,
  sign = 1,
) => {
  let low = 0;
  for (let bin = 0; bin <= edges.length; bin += 1) {
    const high = edges[bin] ?? Infinity;
    if (to <= low) return;
    const overlap = Math.min(to, high) - Math.max(from, low);
    if (overlap > 0) into[at + bin] = (into[at + bin] ?? 0) + sign * overlap;
    low = high;
  }
};

type Table = { failures: Float64Array; exposure: Float64Array };

const ageOfLife = (age: number, start: number) => Math.max(0, age - start);

const tabulate = (units: readonly UnitAges[], components: number, edges: number[]): Table => {
  const width = edges.length + 1;
  const original = new Float64Array(width);
  const table = {
    failures: new Float64Array(components * width),
    exposure: new Float64Array(components * width),
  };
  for (const { ageAtStart, ageAtEnd } of units) addExposure(original, 0, edges, ageAtStart, ageAtEnd);
  for (let component = 0; component < components; component += 1)
    table.exposure.set(original, component * width);
  for (const { ageAtStart, ageAtEnd, renewals } of units) {
    let previous = -1;
    let start = 0;
    for (const [at, { component, age, failed }] of renewals.entries()) {
      const row = component * width;
      if (component !== previous) {
        addExposure(table.exposure, row, edges, ageAtStart, ageAtEnd, -1);
        addExposure(table.exposure, row, edges, ageAtStart, age);
        start = 0;
      } else addExposure(table.exposure, row, edges, 0, ageOfLife(age, start));
      if (failed) {
        const bin = edges.findIndex((edge) => ageOfLife(age, start) < edge);
        const cell = row + (bin < 0 ? edges.length : bin);
        table.failures[cell] = (table.failures[cell] ?? 0) + 1;
      }
      previous = component;
      start = age;
      if (renewals[at + 1]?.component !== component)
        addExposure(table.exposure, row, edges, 0, ageAtEnd - age);
    }
  }
  return table;
};

const sumRow = (values: Float64Array, at: number, width: number) => {
  let sum = 0;
  for (let bin = 0; bin < width; bin += 1) sum += values[at + bin] ?? 0;
  return sum;
};

/**
 * Age-dependent failure rates, piecewise constant. A cell's rate is a gamma–Poisson mean of the model's
 * own failures and exposure with the component's shape over all models at the model's own level, so that a
 * model with few units still has a curve.
 */
export const fitHazards = (
  histories: Histories,
  agesOfModels: readonly UnitAges[][],
): { between: HazardBetween; ratePerDay: (component: number) => number }[] => {
  const components = histories.components.length;
  const failureAges: number[] = [];
  for (const units of agesOfModels)
    for (const { renewals } of units)
      renewals.forEach(({ component, age, failed }, at) => {
        const before = renewals[at - 1];
        if (failed) failureAges.push(ageOfLife(age, before?.component === component ? before.age : 0));
      });
  const edges = ageEdges(failureAges);
  const width = edges.length + 1;
  const tables = agesOfModels.map((units) => tabulate(units, components, edges));

  const pooledFailures = new Float64Array(components * width);
  const pooledExpected = new Float64Array(components * width);
  for (const { failures, exposure } of tables)
    for (let component = 0; component < components; component += 1) {
      const row = component * width;
      const total = sumRow(exposure, row, width);
      const level = total > 0 ? sumRow(failures, row, width) / total : 0;
      for (let bin = 0; bin < width; bin += 1) {
        pooledFailures[row + bin] = (pooledFailures[row + bin] ?? 0) + (failures[row + bin] ?? 0);
        pooledExpected[row + bin] = (pooledExpected[row + bin] ?? 0) + level * (exposure[row + bin] ?? 0);
      }
    }

  return tables.map(({ failures, exposure }, modelAt) => {
    const rates = new Float64Array(components * width);
    const cumulative = new Float64Array(components * width);
    let days = 0;
    for (const { fromDay, toDay } of histories.models[modelAt]?.units ?? []) days += toDay - fromDay;
    for (let component = 0; component < components; component += 1) {
      const row = component * width;
      const total = sumRow(exposure, row, width);
      const level = total > 0 ? sumRow(failures, row, width) / total : 0;
      let sum = 0;
      for (let bin = 0; bin < width; bin += 1) {
        const cell = row + bin;
        const shape = ((pooledFailures[cell] ?? 0) + 1) / ((pooledExpected[cell] ?? 0) + 1);
        const prior = level * shape;
        rates[cell] =
          prior > 0
            ? ((failures[cell] ?? 0) + PRIOR_FAILURES) /
              (Math.max(0, exposure[cell] ?? 0) + PRIOR_FAILURES / prior)
            : 0;
        cumulative[cell] = sum;
        sum += (rates[cell] ?? 0) * ((edges[bin] ?? 0) - (edges[bin - 1] ?? 0));
      }
    }
    const upTo = (component: number, age: number) => {
      let low = 0;
      let high = edges.length;
      while (low < high) {
        const middle = (low + high) >> 1;
        if ((edges[middle] ?? Infinity) > age) high = middle;
        else low = middle + 1;
      }
      const cell = component * width + low;
      return (cumulative[cell] ?? 0) + (rates[cell] ?? 0) * (age - (edges[low - 1] ?? 0));
    };
    return {
      between: (component, fromAge, toAge) =>
        toAge > fromAge ? upTo(component, toAge) - upTo(component, fromAge) : 0,
      ratePerDay: (component) => (days > 0 ? sumRow(failures, component * width, width) / days : 0),
    };
  });
};
