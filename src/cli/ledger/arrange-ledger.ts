import type { LedgerRow } from '../../record/run-record.js';
import { GROUPS, type Group, groupOf } from '../../terms/ledger-words.js';

/** What is wanted comes first. */
const ORDER: readonly Group[] = ['output', ...GROUPS.filter((group) => group !== 'output' && group !== 'heat'), 'heat'];

/** Losses below this share are folded together within their group. */
const SMALLEST_SHOWN = 0.001;

export interface LedgerGroup {
  readonly name: Group;
  /** Share of the whole, folded rows included. */
  readonly fraction: number;
  /** Largest first. */
  readonly rows: readonly LedgerRow[];
  readonly folded: { readonly rows: number; readonly fraction: number };
}

export interface ArrangedLedger {
  readonly groups: readonly LedgerGroup[];
  readonly total: number;
}

/**
 * Rows grouped and sorted for reading. Within a group, shown rows and folded ones add up to the group; the groups
 * add up to the total.
 */
export function arrangeLedger(rows: readonly LedgerRow[]): ArrangedLedger {
  const groups = ORDER.map((name) => arrangeGroup(name, rows));
  // The output is named even when there is none: that is the first question.
  return {
    groups: groups.filter((group) => group.name === 'output' || group.rows.length + group.folded.rows > 0),
    total: sum(rows),
  };
}

function arrangeGroup(name: Group, rows: readonly LedgerRow[]): LedgerGroup {
  const mine = rows.filter((row) => row.fraction !== 0 && groupOf(row) === name);
  const folded = name === 'output' ? [] : mine.filter((row) => row.fraction < SMALLEST_SHOWN);
  const shown = mine.filter((row) => !folded.includes(row)).sort((a, b) => b.fraction - a.fraction);
  return { name, fraction: sum(mine), rows: shown, folded: { rows: folded.length, fraction: sum(folded) } };
}

function sum(rows: readonly LedgerRow[]): number {
  return rows.reduce((total, row) => total + row.fraction, 0);
}
