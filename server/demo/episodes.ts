import type { Component } from './components';
import { componentNamed } from './components';
import { openVisit, replace, technicianFor, tellLater } from './history';
import type { History } from './history';
import { inspect } from './inspection';
import {
  CHAIN_COMPLAINTS,
  FOUND_CAUSE,
  RESULTANT_CAUSES,
  RESULTANT_FIXES,
  fillIn,
  inHand,
  sayComplaint,
  troubleOf,
} from './phrases';
import type { Words } from './phrases';
import { payTypeOf } from './terms';
import type { Visit } from './visits';

interface EpisodeState {
  first?: Visit;
  visitsBefore?: number;
  /** A month in which nobody looked further than the burnt part. */
  careless?: boolean;
}

const MOST_VISITS = 4;

function wordsOf(
  history: History,
  causal: Component,
  broken: readonly string[],
  found: boolean,
  again: boolean,
): Words {
  const { random } = history;
  const complaint = sayComplaint(
    random,
    CHAIN_COMPLAINTS[causal.name] ?? troubleOf(causal.name).complaints,
    again,
  );
  if (!found) {
    const part = broken.join(' & ');
    const cause = fillIn(random.pick(RESULTANT_CAUSES), part);
    const correction = fillIn(random.pick(RESULTANT_FIXES), part);
    return { complaint, cause: inHand(random, cause), correction: inHand(random, correction), notes: '' };
  }
  const cause = random.chance(0.5)
    ? fillIn(random.pick(FOUND_CAUSE), causal.name, broken)
    : random.pick(troubleOf(causal.name).causes);
  const correction = `${random.pick(troubleOf(causal.name).fixes)}; also ${broken.join(' & ').toLowerCase()}`;
  return { complaint, cause: inHand(random, cause), correction: inHand(random, correction), notes: '' };
}

/** The parts that gave up this time: at least one of those that the causal part can take. */
function brokenNow(history: History, damaged: readonly string[]): string[] {
  const broken = damaged.filter(() => history.random.chance(0.62));
  return broken.length > 0 ? broken : [history.random.pick(damaged)];
}

/**
 * A causal component that takes others with it. Until somebody finds it, the machine gets the cheap part that burnt,
 * goes home, and returns in days or weeks.
 */
export function tellChain(
  history: History,
  day: number,
  causal: Component,
  damaged: readonly string[],
  state: EpisodeState,
): void {
  const { random, wear } = history;
  const before = state.visitsBefore ?? 0;
  const technician = technicianFor(history, day);
  const skill = state.careless && before === 0 ? 0 : technician.findsCause + 0.22 * before;
  const found = before >= MOST_VISITS - 1 || random.chance(skill);
  const broken = brokenNow(history, damaged);
  const visit = openVisit(history, day, {
    kind: 'trouble',
    subject: found ? causal : componentNamed(broken[0] ?? causal.name),
    words: wordsOf(history, causal, broken, found, before > 0 && random.chance(0.6)),
    payType:
      state.first && random.chance(0.55)
        ? 'shop'
        : payTypeOf(history, found ? causal : componentNamed(broken[0] ?? causal.name), day),
    technician,
    ...(state.first ? { comeback: { reason: 'cause_missed', first: state.first } } : {}),
  });
  if (found) replace(history, visit, causal.name, 'failed');
  for (const name of broken) replace(history, visit, name, found && random.chance(0.6) ? 'damage' : 'failed');
  inspect(history, visit, causal.name);
  if (found) return;
  wear.suspend(causal);
  const lagDays = 2 + Math.min(75, Math.round(random.exponential(17)));
  tellLater(history, visit.pickedUpDay + lagDays, (later) => {
    tellChain(history, later, causal, damaged, { ...state, first: visit, visitsBefore: before + 1 });
  });
}
