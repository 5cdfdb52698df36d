/** Reads tables of numbers in CSV: a heading with the column names in any order, then plain numbers; '#' starts a comment. */
import type { FaultCode } from './fault.js';

export interface CsvFault {
  readonly code: FaultCode;
  readonly problem: string;
  readonly found?: string;
  readonly expected?: string;
  readonly line: number;
  readonly column: number;
}

export interface NumberColumn<Field extends string> {
  readonly name: string;
  readonly field: Field;
  readonly least: number;
  readonly most: number;
}

export type NumberRow<Field extends string> = Readonly<Record<Field, number>> & { readonly line: number };

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const MOST_FAULTS = 20;

export function readNumberRows<Field extends string>(
  text: string,
  columns: readonly NumberColumn<Field>[],
): { points: NumberRow<Field>[]; faults: CsvFault[] } {
  const faults: CsvFault[] = [];
  const points: NumberRow<Field>[] = [];
  let order: (NumberColumn<Field> | undefined)[] | null = null;
  const lines = text.replace(/^\uFEFF/, '').split(/\r\n|\n|\r/);
  for (const [i, content] of lines.entries()) {
    if (content.trim() === '' || content.trimStart().startsWith('#')) continue;
    if (faults.length >= MOST_FAULTS) break;
    const cells = splitCells(content);
    if (order === null) {
      order = readHeading(cells, columns, i + 1, faults);
      if (order === null) return { points, faults };
    } else {
      points.push({ ...readRow(cells, order, i + 1, faults), line: i + 1 });
    }
  }
  if (points.length === 0 && faults.length === 0) {
    const expected = `columns ${columns.map(({ name }) => name).join(',')} and rows of numbers`;
    faults.push({ code: 'finish', problem: 'the table has no rows', expected, line: 1, column: 1 });
  }
  return { points, faults };
}

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

function readHeading<Field extends string>(
  cells: readonly Cell[],
  columns: readonly NumberColumn<Field>[],
  line: number,
  faults: CsvFault[],
): (NumberColumn<Field> | undefined)[] | null {
  const order = cells.map(({ text }) => columns.find(({ name }) => name === text));
  const absent = columns.filter((column) => !order.includes(column));
  if (absent.length === 0) return order;
  const found = cells.map(({ text }) => text).join(',');
  const problem = `the heading lacks ${absent.map(({ name }) => name).join(', ')}`;
  faults.push({ code: 'finish', problem, found, expected: columns.map(({ name }) => name).join(','), line, column: 1 });
  return null;
}

function readRow<Field extends string>(
  cells: readonly Cell[],
  order: readonly (NumberColumn<Field> | undefined)[],
  line: number,
  faults: CsvFault[],
): Readonly<Record<Field, number>> {
  const point: Partial<Record<Field, number>> = {};
  order.forEach((column, i) => {
    if (column === undefined) return;
    const { text, column: at } = cells[i] ?? { text: '', column: 1 };
    const { name, least, most } = column;
    const value = NUMBER.test(text) ? Number(text) : Number.NaN;
    point[column.field] = value;
    if (value >= least && value <= most) return;
    const code = Number.isNaN(value) ? 'quantity' : 'range';
    const problem = Number.isNaN(value) ? `${name} is not a number` : `${name} is out of range`;
    faults.push({ code, problem, found: text || 'nothing', expected: `${least} to ${most}`, line, column: at });
  });
  return point as Readonly<Record<Field, number>>;
}
