import type { LedgerRow } from '../record/run-record.js';
import { fateWords, groupOf } from '../terms/ledger-words.js';

export { fateWords, GROUP_WORDS, GROUPS, type Group, groupOf } from '../terms/ledger-words.js';

/** How light ended: a row of a ledger, or the end of a traced path. */
export type Ending = Pick<LedgerRow, 'fate' | 'light' | 'where' | 'by'>;

/** A fate with its place; where a dye keeps energy, also of which light. */
export function placedWords(row: Ending): string {
  const words = groupOf(row) === 'heat' ? heatWords(row) : fateWords(row);
  return row.where === null ? words : `${words}, ${row.where}`;
}

function heatWords({ fate, light, by }: Ending): string {
  const of = light === 'pump' ? 'pump light' : 'light taken back';
  const dye = by ?? 'the dye';
  if (fate === 'quenched') return `${of} quenched in ${dye}`;
  return fate === 'stokes-heat' ? `Stokes heat of ${of} in ${dye}` : `${of} not re-emitted by ${dye}`;
}

/** Sum of the fractions. */
export function totalOf(rows: readonly { readonly fraction: number }[]): number {
  return rows.reduce((sum, { fraction }) => sum + fraction, 0);
}
