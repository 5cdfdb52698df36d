/** Tables beside a design. */
import { readCompanionFile } from './read-companion-file.js';
import type { TableFileReader } from './table-file.js';

const RULES = { what: 'table', largestBytes: 5_000_000, pattern: /\.(csv|jdx|dx)$/i } as const;

/** Reader of the tables of the design in `designFile`. */
export const tableReader =
  (designFile: string): TableFileReader =>
  (name) => {
    const reading = readCompanionFile(designFile, name, RULES);
    if (!reading.ok) return reading;
    const { bytes, file } = reading;
    if (bytes.includes(0)) return { ok: false, problem: 'the table is not text: it has zero bytes' };
    try {
      return { ok: true, text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), file };
    } catch {
      return { ok: false, problem: 'the table is not text in UTF-8' };
    }
  };
