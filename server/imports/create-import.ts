import type { ImportKind, Mapping } from '../../shared/imports';
import { withShop } from '../db/tenancy';
import { imports } from '../db/schema/index';
import type { Deps } from '../deps';
import type { Transaction } from '../db/client';
import { resolveLayout, type Layout } from './layout';
import { openTable } from './open-table';
import { recallMapping, rememberMapping } from './remember-mapping';
import type { Spooled } from './spool';

type Wanted = {
  shopId: string;
  kind: ImportKind;
  spooled: Spooled;
  mapping?: Mapping | undefined;
  isDryRun: boolean;
  source: 'file' | 'shell';
  /** The person who asks, if one does; their mapping is remembered. */
  userId?: string | undefined;
};

/**
 * Looks at a spooled file and makes its import, queued. `also` runs in the same transaction.
 * @throws invalid where the file is none, or its columns do not say what is needed.
 */
export async function createImport(
  deps: Deps,
  wanted: Wanted,
  also: (tx: Transaction, importId: string) => Promise<void> = () => Promise.resolve(),
): Promise<string> {
  const { shopId, kind, spooled, mapping, userId } = wanted;
  const shape = await openTable(spooled.filePath, mapping);
  const said =
    mapping ?? (await withShop(deps.database, shopId, (tx) => recallMapping(tx, kind, shape.headers)));
  const layout: Layout = await resolveLayout(kind, spooled.filePath, shape, said);
  return withShop(deps.database, shopId, async (tx) => {
    const [made] = await tx
      .insert(imports)
      .values({
        shopId,
        kind,
        source: wanted.source,
        fileName: spooled.fileName,
        spoolPath: spooled.filePath,
        mapping: said,
        layout,
        isDryRun: wanted.isDryRun,
        rowsTotal: shape.rowsExpected,
        startedByUserId: userId,
        createdAt: deps.now(),
      })
      .returning({ id: imports.id });
    if (!made) throw new Error('no import row');
    if (mapping && userId)
      await rememberMapping(tx, { shopId, userId, kind, headers: shape.headers, mapping, at: deps.now() });
    await also(tx, made.id);
    return made.id;
  });
}
