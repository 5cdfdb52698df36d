/** Tables of numbers in CSV beside a design, found, read and complained about. */
import type { DesignPath } from './fault.js';
import { type NumberColumn, type NumberRow, readNumberRows } from './number-csv.js';
import type { Complaint, Reading } from './reading.js';

export interface NumberTable<F extends string> {
  readonly rows: readonly NumberRow<F>[];
  /** Complains about a row of the file. */
  readonly complain: (line: number, complaint: Omit<Complaint, 'path'>) => void;
}

/** The rows, or null after reporting what is wrong with the file. @param path of the field that names it */
export function readNumberTable<F extends string>(
  file: string,
  columns: readonly NumberColumn<F>[],
  path: DesignPath,
  reading: Reading,
): NumberTable<F> | null {
  if (file === '') return null;
  const table = reading.readTable(file);
  if (!table.ok) {
    const { problem, expected = 'a CSV file in the folder of the design', suggestion } = table;
    const hint = suggestion === undefined ? {} : { suggestion };
    reading.report({ code: 'file', path, problem, found: file, expected, ...hint });
    return null;
  }
  const { rows, faults } = readNumberRows(table.text, columns);
  const complain = (line: number, complaint: Omit<Complaint, 'path'>, column = 1) =>
    reading.report({ ...complaint, path }, { file: table.file, line, column });
  for (const { line, column, code, ...fault } of faults) {
    complain(line, { ...fault, code: code === 'finish' ? 'file' : code }, column);
  }
  return faults.length > 0 ? null : { rows, complain };
}
