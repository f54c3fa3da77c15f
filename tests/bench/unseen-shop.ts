/**
 * Records of a shop that the product has not been built on: made anew from a seed, in the native template, with the
 * dirt of real records. Written apart from the demo's and the calibration's simulators so that a mistake in one is not
 * shared by the check.
 */
export type UnseenShop = {
  csv: string;
  rows: number;
  repairs: number;
  /** Directed pairs that were planted, per model. */
  planted: { model: string; causal: string; resultant: string }[];
};

type Component = { name: string; shape: number; scale: number; kind: 'wear' | 'service' };
type Line = { component: string; reason: string; cents: number };
type Visit = { day: number; unit: number; model: string; hours: number; lines: Line[]; complaint: string };

const NAMES = [
  'PTO clutch', 'PTO switch', 'Main fuse', 'Battery', 'Voltage regulator', 'Spindle bearing', 'Deck belt', 'Drive belt',
  'Idler pulley', 'Starter solenoid', 'Starter motor', 'Fuel pump', 'Carburetor', 'Seat switch', 'Ignition switch',
  'Hydro pump', 'Wheel bearing', 'Muffler', 'Head gasket', 'Fuel shutoff solenoid',
]; // prettier-ignore
const SERVICE = ['Air filter', 'Oil filter', 'Spark plug', 'Mower blade'];
const SEASON_DAYS = 215;

/** How its causes behave and its technicians work; each may be turned, and none changes what the others draw. */
export type UnseenHabits = {
  /** Mean days until a machine whose cause was left in is back. */
  returnDays?: number;
  /** The weakest link takes the resultant part with it so often. */
  weakestLink?: number;
  /** Share of later visits with the cure that replace the resultant part as well. */
  cureWithResultant?: number;
  /** Share of broken resultant parts coded as damage beside their cause. */
  codedDamage?: number;
};

export function unseenShop(
  options: {
    seed: number;
    models: number;
    unitsPerModel: number;
    years: number;
  } & UnseenHabits,
): UnseenShop {
  const { returnDays = 14, weakestLink = 0.5, cureWithResultant = 1, codedDamage = 0.5 } = options;
  const habits = { returnDays, weakestLink, cureWithResultant, codedDamage };
  const random = generator(options.seed);
  const visits: Visit[] = [];
  const planted: UnseenShop['planted'] = [];
  const inService = new Map<number, number>();
  const lastDay = Math.floor(Date.UTC(2026, 9, 20) / 86_400_000);
  const firstDay = lastDay - Math.round(options.years * 365.25);
  let unit = 0;
  for (let m = 0; m < options.models; m++) {
    const model = `UX${100 + 7 * m}`;
    const components: Component[] = NAMES.map((name) => ({
      name,
      shape: 0.9 + 2.2 * random(),
      scale: 350 + 900 * random(),
      kind: 'wear',
    }));
    const links = plantLinks(random, components).map((link) => ({
      ...link,
      holds: weakestLink + (1 - weakestLink) * random(),
    }));
    for (const { causal, resultant } of links) planted.push({ model, causal, resultant });
    const foundAtOnce = 0.25 + 0.5 * random();
    for (let u = 0; u < options.unitsPerModel; u++, unit++) {
      const isOld = random() < 1 / 3;
      const start = isOld
        ? firstDay - Math.floor(random() * 1500)
        : firstDay + Math.floor(random() * (options.years - 1) * 365);
      inService.set(unit, start);
      const story = tellUnit({
        random,
        unit,
        model,
        components,
        links,
        start,
        lastDay,
        foundAtOnce,
        habits,
      });
      visits.push(...story.filter(({ day }) => day >= firstDay && day <= lastDay));
    }
  }
  visits.sort((a, b) => a.day - b.day);
  return { ...write(visits, inService, random), planted };
}

type Link = { causal: string; resultant: string; holds: number };

/** Two or three links a model, no component in two of them, any components: not only those the trade speaks of. */
function plantLinks(random: () => number, components: readonly Component[]) {
  const names = components.map(({ name }) => name).sort(() => random() - 0.5);
  return Array.from({ length: 2 + Math.floor(random() * 2) }, (_, at) => ({
    causal: names[2 * at] ?? '',
    resultant: names[2 * at + 1] ?? '',
  }));
}

function tellUnit(world: {
  random: () => number;
  unit: number;
  model: string;
  components: readonly Component[];
  links: readonly Link[];
  start: number;
  lastDay: number;
  foundAtOnce: number;
  habits: Required<UnseenHabits>;
}): Visit[] {
  const { random, unit, model, components, links, start, lastDay, foundAtOnce, habits } = world;
  const hoursADay = ((random() < 0.15 ? 350 : 60) * Math.exp(0.4 * normal(random))) / SEASON_DAYS;
  const frailty = gammaOfShape4(random);
  const visits: Visit[] = [];
  const known = new Map<number, number>();
  const hoursAt = (day: number) => {
    const before = known.get(day);
    if (before !== undefined) return before;
    let hours = 0;
    for (let year = start; year < day; year += 365)
      hours += Math.min(SEASON_DAYS, seasonDays(year, Math.min(day, year + 365))) * hoursADay;
    known.set(day, hours);
    return hours;
  };
  const dayAt = (hours: number) => {
    let low = start;
    let high = lastDay + 400;
    if (hoursAt(high) < hours) return Infinity;
    while (high - low > 1) {
      const middle = Math.floor((low + high) / 2);
      if (hoursAt(middle) < hours) low = middle;
      else high = middle;
    }
    return high;
  };
  const lifeOf = ({ shape, scale }: Component) => scale * (-Math.log(1 - random()) / frailty) ** (1 / shape);
  const next = new Map(components.map((component) => [component.name, lifeOf(component)]));
  const renew = (name: string, hours: number) => {
    const component = components.find((one) => one.name === name);
    if (component) next.set(name, hours + lifeOf(component));
  };
  const visit = (day: number, complaint: string, lines: Line[]) => {
    const hours = hoursAt(day);
    for (const { component } of lines) renew(component, hours);
    visits.push({ day, unit, model, hours, lines, complaint });
  };
  let serviced = start;
  for (let guard = 0; guard < 200; guard++) {
    const [name, atHours] = [...next].reduce((soonest, each) => (each[1] < soonest[1] ? each : soonest));
    const day = dayAt(atHours);
    // A yearly service comes before the next failure where it is due; it finds some of what is about to fail.
    if (serviced + 365 < Math.min(day, lastDay)) {
      serviced += 330 + Math.floor(random() * 60);
      if (random() < 0.6) {
        const lines = SERVICE.filter(() => random() < 0.8).map((component) => ({
          component,
          reason: 'maintenance',
          cents: 1500,
        }));
        const soon = [...next].filter(([, hours]) => hours < hoursAt(serviced) + 15 && random() < 0.5);
        lines.push(...soon.map(([component]) => ({ component, reason: 'preventive', cents: 6000 })));
        if (lines.length > 0) visit(serviced, 'yearly service', lines);
      }
      continue;
    }
    if (day > lastDay) break;
    const damaged = links
      .filter(({ causal, holds }) => causal === name && random() < holds)
      .map(({ resultant }) => resultant);
    let at = day;
    for (let tries = 0; damaged.length > 0 && tries < 4 && random() > foundAtOnce; tries++) {
      visit(
        at,
        'quit again',
        damaged.map((component) => ({ component, reason: 'failed', cents: 2500 })),
      );
      at += 2 + Math.floor(-Math.log(1 - random()) * habits.returnDays);
    }
    if (at > lastDay) break;
    const isLeft = at > day && habits.cureWithResultant < 1 && random() >= habits.cureWithResultant;
    const along = components.filter((one) => one.name !== name && random() < 0.01).map((one) => one.name);
    visit(at, 'quit', [
      { component: name, reason: 'failed', cents: 12_000 },
      ...(isLeft ? [] : damaged).map((component) => ({
        component,
        reason: random() < habits.codedDamage ? 'damage' : 'failed',
        cents: 2500,
      })),
      ...along.map((component) => ({ component, reason: 'preventive', cents: 4000 })),
    ]);
  }
  return visits;
}

/** Days between two days on which machines run: a winter stands in every year. */
function seasonDays(from: number, to: number): number {
  let days = 0;
  for (let day = from; day < to; day += 5) {
    const ofYear = ((day % 365.25) + 365.25) % 365.25;
    if (ofYear > 85 && ofYear < 85 + SEASON_DAYS) days += Math.min(5, to - day);
  }
  return days;
}

const COLUMNS =
  'repair_number,opened_on,closed_on,unit_serial,maker,model,product_type,in_service_on,meter_hours,complaint,technician,component,part_number,line_reason,quantity,part_amount,labor_hours,labor_amount';

function write(visits: readonly Visit[], inService: ReadonlyMap<number, number>, random: () => number) {
  const out = [COLUMNS];
  const date = (day: number) => new Date(day * 86_400_000).toISOString().slice(0, 10);
  visits.forEach((visit, index) => {
    const hours =
      random() < 0.12
        ? ''
        : random() < 0.2
          ? String(Math.round(visit.hours / 10) * 10)
          : visit.hours.toFixed(1);
    const repair = `W${10_000 + index},${date(visit.day)},${date(visit.day + Math.floor(random() * 4))},UX-${50_000 + visit.unit},Unseen Works,${visit.model},lawn_tractor,${date(inService.get(visit.unit) ?? visit.day)},${hours},${visit.complaint},T${1 + (visit.unit % 5)}`;
    visit.lines.forEach((line, at) => {
      const reason =
        random() < 0.04
          ? (['failed', 'maintenance', 'preventive', 'damage'][Math.floor(random() * 4)] ?? '')
          : line.reason;
      const labor = at === 0 ? '1.2,108.00' : ',';
      out.push(
        `${repair},${line.component},${line.component.slice(0, 3).toUpperCase()}-${line.component.length}${visit.model},${reason},1,${(line.cents / 100).toFixed(2)},${labor}`,
      );
    });
  });
  return { csv: `${out.join('\r\n')}\r\n`, rows: out.length - 1, repairs: visits.length };
}

function generator(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

function normal(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** Gamma of mean 1 and shape 4: a coefficient of variation of one half. */
function gammaOfShape4(random: () => number): number {
  let sum = 0;
  for (let i = 0; i < 4; i++) sum -= Math.log(1 - random());
  return sum / 4;
}
