import { requireThat } from '../requirement';
import { declaredChains, foldName } from './declared-chains';
import type { Examined } from './examine';
import { examine } from './examine';
import { toFinding } from './finding';
import type { Histories } from './histories';
import { buildHistories } from './histories';
import { episodesOf, toCases } from './pair-view';
import type { JudgedName } from './pool';
import { poolModels } from './pool';
import type { Selected } from './select';
import { selectFindings } from './select';
import type {
  CascadeCaseFile,
  CascadeExamined,
  CascadeFinding,
  CascadeOptions,
  CascadeResult,
  CascadeVisit,
} from './types';
import { validateCascades } from './validate';

/** So many case files at most. */
const MOST_CASE_FILES = 200;
/** A pair is worth a file from so many episodes on. */
const FILE_EPISODES = 2;

const lastDay = (visits: readonly CascadeVisit[], options: CascadeOptions) => {
  let last = -Infinity;
  for (const { day } of visits) last = Math.max(last, day);
  for (const { toDay } of options.units ?? []) last = Math.max(last, toDay);
  return last;
};

const declaredPairs = (components: readonly string[], options: CascadeOptions) => {
  const folded = new Set(
    (options.declared ?? declaredChains).map(({ causal, resultant }) =>
      [foldName(causal), foldName(resultant)].sort().join('\u0000'),
    ),
  );
  const names = components.map(foldName);
  return (a: number, b: number) => folded.has([names[a] ?? '', names[b] ?? ''].sort().join('\u0000'));
};

/** Pairs in which both parts failed: by model for what is said, by name for the prior. */
const countPairs = (
  { models }: Examined,
  components: number,
  isDeclared: (a: number, b: number) => boolean,
) => {
  const byName = new Map<number, boolean>();
  const counts = { pairs: 0, declaredPairs: 0, searchedPairs: 0 };
  for (const { failures } of models) {
    const failed = [...failures.keys()].sort((x, y) => x - y);
    failed.forEach((a, at) => {
      for (const b of failed.slice(at + 1)) {
        const key = a * components + b;
        let declared = byName.get(key);
        if (declared === undefined) byName.set(key, (declared = isDeclared(a, b)));
        counts.pairs += 1;
        if (declared) counts.declaredPairs += 1;
        else counts.searchedPairs += 1;
      }
    });
  }
  const declared = [...byName.values()].filter(Boolean).length;
  return { ...counts, names: { declared, searched: byName.size - declared } };
};

const byText = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0);

/** Models, other than this one, whose own records make the same kind of finding likelier than not. */
const lenders = (selected: Selected, names: readonly JudgedName[], histories: Histories): string[] => {
  const { a, b, model } = selected.judged.pair;
  const name = names.find((one) => one.a === a && one.b === b);
  return [...(name?.byModel ?? [])]
    .filter(([at, { posterior }]) => {
      const { aCauses, bCauses, nothing } = posterior;
      const likely = selected.kind === 'together' ? 1 - nothing : selected.aCauses ? aCauses : bCauses;
      return at !== model && likely > 0.5;
    })
    .map(([at]) => histories.models[at]?.model ?? '')
    .sort(byText);
};

/** The pairs likeliest to be something that are not found to be. */
const caseFilesOf = (
  examined: Examined,
  components: readonly string[],
  windowDays: number,
  names: readonly JudgedName[],
  found: ReadonlySet<unknown>,
): CascadeCaseFile[] =>
  names
    .flatMap(({ byModel }) => [...byModel.values()])
    .map((judged) => {
      const { aFirst, bFirst, together } = judged.evidence;
      return { ...judged, isFound: found.has(judged), episodes: aFirst + bFirst + together };
    })
    .filter(({ episodes, isFound }) => episodes >= FILE_EPISODES && !isFound)
    .sort(
      (x, y) =>
        x.posterior.nothing - y.posterior.nothing ||
        x.pair.model - y.pair.model ||
        x.pair.a - y.pair.a ||
        x.pair.b - y.pair.b,
    )
    .slice(0, MOST_CASE_FILES)
    .flatMap(({ pair, episodes }) => {
      const model = examined.models[pair.model];
      if (!model) return [];
      const seen = episodesOf(model, pair.units, pair.a, pair.b, windowDays);
      return {
        model: model.history.model,
        components: [components[pair.a] ?? '', components[pair.b] ?? ''],
        episodes,
        cases: toCases(seen, components, false),
      };
    });

const compareFindings = (x: CascadeFinding, y: CascadeFinding) =>
  byText(x.model, y.model) ||
  byText(x.kind, y.kind) ||
  x.qValue - y.qValue ||
  byText(x.causal, y.causal) ||
  byText(x.resultant, y.resultant);

/** Without a direction there is only the excess to go by: the pair's own limits must lie above one. */
const isExcess = ({ excessRatioLimits: { lower } }: CascadeFinding) => lower !== null && lower > 1;

/**
 * Which component, left in, takes which other with it: a causal part told apart from the parts that it breaks, and
 * both from parts that wear out at one age or are changed together.
 *
 * Only lines coded `failed` or `damage` count as failures; every replacement, whatever its reason, starts a new
 * life. Visits of one unit on one day are one. An **episode** of a pair is a run of visits that replaced either
 * part, each within `windowDays` of the one before.
 *
 * 1. *Repeat until cured.* After the resultant part alone, trouble is soon back, or the same part goes again,
 *    until the causal part is found. Reported as returns after the resultant part alone against after both, exact
 *    limits and Fisher's one-sided test (Fisher 1935), where the window is complete.
 * 2. *Excess.* One part after the other against the number expected from the second's own failure rate at its age,
 *    over the days in which it would have been counted; ages on hours where they are read, else days. What lifts
 *    all pairs of the shop alike (frailty: 1 + cv²; the season) is estimated from the pairs that are nothing.
 * 3. *Direction.* Sequence symmetry (Hallas 1996): resultant-first against causal-first, whose ratio under chance
 *    is the ratio of the expected numbers (the null ratio, Tsiropoulos 2009). Traits of a machine cancel in it.
 *    Both at one visit says that they belong together and nothing of which way; a part coded as damage does, and so
 *    does which part, alone at first, is replaced again beside the other.
 * 4. *Many pairs.* Each pair has one of four explanations (nothing, together, either causes the other), each with a
 *    likelihood of its counts that is wider than Poisson. Their shares over all pairs are fitted by empirical
 *    Bayes; findings are taken while the mean local false discovery rate stays within the limit (Efron 2010, ch. 5;
 *    the Bayesian form of Benjamini & Hochberg 1995). Declared chains have 0.4 of the limit, all else 0.6;
 *    all of it is for the search where no declared pair was examined.
 * 5. *Few units.* A pair of names that is something is so in an unknown share of the models (of each family, where
 *    families are given): models lend each other strength, and `borrowedFrom` names those that did. A pair of one
 *    model may also stray from what its names are elsewhere; how many do is fitted to the shop. A model's own
 *    records must still lean the same way, in two or more episodes of four or more visits.
 *
 * Order of replacement is not order of cause, and records alone never test a cause: the strongest word of evidence
 * here is *replaced before*. Below the limit, pairs seen together twice or more are `caseFiles`: nothing is claimed.
 * Days and hours in; counts, ratios and probabilities out.
 *
 * Sources: Efron (2010), Large-Scale Inference; Hallas (1996), Epidemiology 7; Tsiropoulos, Andersen & Hallas
 * (2009), Pharmacoepidemiol Drug Saf 18; Fisher (1935), JRSS 98; Benjamini & Hochberg (1995), JRSS B 57.
 *
 * @throws {RequirementError} where a day, reading or option is not a finite number in its range
 * @example findCascades(visits, { units, asOfDay: 20_000 }).findings[0]
 * // { model: '…', causal: 'PTO clutch', resultant: 'PTO switch', kind: 'cascade', qValue: 0.003, … }
 */
export function findCascades(visits: readonly CascadeVisit[], options: CascadeOptions = {}): CascadeResult {
  validateCascades(visits, options);
  const { windowDays = 90, maxFalseDiscovery = 0.05 } = options;
  const asOfDay = options.asOfDay ?? lastDay(visits, options);
  requireThat(!Number.isNaN(asOfDay), 'findCascades', 'a day to look back from');
  const histories = buildHistories(visits, options, asOfDay);
  const { components, warnings } = histories;
  const examined = examine(histories, windowDays);
  const isDeclared = declaredPairs(components, options);
  const { names, ...pairCounts } = countPairs(examined, components.length, isDeclared);

  const familyByModel = new Map(
    (options.families ?? []).flatMap(({ name, models }) => models.map((model) => [model, name] as const)),
  );
  const familyAt = (at: number) => familyByModel.get(histories.models[at]?.model ?? '');
  const pooled = poolModels({
    examined,
    components: components.length,
    windowDays,
    familyOf: (at) => familyAt(at) ?? '',
    isDeclared,
    declaredPairs: { names: names.declared, entries: pairCounts.declaredPairs },
    searchedPairs: { names: names.searched, entries: pairCounts.searchedPairs },
  });
  const selected = selectFindings(pooled, pairCounts.declaredPairs, maxFalseDiscovery);
  const kept = new Set<unknown>();
  const findings = selected.flatMap((one) => {
    const { model: at } = one.judged.pair;
    const model = examined.models[at];
    if (!model) return [];
    const list = one.declared ? pooled.declared : pooled.searched;
    const borrowedFrom = lenders(one, list, histories);
    const finding = toFinding(one, {
      model,
      names: components,
      windowDays,
      family: familyAt(at),
      borrowedFrom,
    });
    if (finding.kind === 'together' && !isExcess(finding)) return [];
    kept.add(one.judged);
    return [finding];
  });

  const all = histories.linesKnown + histories.linesUnknown;
  if (histories.linesUnknown > 0.2 * all) warnings.add('unknownReasons');
  if (examined.models.every(({ failures }) => failures.size === 0)) warnings.add('noFailures');
  if (examined.clock === 'days') warnings.add('noHours');
  const counts: CascadeExamined = {
    models: histories.models.length,
    units: histories.models.reduce((sum, { units }) => sum + units.length, 0),
    visits: histories.visits,
    ...pairCounts,
    linesKnown: histories.linesKnown,
    linesUnknown: histories.linesUnknown,
    clock: examined.clock,
  };
  return {
    findings: findings.sort(compareFindings),
    caseFiles: caseFilesOf(examined, components, windowDays, [...pooled.declared, ...pooled.searched], kept),
    examined: counts,
    warnings: [...warnings].sort(byText),
  };
}
