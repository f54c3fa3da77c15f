import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  date,
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, instant, meterHours, tenantKey } from './columns';
import { families, models, units } from './machines';
import { components, parts } from './parts';
import { users } from './people';
import { repairs } from './repairs';
import { shops } from './shops';

/** One computation of everything derived for a shop; imports close together share one. */
export const analysisRuns = pgTable(
  'analysis_runs',
  {
    ...tenantKey(),
    state: text('state').notNull().default('pending'),
    asOf: date('as_of', { mode: 'string' }),
    requestedAt: instant('requested_at').notNull().defaultNow(),
    startedAt: instant('started_at'),
    finishedAt: instant('finished_at'),
    error: text('error'),
    /** What the run looked at and said: coverage, pairs examined, warnings, case files. */
    summary: jsonb('summary'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('analysis_runs_requested').on(t.shopId, t.requestedAt),
    foreignKey({ columns: [t.shopId], foreignColumns: [shops.id] }).onDelete('cascade'),
    check('analysis_runs_state', sql`${t.state} IN ('pending', 'running', 'ready', 'failed')`),
  ],
);

/** What a repair says about trouble: whether it can come back (else why not), and what was in trouble. Derived. */
export const repairFacts = pgTable(
  'repair_facts',
  {
    shopId: uuid('shop_id').notNull(),
    repairId: uuid('repair_id').notNull(),
    /** not_a_repair, unidentified, maintenance_only; null where it counts in rates. */
    leftOut: text('left_out'),
    troubleComponentIds: uuid('trouble_component_ids').array().notNull(),
    systems: text('systems').array().notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.repairId] }),
    index('repair_facts_judged')
      .on(t.shopId, t.repairId)
      .where(sql`${t.leftOut} IS NULL`),
    foreignKey({
      columns: [t.shopId, t.repairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'repair_facts_repair_fk',
    }).onDelete('cascade'),
    check('repair_facts_left_out', sql`${t.leftOut} IN ('not_a_repair', 'unidentified', 'maintenance_only')`),
  ],
);

/** One installation of one component in one unit, on both clocks. Derived; rebuilt by every analysis. */
export const partLives = pgTable(
  'part_lives',
  {
    ...tenantKey(),
    unitId: uuid('unit_id').notNull(),
    modelId: uuid('model_id'),
    componentId: uuid('component_id').notNull(),
    partId: uuid('part_id'),
    /** fitted (by this shop), in_service (original, known from new), assumed_original. */
    origin: text('origin').notNull(),
    startRepairId: uuid('start_repair_id'),
    endRepairId: uuid('end_repair_id'),
    startOn: date('start_on', { mode: 'string' }),
    endOn: date('end_on', { mode: 'string' }).notNull(),
    /** failed, damage, censored, unknown (reason not recorded). */
    outcome: text('outcome').notNull(),
    entryHours: doublePrecision('entry_hours'),
    exitHours: doublePrecision('exit_hours'),
    entryDays: doublePrecision('entry_days'),
    exitDays: doublePrecision('exit_days'),
    isDeadOnArrival: boolean('is_dead_on_arrival').notNull().default(false),
    setAsideReason: text('set_aside_reason'),
    /** An end of it was not read: its hours lie between the machine's readings before and after. */
    isBetweenReadings: boolean('is_between_readings').notNull().default(false),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    index('part_lives_component').on(t.shopId, t.componentId, t.modelId),
    index('part_lives_unit').on(t.shopId, t.unitId),
    index('part_lives_model').on(t.shopId, t.modelId),
    index('part_lives_part').on(t.shopId, t.partId),
    index('part_lives_start_repair').on(t.shopId, t.startRepairId),
    index('part_lives_end_repair').on(t.shopId, t.endRepairId),
    foreignKey({
      columns: [t.shopId, t.unitId],
      foreignColumns: [units.shopId, units.id],
      name: 'part_lives_unit_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.modelId],
      foreignColumns: [models.shopId, models.id],
      name: 'part_lives_model_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.componentId],
      foreignColumns: [components.shopId, components.id],
      name: 'part_lives_component_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.partId],
      foreignColumns: [parts.shopId, parts.id],
      name: 'part_lives_part_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.startRepairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'part_lives_start_repair_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.endRepairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'part_lives_end_repair_fk',
    }).onDelete('cascade'),
    check('part_lives_origin', sql`${t.origin} IN ('fitted', 'in_service', 'assumed_original')`),
    check('part_lives_outcome', sql`${t.outcome} IN ('failed', 'damage', 'censored', 'unknown')`),
  ],
);

/** A repair that came back; its id is the id of the return, since a repair counts once. Derived. */
export const comebacks = pgTable(
  'comebacks',
  {
    shopId: uuid('shop_id').notNull(),
    returnRepairId: uuid('return_repair_id').notNull(),
    firstRepairId: uuid('first_repair_id').notNull(),
    episodeRepairId: uuid('episode_repair_id').notNull(),
    days: integer('days').notNull(),
    hours: meterHours('hours'),
    /** same_component, same_system, cascade, or a person's word. */
    link: text('link').notNull(),
    suggestedReason: text('suggested_reason').notNull(),
    evidence: text('evidence').notNull(),
    componentId: uuid('component_id'),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.returnRepairId] }),
    index('comebacks_first').on(t.shopId, t.firstRepairId),
    index('comebacks_episode').on(t.shopId, t.episodeRepairId),
    index('comebacks_component').on(t.shopId, t.componentId),
    foreignKey({
      columns: [t.shopId, t.returnRepairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'comebacks_return_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.firstRepairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'comebacks_first_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.episodeRepairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'comebacks_episode_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.componentId],
      foreignColumns: [components.shopId, components.id],
      name: 'comebacks_component_fk',
    }).onDelete('cascade'),
  ],
);

/** A person's word on a return; outlives every import and computation. */
export const comebackDecisions = pgTable(
  'comeback_decisions',
  {
    shopId: uuid('shop_id').notNull(),
    returnRepairId: uuid('return_repair_id').notNull(),
    status: text('status').notNull(),
    reason: text('reason'),
    /** True where a person says that a part that failed again was the shop's doing. */
    isOurs: boolean('is_ours'),
    attachedToRepairId: uuid('attached_to_repair_id'),
    note: text('note').notNull().default(''),
    decidedByUserId: uuid('decided_by_user_id').notNull(),
    decidedAt: instant('decided_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.returnRepairId] }),
    index('comeback_decisions_attached').on(t.shopId, t.attachedToRepairId),
    index('comeback_decisions_decided_by').on(t.decidedByUserId),
    foreignKey({
      columns: [t.shopId, t.returnRepairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'comeback_decisions_return_fk',
    }).onDelete('no action'),
    foreignKey({
      columns: [t.shopId, t.attachedToRepairId],
      foreignColumns: [repairs.shopId, repairs.id],
      name: 'comeback_decisions_attached_fk',
    }).onDelete('no action'),
    foreignKey({ columns: [t.decidedByUserId], foreignColumns: [users.id] }).onDelete('no action'),
    check('comeback_decisions_status', sql`${t.status} IN ('suggested', 'confirmed', 'dismissed')`),
    check(
      'comeback_decisions_reason',
      sql`${t.reason} IN ('part_failed_again', 'cause_missed', 'workmanship', 'wrong_part', 'defective_part', 'work_not_completed', 'not_duplicated', 'operator_or_fuel', 'declined_work', 'unrelated', 'undetermined')`,
    ),
  ],
);

/** A pair of components that the records support, for a model or a family. Derived; `detail` holds every count. */
export const findings = pgTable(
  'findings',
  {
    ...tenantKey(),
    modelId: uuid('model_id'),
    familyId: uuid('family_id'),
    causalComponentId: uuid('causal_component_id').notNull(),
    resultantComponentId: uuid('resultant_component_id').notNull(),
    kind: text('kind').notNull(),
    qValue: doublePrecision('q_value').notNull(),
    detail: jsonb('detail').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.shopId, t.id] }),
    unique('findings_pair')
      .on(t.shopId, t.modelId, t.familyId, t.causalComponentId, t.resultantComponentId, t.kind)
      .nullsNotDistinct(),
    index('findings_model').on(t.shopId, t.modelId),
    index('findings_family').on(t.shopId, t.familyId),
    index('findings_causal').on(t.shopId, t.causalComponentId),
    index('findings_resultant').on(t.shopId, t.resultantComponentId),
    foreignKey({
      columns: [t.shopId, t.modelId],
      foreignColumns: [models.shopId, models.id],
      name: 'findings_model_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.familyId],
      foreignColumns: [families.shopId, families.id],
      name: 'findings_family_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.causalComponentId],
      foreignColumns: [components.shopId, components.id],
      name: 'findings_causal_fk',
    }).onDelete('cascade'),
    foreignKey({
      columns: [t.shopId, t.resultantComponentId],
      foreignColumns: [components.shopId, components.id],
      name: 'findings_resultant_fk',
    }).onDelete('cascade'),
    check('findings_kind', sql`${t.kind} IN ('cascade', 'together')`),
  ],
);
