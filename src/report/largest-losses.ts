import type { LedgerRow } from '../record/run-record.js';
import { causeWords } from '../terms/ledger-words.js';
import { groupOf, totalOf } from './ledger-words.js';
import { formatWithError, significant } from './number-format.js';

export interface Loss {
  readonly words: string;
  readonly fraction: number;
  /** The rows of the ledger behind it, largest first. */
  readonly rows: readonly LedgerRow[];
}

/**
 * What one change could win back, largest first: all that one finish or one dye takes, wherever it does, or all that goes
 * the same way at one place. Stokes heat is left out: every re-emission costs it.
 */
export function largestLosses(rows: readonly LedgerRow[]): readonly Loss[] {
  const byCause = new Map<string, LedgerRow[]>();
  for (const row of rows) {
    if (groupOf(row) === 'output' || row.fate === 'stokes-heat' || row.fraction <= 0) continue;
    const cause = causeWords(row);
    byCause.set(cause, [...(byCause.get(cause) ?? []), row]);
  }
  return [...byCause]
    .map(([words, behind]) => ({
      words,
      fraction: totalOf(behind),
      rows: behind.toSorted((a, b) => b.fraction - a.fraction),
    }))
    .sort((a, b) => b.fraction - a.fraction);
}

/** Share of a loss in per cent, with ± where it is one entry of the ledger: errors of several are not independent. */
export function lossText({ fraction, rows }: Loss): string {
  const [only] = rows;
  const error = rows.length === 1 && only.standardError !== null ? 100 * only.standardError : null;
  return error === null ? `${significant(100 * fraction, 3)}\u00a0%` : formatWithError(100 * fraction, error, '%', '±');
}
