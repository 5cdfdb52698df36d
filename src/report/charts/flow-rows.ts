import type { LedgerRow } from '../../record/run-record.js';
import { type Group, groupOf, placedWords, totalOf } from '../ledger-words.js';

/** A stream of the flow picture: one row of the ledger, or several small ones together. */
export interface Stream {
  readonly words: string;
  /** Rows of the ledger that flow in it. */
  readonly rows: readonly LedgerRow[];
  readonly fraction: number;
  /** null where several rows flow together, or none is known. */
  readonly standardError: number | null;
}

/** Streams below this share of the pump light flow together. */
const SMALLEST = 0.004;
/** More streams than this in a group would not be told apart. */
const MOST = 14;

/** Streams of a group, largest first, the small ones joined at the end. Rows below zero (a dye emitting bluer than it absorbs) are left to the table. */
export function streamsOf(rows: readonly LedgerRow[], group: Group): readonly Stream[] {
  const mine = rows
    .filter((row) => groupOf(row) === group && row.fraction > 0)
    .toSorted((a, b) => b.fraction - a.fraction);
  const shown = mine
    .slice(0, MOST)
    .filter(({ fraction }, i) => fraction >= SMALLEST || (i === 0 && group === 'output'));
  const small = mine.slice(shown.length);
  const streams = shown.map((row) => ({
    words: placedWords(row),
    rows: [row],
    fraction: row.fraction,
    standardError: row.standardError,
  }));
  if (small.length === 0) return streams;
  if (small.length === 1) {
    const [row] = small;
    return [
      ...streams,
      { words: placedWords(row), rows: small, fraction: row.fraction, standardError: row.standardError },
    ];
  }
  return [
    ...streams,
    { words: `${small.length} smaller ones`, rows: small, fraction: totalOf(small), standardError: null },
  ];
}
