/** Reads a table of numbers in CSV: a heading with the column names in any order, then plain numbers; '#' starts a comment. */
import type { FaultCode } from './fault.js';

export interface CsvFault {
  readonly code: FaultCode;
  readonly problem: string;
  readonly found?: string;
  readonly expected?: string;
  readonly line: number;
  readonly column: number;
}

export interface NumberColumn<F extends string> {
  readonly name: string;
  readonly field: F;
  readonly least: number;
  readonly most: number;
  /** May be left out of the whole table. */
  readonly optional?: true;
}

/** A row by field, NaN where the table has no such column or no number, and its line from 1. */
export type NumberRow<F extends string> = { readonly [K in F]: number } & { readonly line: number };

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const MOST_FAULTS = 20;

export function readNumberRows<F extends string>(
  text: string,
  columns: readonly NumberColumn<F>[],
): { rows: NumberRow<F>[]; faults: CsvFault[] } {
  const faults: CsvFault[] = [];
  const rows: NumberRow<F>[] = [];
  let order: (NumberColumn<F> | undefined)[] | null = null;
  const lines = text.replace(/^\uFEFF/, '').split(/\r\n|\n|\r/);
  for (const [i, content] of lines.entries()) {
    if (content.trim() === '' || content.trimStart().startsWith('#')) continue;
    if (faults.length >= MOST_FAULTS) break;
    const cells = splitCells(content);
    if (order === null) {
      order = readHeading(cells, columns, i + 1, faults);
      if (order === null) return { rows, faults };
    } else {
      rows.push(readRow(cells, order, columns, i + 1, faults));
    }
  }
  if (rows.length === 0 && faults.length === 0) {
    const expected = `columns ${namesOf(columns)} and rows of numbers`;
    faults.push({ code: 'finish', problem: 'the table has no rows', expected, line: 1, column: 1 });
  }
  return { rows, faults };
}

const namesOf = (columns: readonly NumberColumn<string>[]): string => columns.map(({ name }) => name).join(',');

interface Cell {
  readonly text: string;
  readonly column: number;
}

function splitCells(line: string): Cell[] {
  let start = 0;
  return line.split(',').map((raw) => {
    const column = start + raw.length - raw.trimStart().length + 1;
    start += raw.length + 1;
    return { text: raw.trim().replace(/^"(.*)"$/, '$1'), column };
  });
}

function readHeading<F extends string>(
  cells: readonly Cell[],
  columns: readonly NumberColumn<F>[],
  line: number,
  faults: CsvFault[],
): (NumberColumn<F> | undefined)[] | null {
  const order = cells.map(({ text }) => columns.find(({ name }) => name === text));
  const absent = columns.filter((column) => column.optional !== true && !order.includes(column));
  if (absent.length === 0) return order;
  const found = cells.map(({ text }) => text).join(',');
  const problem = `the heading lacks ${absent.map(({ name }) => name).join(', ')}`;
  faults.push({ code: 'finish', problem, found, expected: namesOf(columns), line, column: 1 });
  return null;
}

function readRow<F extends string>(
  cells: readonly Cell[],
  order: (NumberColumn<F> | undefined)[],
  columns: readonly NumberColumn<F>[],
  line: number,
  faults: CsvFault[],
): NumberRow<F> {
  const values = new Map<F, number>(columns.map(({ field }) => [field, Number.NaN]));
  order.forEach((column, i) => {
    if (column === undefined) return;
    const { text, column: at } = cells[i] ?? { text: '', column: 1 };
    const { name, least, most } = column;
    const value = NUMBER.test(text) ? Number(text) : Number.NaN;
    values.set(column.field, value);
    if (value >= least && value <= most) return;
    const code = Number.isNaN(value) ? 'quantity' : 'range';
    const problem = Number.isNaN(value) ? `${name} is not a number` : `${name} is out of range`;
    faults.push({ code, problem, found: text || 'nothing', expected: `${least} to ${most}`, line, column: at });
  });
  return { ...(Object.fromEntries(values) as { readonly [K in F]: number }), line };
}
