import type { FindingWhole } from '../../../shared/findings';
import type { EpisodeRow } from '../../components/charts/episode-chart';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';

type Episode = FindingWhole['cases'][number];
export type EpisodeClock = 'hours' | 'days';

const SPEAKS = ['for', 'against', 'neutral'] as const;
/** Hours are shown where nearly all episodes have them at every visit. */
const ENOUGH_WITH_HOURS = 0.8;

const hasHours = (episode: Episode) => episode.visits.every(({ hoursIn }) => hoursIn !== null);

export function usualClock(all: readonly Episode[]): EpisodeClock {
  const cases = all.filter(({ visits }) => visits.length > 1);
  return cases.filter(hasHours).length >= cases.length * ENOUGH_WITH_HOURS ? 'hours' : 'days';
}

const placeOf = (visit: Episode['visits'][number], clock: EpisodeClock): number =>
  Math.max(0, clock === 'hours' ? (visit.hoursIn ?? 0) : visit.daysIn);

const lengthOf = (episode: Episode, clock: EpisodeClock): number =>
  Math.max(0, ...episode.visits.map((visit) => placeOf(visit, clock)));

/** Those that can be drawn on this clock: for, against, neutral; each the longest first. One visit is no line. */
export function drawable(cases: readonly Episode[], clock: EpisodeClock): Episode[] {
  return cases
    .filter((episode) => episode.visits.length > 1 && (clock === 'days' || hasHours(episode)))
    .sort(
      (a, b) =>
        SPEAKS.indexOf(a.speaks) - SPEAKS.indexOf(b.speaks) || lengthOf(b, clock) - lengthOf(a, clock),
    );
}

/** Evenly picked through the order, so that what speaks against is among them in its proportion. */
export function evenly<Item>(items: readonly Item[], most: number): Item[] {
  if (items.length <= most) return [...items];
  const step = (items.length - 1) / (most - 1);
  return Array.from({ length: most }, (_, index) => items[Math.round(index * step)]).filter(
    (item) => item !== undefined,
  );
}

type Words = { clock: EpisodeClock; causal: string; resultant: string; formats: Formats };

export function episodeRow(
  episode: Episode,
  index: number,
  { clock, causal, resultant, formats }: Words,
): EpisodeRow {
  const place = (visit: Episode['visits'][number]) =>
    clock === 'hours' ? formats.hours(placeOf(visit, clock), 0) : formats.days(placeOf(visit, clock));
  const lines = episode.visits.map((visit) => {
    const names = [visit.causal ? causal : '', visit.resultant ? resultant : ''].filter(Boolean);
    return `${formats.day(visit.on)}, ${place(visit)}: ${names.join(' and ') || 'neither'} (${visit.repair.name})`;
  });
  return {
    id: `${episode.unit.id} ${index}`,
    name: episode.unit.name,
    href: paths.unit(episode.unit.id),
    label: `${episode.unit.name}: ${episode.why} ${lines.join('; ')}`,
    tip: { heading: episode.unit.name, lines: [episode.why, ...lines] },
    marks: episode.visits.map((visit) => ({
      at: placeOf(visit, clock),
      shape:
        visit.causal && visit.resultant
          ? 'both'
          : visit.causal
            ? 'diamond'
            : visit.resultant
              ? 'dot'
              : 'ring',
    })),
  };
}

/** From the first visit to the end of the longest trouble, in round steps. */
export function episodeScale(cases: readonly Episode[], clock: EpisodeClock) {
  const longest = Math.max(1, ...cases.map((episode) => lengthOf(episode, clock)));
  const step = [1, 2, 5, 10, 20, 50, 100, 200, 500].find((size) => longest / size <= 5) ?? 1000;
  const count = Math.ceil(longest / step);
  return {
    end: count * step,
    ticks: Array.from({ length: count + 1 }, (_, index) => ({
      at: index * step,
      text:
        index === count ? `${index * step}\u202f${clock === 'hours' ? 'h' : 'days'}` : String(index * step),
    })),
  };
}
