/** Everything about a simulated shop that can be turned: its size, its truth, and how dirty its records are. */
export type ShopSettings = {
  seed: number;
  models: number;
  /** Units of each model; `tail` spreads `models × unitsPerModel` units over the models by a long tail. */
  unitsPerModel: number;
  tail: boolean;
  years: number;
  components: number;
  componentsPerModel: number;
  /** Mean hours between own failures of a component, log-uniform between the two. */
  lifeHours: readonly [number, number];
  hoursPerYear: readonly [number, number];
  frailtyCv: number;
  /** Use in winter as a share of use in season; 1 is no winter. */
  winterUse: number;
  links: number;
  /** Share of the models with both components in which a link is at work. */
  linkModels: number;
  linkHolds: readonly [number, number];
  foundFirst: readonly [number, number];
  returnDays: readonly [number, number];
  /** Share of cures in which the resultant part is replaced along with the causal one. */
  cureWithResultant: number;
  /** Share of broken resultant parts coded `damage` when the cause is found beside them. */
  codedDamage: number;
  /** `pairs` apart, `chain` A → B → C, `fork` one cause of two results. */
  shape: 'pairs' | 'chain' | 'fork' | 'mixed';
  /** Unlinked pairs that wear out at one age. */
  sameAge: number;
  sameAgeShape: number;
  /** Median age of the second of a same-age pair, relative to the first. */
  sameAgeRatio: number;
  /** Unlinked pairs where one is changed as well while the machine is apart. */
  changedApart: number;
  changedApartShare: number;
  changedApartReason: 'preventive' | 'failed';
  /** Components changed together at a service. */
  serviceItems: number;
  servicesPerYear: number;
  /** Hours ahead that a service sees a failure coming, and how often. */
  serviceSeesHours: number;
  serviceSees: number;
  /** Share of own failures after which the same part fails again within weeks (bad part, poor work). */
  repeats: number;
  miscoded: number;
  unknownReasons: number;
  hoursMissing: number;
  hoursRounded: number;
  unknownHistory: number;
  /** Whether the shop knows its register (contract: without units, exposure is first to last visit). */
  register: boolean;
};

export const shopDefaults: ShopSettings = {
  seed: 1,
  models: 8,
  unitsPerModel: 400,
  tail: false,
  years: 5,
  components: 18,
  componentsPerModel: 14,
  lifeHours: [250, 1500],
  hoursPerYear: [40, 300],
  frailtyCv: 0.5,
  winterUse: 0.15,
  links: 4,
  linkModels: 0.6,
  linkHolds: [0.5, 1],
  foundFirst: [0.25, 0.75],
  returnDays: [5, 30],
  cureWithResultant: 0.7,
  codedDamage: 0.3,
  shape: 'mixed',
  sameAge: 2,
  sameAgeShape: 5,
  sameAgeRatio: 1,
  changedApart: 2,
  changedApartShare: 0.5,
  changedApartReason: 'preventive',
  serviceItems: 3,
  servicesPerYear: 1,
  serviceSeesHours: 30,
  serviceSees: 0.3,
  repeats: 0.02,
  miscoded: 0.04,
  unknownReasons: 0,
  hoursMissing: 0.12,
  hoursRounded: 0.2,
  unknownHistory: 1 / 3,
  register: true,
};
