/** Reads the tables of a run folder back: a header line, then rows of numbers. */
import { readFile, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { fileSystemReason, isFileSystemError, RunFolderError } from './run-folder-error.js';

export interface NumberTable {
  readonly header: string;
  readonly columns: number;
  /** Row after row; blank fields are NaN. */
  readonly values: Float64Array;
}

/** Far above the table of any map; keeps a wrong file from filling the memory. */
const LARGEST_BYTES = 512 * 2 ** 20;
const TRACE_AGAIN = 'Trace the design again.';

/** @param name plain file name in the folder. @param columns wanted. @throws RunFolderError */
export async function readNumberTable(folder: string, name: string, columns: number): Promise<NumberTable> {
  const path = join(folder, name);
  const text = await readTable(path);
  const lines = text.split('\n');
  if (lines.at(-1) === '') lines.pop();
  const [header = '', ...rows] = lines;
  const values = new Float64Array(rows.length * columns);
  rows.forEach((row, i) => {
    const fields = row.split(',');
    if (fields.length !== columns) {
      throw unreadable(path, `line ${i + 2} has ${fields.length} fields, not ${columns}`);
    }
    fields.forEach((field, j) => {
      const value = field.trim() === '' ? Number.NaN : Number(field);
      if (field.trim() !== '' && Number.isNaN(value)) {
        throw unreadable(path, `line ${i + 2} holds ${JSON.stringify(field.slice(0, 40))}, not a number`);
      }
      values[i * columns + j] = value;
    });
  });
  return { header, columns, values };
}

/** One column of a table. */
export function columnOf({ values, columns }: NumberTable, column: number): Float64Array {
  return Float64Array.from({ length: values.length / columns }, (_, i) => values[i * columns + column]);
}

export function unreadable(path: string, problem: string): RunFolderError {
  return new RunFolderError('read', path, problem, TRACE_AGAIN);
}

async function readTable(path: string): Promise<string> {
  try {
    const found = await stat(path);
    if (!found.isFile()) throw unreadable(path, 'it is no plain file');
    if (found.size > LARGEST_BYTES) throw unreadable(path, `${found.size} bytes are too many for a table of a run`);
    return await readFile(path, 'utf8');
  } catch (error) {
    if (!isFileSystemError(error)) throw error;
    throw new RunFolderError('read', path, fileSystemReason(error), TRACE_AGAIN, error);
  }
}
