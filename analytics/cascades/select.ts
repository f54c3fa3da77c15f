import type { JudgedName, JudgedPair } from './pool';

export type Selected = {
  judged: JudgedPair;
  kind: 'cascade' | 'together';
  /** Whether A, the alphabetically first, is the causal one; meaningless for together. */
  aCauses: boolean;
  declared: boolean;
  localFalseDiscovery: number;
  qValue: number;
};

/** The two limits sum to the limit of the whole; where nothing declared was examined, all of it is for the search. */
const DECLARED_SHARE = 0.4;
/** Nothing is claimed of a pair that is one of its kind less surely than so many limits (0.2 at 0.05; Efron 2010, 5.2). */
const LOCAL_LIMITS = 4;
/** Below so many episodes and visits nothing is claimed. */
const FLOOR = { episodes: 2, visits: 4 };

type Candidate = Omit<Selected, 'qValue'>;

const isAboveFloor = ({ pair, evidence: e }: JudgedPair) =>
  e.aFirst + e.bFirst + e.together >= FLOOR.episodes && pair.linkedVisits >= FLOOR.visits;

/**
 * The model's own records must not lean the other way: what others lend does not turn them round. An even or
 * nearly even split passes only beside episodes that began with both.
 */
const leansTo = ({ evidence: e }: JudgedPair, aCauses: boolean) => {
  const [cureLater, cureFirst] = aCauses ? [e.bFirst, e.aFirst] : [e.aFirst, e.bFirst];
  return cureLater > cureFirst || (e.together >= 2 && cureFirst <= cureLater + 1);
};

const compare = (x: Candidate, y: Candidate) =>
  x.localFalseDiscovery - y.localFalseDiscovery ||
  x.judged.pair.model - y.judged.pair.model ||
  x.judged.pair.a - y.judged.pair.a ||
  x.judged.pair.b - y.judged.pair.b;

/** q of each = the smallest limit at which the mean local rate of it and all surer ones, and its own, stay within theirs. */
const withQ = (candidates: Candidate[], share: number): Selected[] => {
  candidates.sort(compare);
  let sum = 0;
  return candidates.map((candidate, at) => {
    sum += candidate.localFalseDiscovery;
    const qValue = Math.max(sum / (at + 1) / share, candidate.localFalseDiscovery / LOCAL_LIMITS);
    return { ...candidate, qValue: Math.min(1, qValue) };
  });
};

const selectFrom = (
  names: readonly JudgedName[],
  declared: boolean,
  share: number,
  limit: number,
): Selected[] => {
  const eligible = names.flatMap(({ byModel }) => [...byModel.values()]).filter(isAboveFloor);
  const directed = eligible.flatMap((judged): Candidate[] => {
    const { posterior } = judged;
    const aCauses = posterior.aCauses > posterior.bCauses;
    if (!leansTo(judged, aCauses)) return [];
    const localFalseDiscovery = 1 - Math.max(posterior.aCauses, posterior.bCauses);
    return [{ judged, kind: 'cascade', aCauses, declared, localFalseDiscovery }];
  });
  const cascades = withQ(directed, share).filter(({ qValue }) => qValue <= limit);
  const taken = new Set(cascades.map(({ judged }) => judged));
  const rest = eligible
    .filter((judged) => !taken.has(judged))
    .map((judged): Candidate => ({
      judged,
      kind: 'together',
      aCauses: true,
      declared,
      localFalseDiscovery: judged.posterior.nothing,
    }));
  return [...cascades, ...withQ(rest, share).filter(({ qValue }) => qValue <= limit)];
};

export const selectFindings = (
  pooled: { declared: readonly JudgedName[]; searched: readonly JudgedName[] },
  declaredPairs: number,
  limit: number,
): Selected[] => {
  const declaredShare = declaredPairs > 0 ? DECLARED_SHARE : 0;
  return [
    ...selectFrom(pooled.declared, true, declaredShare, limit),
    ...selectFrom(pooled.searched, false, 1 - declaredShare, limit),
  ];
};
