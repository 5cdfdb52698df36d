import type { LedgerRow } from '../../record/run-record.js';
import { causeWords, groupOf } from '../../terms/ledger-words.js';
import { significant } from '../number-format.js';
import { safeText } from '../safe-text.js';

const SHOWN = 3;

/**
 * The largest losses that one change could win back: all that one finish or one dye takes, wherever it is, or all that
 * goes the same way at one place. Stokes heat is left out, for every re-emission costs it.
 */
export function largestLosses(rows: readonly LedgerRow[]): string[] {
  const losses = new Map<string, number>();
  for (const row of rows) {
    if (groupOf(row) === 'output' || row.fate === 'stokes-heat' || row.fraction <= 0) continue;
    const name = causeWords(row);
    losses.set(name, (losses.get(name) ?? 0) + row.fraction);
  }
  return [...losses]
    .sort(([, a], [, b]) => b - a)
    .slice(0, SHOWN)
    .map(([name, fraction]) => `${significant(100 * fraction, 3)} % ${safeText(name, 80)}`);
}
