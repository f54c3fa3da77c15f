import { sql, type AnyColumn } from 'drizzle-orm';

/** An instant as a cursor carries it: with its microseconds, so that a page ends exactly where the next one goes on. */
export const instantKey = (column: AnyColumn) =>
  sql<string>`to_char(${column} AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')`;
