/** Tables beside a design. Only files inside the folder of the design are opened, whatever links lead out of it. */
import { lstatSync, readdirSync, readFileSync, realpathSync, statSync } from 'node:fs';
import { dirname, isAbsolute, join, normalize, relative, resolve, sep } from 'node:path';
import { nearestName } from '../units/nearest-name.js';
import type { TableFile, TableFileReader } from './table-file.js';

const LARGEST_TABLE_BYTES = 5_000_000;

const LEAVES: TableFile = {
  ok: false,
  problem: 'the path leaves the folder of the design',
  expected: 'a file in the folder of the design or below it',
  suggestion: 'copy the table beside the design',
};

/** Reader of the tables of the design in `designFile`. */
export const tableReader =
  (designFile: string): TableFileReader =>
  (name) => {
    const folder = dirname(resolve(designFile));
    const path = resolve(folder, name);
    if (isAbsolute(name) || name.includes('\0') || leaves(folder, path)) return LEAVES;
    try {
      if (leaves(realpathSync(folder), realpathSync(path))) return LEAVES;
      const status = statSync(path);
      if (!status.isFile()) return { ok: false, problem: 'this is not a file' };
      if (status.size > LARGEST_TABLE_BYTES) {
        return { ok: false, problem: 'the table is too large', expected: `at most ${LARGEST_TABLE_BYTES} bytes` };
      }
      const bytes = readFileSync(path);
      if (bytes.includes(0)) return { ok: false, problem: 'the table is not text: it has zero bytes' };
      const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
      return { ok: true, text, file: join(dirname(designFile), normalize(name)) };
    } catch (error) {
      return explain(error, folder, name);
    }
  };

function leaves(folder: string, path: string): boolean {
  const way = relative(folder, path);
  return way === '..' || way.startsWith(`..${sep}`) || isAbsolute(way);
}

function explain(error: unknown, folder: string, name: string): TableFile {
  const code = error instanceof Error && 'code' in error ? String(error.code) : '';
  if (code === 'ENOENT' || code === 'ENOTDIR') {
    // A link that dangles is no missing file.
    if (lstatSync(resolve(folder, name), { throwIfNoEntry: false })?.isSymbolicLink()) {
      return { ok: false, problem: 'the link leads nowhere' };
    }
    const tables = readdirSync(folder).filter((each) => /\.(csv|jdx|dx)$/i.test(each));
    const nearest = nearestName(name, tables);
    return { ok: false, problem: 'there is no such file', ...(nearest === null ? {} : { suggestion: nearest }) };
  }
  if (code === 'ERR_ENCODING_INVALID_ENCODED_DATA') return { ok: false, problem: 'the table is not text in UTF-8' };
  if (code === '') throw error;
  return { ok: false, problem: `the file cannot be read (${code})` };
}
