import type pg from 'pg';
import type { TableRow } from './csv-parser';
import type { Layout } from './layout';
import type { CellRules } from './parse-cell';
import type { Field, Staging } from './staging';

export type Counts = { created: number; updated: number; unchanged: number };
/** What an import noticed besides counts. */
export type Remark = { kind: string; text: string; count: number };

/** How one kind of file goes in: staged row by row, settled, then applied set-wise. */
export type KindWork = {
  tables: Record<string, readonly Field[]>;
  /** Takes rows, numbered from 1; `end` after the last. */
  open: (staging: Staging) => { add: (row: TableRow, number: number) => void; end: () => void };
  /** Finds what only all rows together show; answers how many records are rejected. */
  settle: (client: pg.PoolClient) => Promise<number>;
  /** SQL: `ordinal, first_row, last_row, name` of the rejected records. */
  rejectedRecords: string;
  apply: (client: pg.PoolClient) => Promise<Counts>;
  remark: (client: pg.PoolClient) => Promise<Remark[]>;
};

export type MakeKindWork = (layout: Layout, rules: CellRules) => KindWork;
