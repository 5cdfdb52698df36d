import { readFileSync } from 'node:fs';

/** A row of a data file by column name; empty cells are absent. */
export type Row = Readonly<Record<string, string>>;

export interface DataTable {
  /** Comment lines at the head of the file, without '#': sources, conditions, status. */
  readonly notes: readonly string[];
  readonly rows: readonly Row[];
}

const cache = new Map<string, DataTable>();

/** Reads one of the library's own CSV files (data/NAME), once per process. Fields may be quoted. */
export function readTable(name: string): DataTable {
  const known = cache.get(name);
  if (known !== undefined) return known;
  const lines = readFileSync(new URL(`./data/${name}`, import.meta.url), 'utf8').split(/\r?\n/);
  const notes = lines.filter((line) => line.startsWith('#')).map((line) => line.slice(1).trim());
  const [header, ...body] = lines.filter((line) => line !== '' && !line.startsWith('#')).map(splitCsvLine);
  const rows = body.map((cells) => Object.fromEntries(header.map((column, i) => [column, cells[i] ?? ''])));
  const table = { notes, rows };
  cache.set(name, table);
  return table;
}

function splitCsvLine(line: string): string[] {
  const cells: string[] = [];
  const pattern = /("(?:[^"]|"")*"|[^,]*)(?:,|$)/gy;
  while (pattern.lastIndex < line.length) {
    const match = pattern.exec(line);
    if (match === null) break;
    cells.push(match[1].startsWith('"') ? match[1].slice(1, -1).replaceAll('""', '"') : match[1]);
  }
  return cells;
}

/** A number that must be there. */
export function numberIn(row: Row, column: string): number {
  const text = row[column];
  const value = Number(text);
  if (text === undefined || text === '' || !Number.isFinite(value)) {
    throw new Error(`column ${column} holds ${JSON.stringify(text)}, not a number`);
  }
  return value;
}
