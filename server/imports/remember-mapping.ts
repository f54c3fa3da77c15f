import { and, eq } from 'drizzle-orm';
import { mapping as mappingSchema, type ImportKind, type Mapping } from '../../shared/imports';
import type { Transaction } from '../db/client';
import { columnMappings } from '../db/schema/index';
import { headerKey } from './layout';

/** What a person confirmed earlier for a file with such a header row. */
export async function recallMapping(
  tx: Transaction,
  kind: ImportKind,
  headers: readonly string[],
): Promise<Mapping | undefined> {
  const [found] = await tx
    .select({ mapping: columnMappings.mapping })
    .from(columnMappings)
    .where(and(eq(columnMappings.kind, kind), eq(columnMappings.headerKey, headerKey(headers))));
  return found && mappingSchema.parse(found.mapping);
}

export async function rememberMapping(
  tx: Transaction,
  confirmed: {
    shopId: string;
    userId: string;
    kind: ImportKind;
    headers: readonly string[];
    mapping: Mapping;
    at: Date;
  },
): Promise<void> {
  const { shopId, userId, kind, headers, mapping, at } = confirmed;
  const said = { mapping, confirmedByUserId: userId, confirmedAt: at };
  await tx
    .insert(columnMappings)
    .values({ shopId, kind, headerKey: headerKey(headers), ...said })
    .onConflictDoUpdate({
      target: [columnMappings.shopId, columnMappings.kind, columnMappings.headerKey],
      set: said,
    });
}
