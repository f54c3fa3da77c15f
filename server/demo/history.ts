import { openDay } from './calendar';
import type { Part } from './catalog';
import type { Component } from './components';
import { componentNamed } from './components';
import type { Unit } from './fleet';
import { pickTechnician } from './people';
import type { Technician } from './people';
import type { Words } from './phrases';
import { createRandom } from './random';
import type { Random } from './random';
import type { LineReason, PlannedLine, Visit } from './visits';
import type { Wear } from './wear';
import { createWear } from './wear';
import type { World } from './world';

interface Later {
  day: number;
  tell: (day: number) => void;
}

/** The life of one machine as the shop sees it: its wear, its visits, and what is still to come. */
export interface History {
  unit: Unit;
  world: World;
  random: Random;
  wear: Wear;
  visits: Visit[];
  later: Later[];
  /** The machine is back with its owner from this day. */
  freeFromDay: number;
  /** Operating hours at which the present meter was put on. */
  meterZeroHours: number;
}

export function startHistory(unit: Unit, world: World): History {
  const random = createRandom(world.seed, 'unit', unit.index);
  return {
    unit,
    world,
    random,
    wear: createWear(unit, random),
    visits: [],
    later: [],
    freeFromDay: unit.inServiceDay,
    meterZeroHours: 0,
  };
}

export function hoursAt({ unit, world }: History, day: number): number {
  return unit.hoursPerYear * world.clocks[unit.model.season].yearsBetween(unit.inServiceDay, day);
}

export function meterAt(history: History, day: number): number | null {
  if (!history.unit.model.hasMeter) return null;
  return Math.max(0.1, hoursAt(history, day) - history.meterZeroHours);
}

export function tellLater(history: History, day: number, tell: (day: number) => void): void {
  history.later.push({ day, tell });
  history.later.sort((a, b) => a.day - b.day);
}

export interface Opening {
  kind: Visit['kind'];
  subject: Component;
  words: Words;
  payType: Visit['payType'];
  technician: Technician;
  comeback?: Visit['comeback'];
  /** Days on the bench, waiting for parts included. */
  benchDays?: number;
}

/** Takes the machine in; visits from before the shop knew it happen, but leave no record. */
export function openVisit(history: History, day: number, opening: Opening): Visit {
  const { random, unit } = history;
  const openedDay = openDay(Math.max(day, history.freeFromDay));
  const readyDay = openDay(openedDay + (opening.benchDays ?? Math.round(random.exponential(3.2))));
  const closedDay = openDay(readyDay + (random.chance(0.75) ? 0 : random.whole(1, 2)));
  const pickedUpDay = openDay(closedDay + Math.round(random.exponential(1.8)));
  const visit: Visit = {
    unit,
    ticketType: opening.kind === 'setup' ? 'setup' : 'repair',
    kind: opening.kind,
    location: random.chance(0.93) ? unit.location : unit.location === 'Route 9' ? 'Mill Street' : 'Route 9',
    openedDay,
    readyDay,
    closedDay,
    pickedUpDay,
    meterHours: meterAt(history, openedDay),
    technician: opening.technician,
    lines: [],
    laborOp: opening.kind === 'service' ? 'SVC-10' : opening.subject.laborOp,
    words: opening.words,
    payType: opening.payType,
    ...(opening.comeback ? { comeback: opening.comeback } : {}),
  };
  history.freeFromDay = pickedUpDay + 1;
  if (openedDay >= unit.knownFromDay) history.visits.push(visit);
  return visit;
}

export function technicianFor(history: History, day: number): Technician {
  return pickTechnician(history.random, history.unit.location, history.world.yearsAgo(day));
}

/** Puts a new part in and writes the line. */
export function replace(history: History, visit: Visit, name: string, reason: LineReason | ''): Part {
  const component = componentNamed(name);
  const { world, unit, random, wear } = history;
  const part = world.catalog.partFor(unit.model, component, visit.readyDay, random);
  visit.lines.push({ kind: 'part', part, reason, laborHours: component.laborHours });
  const hours = hoursAt(history, visit.openedDay);
  wear.install(component, hours, part.isKit);
  if (name === 'Hour meter') {
    const oldReading = (visit.meterHours ?? 0).toFixed(1);
    visit.words = { ...visit.words, notes: `old meter read ${oldReading}, new meter starts at 0` };
    history.meterZeroHours = hours;
  }
  return part;
}

export const isInIt = (visit: Visit, name: string): boolean =>
  visit.lines.some((line) =>
    line.kind === 'part'
      ? line.part.component.name === name
      : line.kind === 'work' && line.component === name,
  );

export function work(visit: Visit, name: string, done: Extract<PlannedLine, { kind: 'work' }>['work']): void {
  const laborHours = done === 'tested_good' || done === 'nothing_found' ? 0.3 : 0.5;
  visit.lines.push({ kind: 'work', component: name, work: done, laborHours });
}
