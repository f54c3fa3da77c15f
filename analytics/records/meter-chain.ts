/** A reading that says something; `index` is its place among all. */
export type Candidate = { index: number; day: number; hours: number; oldMeterHours: number | null };
type Step = 'first' | 'on' | 'restart';
export type ChainStep = { position: number; step: Step };

type Link = { score: number; position: number; step: Step; before: Link | null };

const HOURS_A_DAY = 24;
/** Somebody rounds to tens at one visit and reads the meter at the next: it may seem to go back by half of ten. */
const ROUNDING_HOURS = 5;
/** One reading left out as wrong is likelier than a replaced meter. */
const RESTART_PRICE = 1.25;
/** Held back from a restart until a second reading goes on from it. */
const DEPOSIT = 1;
/** Of two readings that exclude each other, the one that asks for the slower running is kept. */
const FAST_STEP_PRICE = 1e-4;
/** How far back a reading looks for the one before it; keeps a machine with thousands of readings linear. */
const LOOK_BACK = 60;
/** Longest chain of readings that meters could have shown, less the price of its restarts. */
export function bestChain(candidates: readonly Candidate[]): ChainStep[] {
  const settled: Link[] = [];
  const fresh: (Link | null)[] = [];
  let end: Link | null = null;
  candidates.forEach((to, position) => {
    let best: Link = { score: 1, position, step: 'first', before: null };
    let restarted: Link | null = null;
    for (let at = Math.max(0, position - LOOK_BACK); at < position; at++) {
      const from = candidates[at];
      const before = settled[at];
      if (!from || !before) continue;
      const step = stepBetween(from, to);
      if (step === 'on' || to.oldMeterHours !== null) {
        const pending = step === 'on' ? fresh[at] : null;
        const worth = 1 - FAST_STEP_PRICE * rateBetween(from, to);
        if (step !== null && before.score + worth > best.score) {
          best = { score: before.score + worth, position, step, before };
        }
        if (pending && pending.score + worth + DEPOSIT > best.score) {
          best = { score: pending.score + worth + DEPOSIT, position, step: 'on', before: pending };
        }
      } else if (step === 'restart') {
        const score = before.score + 1 - RESTART_PRICE - DEPOSIT;
        if (restarted === null || score > restarted.score) restarted = { score, position, step, before };
      }
    }
    settled.push(best);
    fresh.push(restarted);
    if (end === null || best.score > end.score) end = best;
  });
  return withOldMeter(candidates, dropMistypedEnd(candidates, links(end)));
}

function links(end: Link | null): ChainStep[] {
  const chain: ChainStep[] = [];
  for (let link = end; link !== null; link = link.before)
    chain.push({ position: link.position, step: link.step });
  return chain.reverse();
}

/** A last reading far above the machine's own rate that is in line once divided by ten was mistyped. */
function dropMistypedEnd(candidates: readonly Candidate[], chain: ChainStep[]): ChainStep[] {
  const [from, to] = chain.slice(-2).map(({ position }) => candidates[position]);
  const start = candidates[chain[chain.findLastIndex(({ step }) => step !== 'on')]?.position ?? -1];
  if (!from || !to || !start || chain.at(-1)?.step !== 'on') return chain;
  const rate = rateBetween(from, to);
  const usualRate = from.day > start.day ? rateBetween(start, from) : rate;
  const isInLine =
    to.hours / 10 >= from.hours && to.hours / 10 - from.hours <= 3 * usualRate * (to.day - from.day);
  return rate > 10 * usualRate && isInLine ? chain.slice(0, -1) : chain;
}

/** How one meter, or a new one, could have come from one reading to a later one; `null` where it could not. */
export function stepBetween(from: Candidate, to: Candidate): Step | null {
  const days = to.day - from.day;
  if (to.oldMeterHours !== null) {
    const run = to.oldMeterHours - from.hours;
    return run >= 0 && run <= mostHours(days) ? 'restart' : null;
  }
  const gain = to.hours - from.hours;
  if (gain >= -slack(from, to)) return gain <= mostHours(days) ? 'on' : null;
  const nearZero = to.hours <= Math.min(250, from.hours / 2) && to.hours <= mostHours(days);
  return nearZero ? 'restart' : null;
}

/**
 * A reading before the chain that is far above its start belongs to an old meter, unless it is in line once
 * divided by ten: then it was mistyped.
 */
function withOldMeter(candidates: readonly Candidate[], chain: ChainStep[]): ChainStep[] {
  const [first, ...rest] = chain;
  if (!first || first.position === 0 || rest.length === 0) return chain;
  const position = first.position - 1;
  const from = candidates[position];
  const to = candidates[first.position];
  if (!from || !to || stepBetween(from, to) !== 'restart') return chain;
  const meant = from.hours / 10;
  const isMistyped = meant <= to.hours && to.hours <= 4 * meant;
  return isMistyped ? chain : [{ position, step: 'first' }, { ...first, step: 'restart' }, ...rest];
}

function rateBetween(from: Candidate, to: Candidate): number {
  return Math.max(0, to.hours - from.hours) / Math.max(1, to.day - from.day);
}

function slack(from: Candidate, to: Candidate): number {
  const isRounded = from.hours % 10 === 0 || to.hours % 10 === 0;
  return isRounded ? ROUNDING_HOURS : 0;
}

/** The most that a meter can gain in some days. */
export function mostHours(days: number): number {
  return HOURS_A_DAY * Math.max(1, days) + ROUNDING_HOURS;
}
