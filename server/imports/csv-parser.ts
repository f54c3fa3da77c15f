/** A row of a table: its line in the file, its cells as they stand, and whether its quote marks make no sense. */
export type TableRow = { line: number; cells: string[]; isBroken?: boolean };

/** Nothing that is a row of records is longer; a quote mark that is never closed would swallow the file. */
export const LONGEST_ROW = 16 * 1024 * 1024;

export class UnclosedQuote extends Error {
  constructor(readonly line: number) {
    super(`a quote mark opened on line ${line} is never closed`);
  }
}

/**
 * RFC 4180 a piece of text at a time, with any one-character delimiter. It exists beside the library parsers because it
 * knows on which line a row begins, lets one broken row be refused instead of the file, and is a few times faster.
 */
export class CsvParser {
  readonly #delimiter: string;
  #newline: string | undefined;
  #held = '';
  #line = 1;
  /** The next delimiter known in the text held, so that a file without any is not searched to its end for every row. */
  #delimiterAt = -2;

  constructor(delimiter: string) {
    this.#delimiter = delimiter;
  }

  /** The rows that end within the text so far. @throws UnclosedQuote */
  push(text: string): TableRow[] {
    this.#held = this.#held === '' ? text : this.#held + text;
    this.#newline ??= newlineOf(this.#held);
    return this.#newline === undefined ? [] : this.#rows(false);
  }

  /** The last row, where no line end follows it. @throws UnclosedQuote */
  end(): TableRow[] {
    this.#newline ??= '\n';
    return this.#rows(true);
  }

  #rows(isEnd: boolean): TableRow[] {
    const rows: TableRow[] = [];
    let at = 0;
    this.#delimiterAt = -2;
    while (at < this.#held.length) {
      const row = this.#row(at, isEnd);
      if (!row) break;
      at = row.next;
      if (row.cells.length > 1 || row.cells[0] !== '') {
        rows.push(
          row.isBroken
            ? { line: this.#line, cells: row.cells, isBroken: true }
            : { line: this.#line, cells: row.cells },
        );
      }
      this.#line += row.lines;
    }
    this.#held = this.#held.slice(at);
    if (this.#held.length > LONGEST_ROW) throw new UnclosedQuote(this.#line);
    return rows;
  }

  /** The row at a place, or undefined where it does not end within the text. */
  #row(start: number, isEnd: boolean) {
    const text = this.#held;
    const newline = this.#newline ?? '\n';
    const cells: string[] = [];
    let at = start;
    let lines = 1;
    let isBroken = false;
    let lineEnd = text.indexOf(newline, at);
    for (;;) {
      let head = '';
      if (text.charCodeAt(at) === QUOTE) {
        const close = closingQuote(text, at + 1);
        // A quote mark at the very end may be the first of a doubled one.
        if (close < 0 || (close + 1 === text.length && !isEnd)) {
          if (isEnd) throw new UnclosedQuote(this.#line);
          return undefined;
        }
        head = text.slice(at + 1, close);
        for (let inner = head.indexOf(newline); inner >= 0; inner = head.indexOf(newline, inner + 1))
          lines += 1;
        if (head.includes('"')) head = head.replaceAll('""', '"');
        at = close + 1;
        if (lineEnd >= 0 && lineEnd < at) lineEnd = text.indexOf(newline, at);
      }
      if (lineEnd < 0 && !isEnd) return undefined;
      const stop = lineEnd < 0 ? text.length : lineEnd;
      if (this.#delimiterAt !== -1 && this.#delimiterAt < at)
        this.#delimiterAt = text.indexOf(this.#delimiter, at);
      const delimiter = this.#delimiterAt;
      const isLast = delimiter < 0 || delimiter > stop;
      let tail = text.slice(at, isLast ? stop : delimiter);
      if (isLast && tail.endsWith('\r')) tail = tail.slice(0, -1);
      isBroken ||= at > start && head !== '' && tail !== '';
      cells.push(head === '' ? tail : head + tail);
      if (isLast) return { cells, lines, isBroken, next: stop + 1 };
      at = delimiter + 1;
    }
  }
}

const QUOTE = 34;

function closingQuote(text: string, from: number): number {
  let at = text.indexOf('"', from);
  while (at >= 0 && text.charCodeAt(at + 1) === QUOTE) at = text.indexOf('"', at + 2);
  return at;
}

/** Line feed, or the carriage return of very old files; undefined while no line has ended. */
function newlineOf(text: string): string | undefined {
  if (text.includes('\n')) return '\n';
  // The last character may be the first half of a pair.
  return text.indexOf('\r') >= 0 && text.indexOf('\r') < text.length - 1 ? '\r' : undefined;
}
