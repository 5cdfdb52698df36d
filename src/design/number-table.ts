/** Tables of numbers in CSV beside a design: a heading with the column names in any order, then plain numbers; '#' starts a comment. */
import type { DesignPath, FaultCode } from './fault.js';
import type { Complaint, Reading } from './reading.js';

export interface TableColumn<Name extends string> {
  /** As the heading says it, with its unit: `angle_deg`. */
  readonly name: Name;
  readonly least: number;
  readonly most: number;
  /** A column that may be left out reads as NaN. */
  readonly optional?: true;
}

export interface TableRow<Name extends string> {
  readonly values: Readonly<Record<Name, number>>;
  readonly line: number;
}

export interface NumberTable<Name extends string> {
  readonly rows: readonly TableRow<Name>[];
  /** Complains about a row of the file. */
  readonly complain: (line: number, complaint: Omit<Complaint, 'path'>) => void;
}

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;
const MOST_FAULTS = 20;

/** The rows, or null after reporting what is wrong with the file. @param path of the field that names it */
export function readNumberTable<Name extends string>(
  file: string,
  columns: readonly TableColumn<Name>[],
  path: DesignPath,
  reading: Reading,
): NumberTable<Name> | null {
  if (file === '') return null;
  const table = reading.readTable(file);
  if (!table.ok) {
    const { problem, expected = 'a CSV file in the folder of the design', suggestion } = table;
    const hint = suggestion === undefined ? {} : { suggestion };
    reading.report({ code: 'file', path, problem, found: file, expected, ...hint });
    return null;
  }
  let faults = 0;
  const complain = (line: number, complaint: Omit<Complaint, 'path'>, column = 1) => {
    if (faults++ < MOST_FAULTS) reading.report({ ...complaint, path }, { file: table.file, line, column });
  };
  const heading = columns.map(({ name, optional }) => (optional ? `[${name}]` : name)).join(',');
  let order: (TableColumn<Name> | undefined)[] | null = null;
  const rows: TableRow<Name>[] = [];
  const lines = table.text.replace(/^\uFEFF/, '').split(/\r\n|\n|\r/);
  for (const [i, content] of lines.entries()) {
    if (content.trim() === '' || content.trimStart().startsWith('#')) continue;
    if (faults >= MOST_FAULTS) break;
    const cells = splitCells(content);
    if (order === null) {
      order = cells.map(({ text }) => columns.find(({ name }) => name === text));
      const absent = columns.filter((column) => !column.optional && !order?.includes(column));
      if (absent.length > 0) {
        const problem = `the heading lacks ${absent.map(({ name }) => name).join(', ')}`;
        complain(i + 1, { code: 'file', problem, found: cells.map(({ text }) => text).join(','), expected: heading });
        return null;
      }
    } else rows.push({ values: readRow(cells, order, columns, i + 1, complain), line: i + 1 });
  }
  if (rows.length === 0 && faults === 0) {
    complain(1, { code: 'file', problem: 'the table has no rows', expected: `columns ${heading} and rows of numbers` });
  }
  return faults > 0 ? null : { rows, complain };
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

function readRow<Name extends string>(
  cells: readonly Cell[],
  order: readonly (TableColumn<Name> | undefined)[],
  columns: readonly TableColumn<Name>[],
  line: number,
  complain: (line: number, complaint: Omit<Complaint, 'path'>, column?: number) => void,
): Record<Name, number> {
  const values = Object.fromEntries(columns.map(({ name }) => [name, Number.NaN])) as Record<Name, number>;
  order.forEach((column, i) => {
    if (column === undefined) return;
    const { text, column: at } = cells[i] ?? { text: '', column: 1 };
    const { name, least, most } = column;
    const value = NUMBER.test(text) ? Number(text) : Number.NaN;
    values[name] = value;
    if (value >= least && value <= most) return;
    const code: FaultCode = Number.isNaN(value) ? 'quantity' : 'range';
    const problem = Number.isNaN(value) ? `${name} is not a number` : `${name} is out of range`;
    complain(line, { code, problem, found: text || 'nothing', expected: `${least} to ${most}` }, at);
  });
  return values;
}
