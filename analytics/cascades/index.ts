export { declaredChains } from './declared-chains';
export { findCascades } from './find-cascades';
export type {
  CascadeCase,
  CascadeCaseFile,
  CascadeCounts,
  CascadeEvidence,
  CascadeExamined,
  CascadeFinding,
  CascadeOptions,
  CascadeResult,
  CascadeVisit,
  CascadeWarning,
  CaseVisit,
  DeclaredChain,
  ModelFamily,
  ObservedUnit,
} from './types';
