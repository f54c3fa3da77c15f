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

  /** Writes the rest and tells the planner what is there. */
  async finish(): Promise<void> {
    await this.#flushing;
    await this.#flush();
    for (const name of this.#tables.keys()) await this.#client.query(`ANALYZE ${name}`);
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
      const copy = this.#client.query(copyFrom(`COPY ${name} (${columns}) FROM STDIN`));
      copy.end(lines.join(''));
      await once(copy, 'finish');
    }
  }
}

const SPECIAL = /[\\\t\n\r]/;
const ESCAPES: Record<string, string> = { '\\': '\\\\', '\t': '\\t', '\n': '\\n', '\r': '\\r' };

function copyLine(cells: readonly Cell[]): string {
  let line = '';
  for (const cell of cells) {
    if (line !== '') line += '\t';
    if (cell === null) line += '\\N';
    else if (typeof cell !== 'string') line += String(cell);
    else line += SPECIAL.test(cell) ? cell.replace(/[\\\t\n\r]/g, (mark) => ESCAPES[mark] ?? mark) : cell;
  }
  return `${line}\n`;
}
