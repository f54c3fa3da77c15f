import type pg from 'pg';
import { applyRepairs } from './apply-repairs';
import type { Counts, KindWork, MakeKindWork } from './kind-work';
import { readRemarks } from './remarks';
import { repairReader } from './read-repair-rows';
import { STAGED_FAULTS, STAGED_LINES, STAGED_REPAIRS } from './repair-fields';
import { resolveEngines } from './resolve-engines';
import { resolveLines } from './resolve-lines';
import { resolveNames } from './resolve-names';
import { resolveRepairs } from './resolve-repairs';
import { resolveTechnicians } from './resolve-technicians';
import { resolveUnits } from './resolve-units';
import { joinFragments, partRejected, refuseDoubtfulSerials } from './settle-fragments';
import { RepairStager } from './stage-repairs';

export const REPAIR_TABLES: KindWork['tables'] = {
  staged_repairs: STAGED_REPAIRS,
  staged_lines: STAGED_LINES,
  staged_faults: STAGED_FAULTS,
};

export const repairsWork: MakeKindWork = (layout, rules) => {
  const { brought, givenLineFields, read } = repairReader(layout, rules);
  return {
    tables: REPAIR_TABLES,
    open: (staging) => {
      const stager = new RepairStager(staging);
      return { add: (row, number) => stager.add(read(row, number), brought), end: () => stager.close() };
    },
    settle: settleRepairs,
    rejectedRecords: `
      SELECT s.ordinal, s.first_row, s.last_row, s.repair_number AS name
      FROM staged_repairs s JOIN rejected r ON r.head = s.head`,
    apply: (client) => applyStagedRepairs(client, givenLineFields),
    remark: readRemarks,
  };
};

export async function settleRepairs(client: pg.PoolClient): Promise<number> {
  await joinFragments(client);
  await refuseDoubtfulSerials(client);
  return partRejected(client);
}

/** From the staged and settled records to the shop's own. */
export async function applyStagedRepairs(
  client: pg.PoolClient,
  givenLineFields: readonly string[],
): Promise<Counts> {
  await resolveNames(client);
  await resolveRepairs(client);
  await resolveUnits(client);
  await resolveEngines(client);
  await resolveLines(client);
  const counts = await applyRepairs(client, givenLineFields);
  await resolveTechnicians(client, counts.updated + counts.unchanged > 0);
  return counts;
}
