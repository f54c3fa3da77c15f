import type { z } from 'zod';
import { invalid } from './errors';

/** The sort key of the last row of a page, as an address can carry it. */
export function encodeCursor(key: readonly unknown[]): string {
  return Buffer.from(JSON.stringify(key)).toString('base64url');
}

/**
 * The sort key that a cursor stands for; undefined for the first page.
 * @throws invalid where the cursor is not one that this list gave.
 */
export function decodeCursor<Key extends z.ZodType>(
  cursor: string | undefined,
  key: Key,
): z.output<Key> | undefined {
  if (cursor === undefined) return undefined;
  const found = key.safeParse(parseJson(Buffer.from(cursor, 'base64url').toString('utf8')));
  if (found.success) return found.data;
  throw invalid('The query cannot be used as sent.', [
    { path: '/cursor', message: 'Send nextCursor of the page before, as it came.' },
  ]);
}

/** A page of rows that were asked for with one more than the limit, so that the end is known. */
export function pageOf<Row>(rows: readonly Row[], limit: number, keyOf: (row: Row) => readonly unknown[]) {
  const data = rows.slice(0, limit);
  const last = data.at(-1);
  return { data, nextCursor: rows.length > limit && last ? encodeCursor(keyOf(last)) : null };
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
