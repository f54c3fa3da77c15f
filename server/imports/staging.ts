import { once } from 'node:events';
import type pg from 'pg';
import { from as copyFrom } from 'pg-copy-streams';

export type Field = readonly [name: string, type: string];
export type Cell = string | number | boolean | null;

const FLUSH_CHARACTERS = 2_000_000;

/**
 * Temporary tables of the import's transaction, filled by COPY (which is refused into tables that row-level security
 * binds by force). One flush runs while the next rows are read; more wait.
 */
export class Staging {
  readonly #client: pg.PoolClient;
  readonly #tables: ReadonlyMap<string, { fields: readonly Field[]; lines: string[] }>;
  #held = 0;
  #flushing: Promise<void> = Promise.resolve();

  constructor(client: pg.PoolClient, tables: Record<string, readonly Field[]>) {
    this.#client = client;
    this.#tables = new Map(Object.entries(tables).map(([name, fields]) => [name, { fields, lines: [] }]));
  }

  async create(): Promise<void> {
    for (const [name, { fields }] of this.#tables) {
      const columns = fields.map(([field, type]) => `${field} ${type}`).join(', ');
      await this.#client.query(`CREATE TEMP TABLE ${name} (${columns}) ON COMMIT DROP`);
    }
  }

  add(table: string, cells: readonly Cell[]): void {
    const line = copyLine(cells);
    this.#tables.get(table)?.lines.push(line);
    this.#held += line.length;
  }

  /** Lets the database catch up where enough is held. */
  async breathe(): Promise<void> {
    if (this.#held < FLUSH_CHARACTERS) return;
    await this.#flushing;
    this.#flushing = this.#flush();
    // Seen at the next await; without a listener now it would count as unhandled.
    this.#flushing.catch(() => undefined);
  }

  /** Writes the rest and tells the planner what is there, of the columns that joins go by. */
  async finish(): Promise<void> {
    await this.#flushing;
    await this.#flush();
    for (const [name, { fields }] of this.#tables) {
      const telling = fields
        .map(([field]) => field)
        .filter((field) => field === 'ordinal' || field.endsWith('_key'));
      await this.#client.query(`ANALYZE ${name} (${telling.join(', ')})`);
    }
  }

  async #flush(): Promise<void> {
    this.#held = 0;
    const taken = [...this.#tables].map(([name, { fields, lines }]) => ({
      name,
      columns: fields.map(([field]) => field).join(', '),
      lines: lines.splice(0),
    }));
    for (const { name, columns, lines } of taken) {
      if (lines.length === 0) continue;
      const copy = this.#client.query(
        copyFrom(`COPY ${name} (${columns}) FROM STDIN WITH (DELIMITER E'\\x1f', NULL E'\\x02')`),
      );
      copy.end(lines.join(''));
      await once(copy, 'finish');
    }
  }
}

// Neither stands in a text that is taken in, so that only line ends and backslashes need an escape.
const DELIMITER = '\u001f';
const NULL_MARK = '\u0002';
const ESCAPES: Record<string, string> = { '\\': '\\\\', '\n': '\\n', '\r': '\\r' };

function copyLine(cells: readonly Cell[]): string {
  const line = cells.map((cell) => cell ?? NULL_MARK).join(DELIMITER);
  const escaped = /[\\\n\r]/.test(line) ? line.replace(/[\\\n\r]/g, (mark) => ESCAPES[mark] ?? mark) : line;
  return `${escaped}\n`;
}
