import { CHAINS } from './cascades';
import type { ComebackReason } from './comebacks';
import { SAME_AGE_PAIRS, SERVICE_PAIRS } from './components';
import type { Life } from './components';
import { MODELS, modelsOfFamily } from './makers';
import type { Numbered } from './tickets';
import type { Visit } from './visits';

export interface PlantedComeback {
  location: string;
  repairNumber: string;
  firstLocation: string;
  firstRepairNumber: string;
  reason: ComebackReason;
}

/** What was planted in the demo, for tests and for the demo's own decisions on comebacks. */
export interface Truth {
  cascades: {
    family: string;
    models: { maker: string; model: string }[];
    causal: string;
    resultant: string;
  }[];
  sameAgePairs: (readonly [string, string])[];
  servicePairs: (readonly [string, string])[];
  supersession: { oldNumber: string; newNumber: string; oldLife: Life; newLife: Life };
  comebacks: PlantedComeback[];
  /** The month, 'YYYY-MM', in which nobody looked behind burnt fuses. */
  badMonth: string;
}

export function truthOf(
  numbered: readonly Numbered[],
  badMonth: string,
  supersession: Truth['supersession'],
): Truth {
  const numberOf = new Map<Visit, string>(numbered.map(({ visit, repairNumber }) => [visit, repairNumber]));
  const { oldNumber, newNumber, oldLife, newLife } = supersession;
  return {
    cascades: CHAINS.flatMap(({ family, causal, resultants }) => {
      const inFamily = modelsOfFamily(family);
      const models = MODELS.filter(({ model }) => inFamily.has(model)).map(({ maker, model }) => ({
        maker,
        model,
      }));
      return resultants.map(({ component }) => ({ family, models, causal, resultant: component }));
    }),
    sameAgePairs: [...SAME_AGE_PAIRS],
    servicePairs: [...SERVICE_PAIRS],
    supersession: { oldNumber, newNumber, oldLife: { ...oldLife }, newLife: { ...newLife } },
    comebacks: numbered.flatMap(({ visit, repairNumber }) => {
      const first = visit.comeback?.first;
      const firstRepairNumber = first && numberOf.get(first);
      if (!visit.comeback || !first || firstRepairNumber === undefined) return [];
      const { reason } = visit.comeback;
      return [
        { location: visit.location, repairNumber, firstLocation: first.location, firstRepairNumber, reason },
      ];
    }),
    badMonth,
  };
}
