import type { z } from 'zod';
import type { Named } from '../../../shared/basics';
import type { cascadeQuery, FindingSummary, FindingWhole, Finding } from '../../../shared/findings';
import type { Transaction } from '../../db/client';
import { lastAnalysis } from '../../db/last-analysis';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { missing } from '../../http/errors';
import { presentEpisodes, presentFinding } from './present';
import {
  findComponentsByName,
  findFindings,
  findModelNames,
  findSpent,
  findUnitNames,
  type FindingRow,
} from './queries';
import { storedSummary, type StoredCase } from './stored-finding';

export function listFindings(
  deps: Deps,
  actor: Actor,
  query: z.output<typeof cascadeQuery>,
): Promise<{ data: Finding[]; nextCursor: null }> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const rows = await findFindings(tx, query);
    const { models, spent } = await around(tx, rows);
    return { data: rows.map((row) => presentFinding(row, models, spent)), nextCursor: null };
  });
}

/** @throws missing */
export function readFinding(deps: Deps, actor: Actor, id: string): Promise<FindingWhole> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const rows = await findFindings(tx, { id });
    const [row] = rows;
    if (!row) throw missing('finding');
    const { models, spent } = await around(tx, rows);
    const unitIds = [...new Set(row.detail.cases.map(({ unitId }) => unitId))];
    const units = byId(await findUnitNames(tx, unitIds));
    return { ...presentFinding(row, models, spent), cases: presentEpisodes(row, units, spent) };
  });
}

/** What the last analysis looked at, and the pairs of which it claims nothing. */
export function summarizeFindings(deps: Deps, actor: Actor): Promise<FindingSummary> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const run = await lastAnalysis(tx);
    if (!run) return { asOf: null, pairsExamined: 0, models: 0, caseFiles: [], warnings: [] };
    const { examined, warnings, caseFiles } = storedSummary.parse(run.summary);
    const models = byId(await findModelNames(tx, [...new Set(caseFiles.map(({ model }) => model))]));
    const names = [...new Set(caseFiles.flatMap(({ components }) => components))];
    const components = new Map((await findComponentsByName(tx, names)).map((row) => [row.name, row]));
    const spent = await findSpent(tx, repairsOf(caseFiles));
    return {
      asOf: run.asOf,
      pairsExamined: examined.pairs,
      models: examined.models,
      warnings,
      caseFiles: caseFiles.flatMap(({ model: modelId, components: [one, other], episodes, cases }) => {
        const model = models.get(modelId);
        const first = components.get(one);
        const second = components.get(other);
        if (!model || !first || !second) return [];
        const repairs = repairsOf([{ cases }]).flatMap((id) => spent.get(id) ?? []);
        return [
          { model, first, second, times: episodes, repairs: repairs.map(({ id, name }) => ({ id, name })) },
        ];
      }),
    };
  });
}

async function around(tx: Transaction, rows: readonly FindingRow[]) {
  const borrowed = [...new Set(rows.flatMap(({ detail }) => detail.borrowedFrom))];
  return {
    models: byId(await findModelNames(tx, borrowed)),
    spent: await findSpent(tx, repairsOf(rows.map(({ detail }) => detail))),
  };
}

const repairsOf = (groups: readonly { cases: readonly StoredCase[] }[]): string[] => [
  ...new Set(
    groups.flatMap(({ cases }) => cases.flatMap(({ visits }) => visits.flatMap(({ visitIds }) => visitIds))),
  ),
];

const byId = (rows: readonly Named[]) => new Map(rows.map((row) => [row.id, row]));
