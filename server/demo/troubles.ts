import { chainOf, damagedBy } from './cascades';
import type { ComebackPlan } from './comebacks';
import { pickComeback } from './comebacks';
import type { Component } from './components';
import { COMPONENTS, componentNamed } from './components';
import { tellChain } from './episodes';
import { hoursAt, openVisit, replace, technicianFor, tellLater, work } from './history';
import type { History, Opening } from './history';
import { inspect } from './inspection';
import { cureWords, failureWords, fillIn, inHand, sayComplaint, troubleOf } from './phrases';
import type { Words } from './phrases';
import { payTypeOf } from './terms';
import type { Visit } from './visits';

const has = (history: History, name: string): boolean =>
  COMPONENTS.some((entry) => entry.name === name && entry.builds.includes(history.unit.model.build));

function firstWords(
  history: History,
  component: Component,
  plan: ComebackPlan | undefined,
  cured: boolean,
): Words {
  const { random } = history;
  const words = cured ? cureWords(random, component.name) : failureWords(random, component.name);
  if (!plan?.firstWork) return words;
  return {
    ...words,
    cause: plan.reason === 'not_duplicated' ? '' : words.cause,
    correction: inHand(random, fillIn(random.pick(plan.firstCorrections ?? ['looked over']), component.name)),
    notes: plan.firstNotes ? inHand(random, fillIn(random.pick(plan.firstNotes), component.name)) : '',
  };
}

function returnVisit(
  history: History,
  day: number,
  first: Visit,
  component: Component,
  plan: ComebackPlan,
): void {
  const { random } = history;
  const other = plan.component ? componentNamed(plan.component) : component;
  const opening: Opening = {
    kind: 'trouble',
    subject: other,
    words: {
      complaint: sayComplaint(
        random,
        plan.complaints ?? troubleOf(component.name).complaints,
        plan.component !== 'Tire',
      ),
      cause: inHand(random, fillIn(random.pick(plan.causes), component.name)),
      correction: inHand(random, fillIn(random.pick(plan.corrections), component.name)),
      notes: '',
    },
    payType: plan.payType,
    technician: random.chance(0.5) ? first.technician : technicianFor(history, day),
    comeback: { reason: plan.reason, first },
    benchDays: random.whole(0, 3),
  };
  const visit = openVisit(history, day, opening);
  if (plan.work) work(visit, other.name, plan.work);
  else replace(history, visit, component.name, plan.reason === 'wrong_part' ? '' : 'failed');
  inspect(history, visit, component.name);
}

/** One component gives out: it is replaced, or cured without a part, and now and then the machine comes back. */
function tellFailure(history: History, day: number, component: Component): void {
  const { random, wear } = history;
  const plan = pickComeback(random, component.system, has(history, 'Tire'));
  const cured = !plan && component.cure !== undefined && random.chance(component.cure.share);
  const visit = openVisit(history, day, {
    kind: 'trouble',
    subject: component,
    words: firstWords(history, component, plan, cured),
    payType: payTypeOf(history, component, day),
    technician: technicianFor(history, day),
  });
  const hours = hoursAt(history, visit.openedDay);
  const firstWork = plan?.firstWork ?? (cured ? component.cure?.work : undefined);
  if (firstWork) {
    work(visit, component.name, firstWork);
    wear.extend(component, hours, cured ? random.between(120, 520) : Infinity);
  } else {
    replace(history, visit, component.name, 'failed');
  }
  inspect(history, visit, component.name);
  if (plan) {
    const lag = random.whole(...plan.lagDays);
    tellLater(history, visit.pickedUpDay + lag, (later) =>
      returnVisit(history, later, visit, component, plan),
    );
  }
}

/** What a failing component leads to: a chain where one is planted and holds, else its own repair. */
export function tellTrouble(history: History, day: number, component: Component): void {
  const chain = chainOf(history.unit.model, component.name);
  const damaged = chain ? damagedBy(chain, history.random) : [];
  if (damaged.length > 0) tellChain(history, day, component, damaged, {});
  else tellFailure(history, day, component);
}

/** The first start of spring: fuel that sat all winter, cured with a cleaning. */
export function tellStaleFuel(history: History, day: number): void {
  const carburetor = componentNamed('Carburetor');
  const visit = openVisit(history, day, {
    kind: 'trouble',
    subject: carburetor,
    words: cureWords(history.random, carburetor.name),
    payType: 'customer',
    technician: technicianFor(history, day),
  });
  work(visit, carburetor.name, 'cleaned');
  inspect(history, visit, carburetor.name);
}
