import type { LedgerRow } from '../record/run-record.js';

/** What became of the light, in the order in which a photon meets it. */
export const GROUPS = ['pump-lost', 'heat', 'light-lost', 'output'] as const;
export type Group = (typeof GROUPS)[number];

export const GROUP_WORDS: Readonly<Record<Group, string>> = {
  'pump-lost': 'lost pump light',
  heat: 'heat in the dye',
  'light-lost': 'lost emitted light',
  output: 'output',
};

/** How light ended: a row of a ledger, or the end of a traced path. */
export type Ending = Pick<LedgerRow, 'fate' | 'light' | 'where' | 'by'>;

export function groupOf({ fate, light }: Pick<Ending, 'fate' | 'light'>): Group {
  if (fate === 'stokes-heat' || fate === 'lost-in-dye') return 'heat';
  if (light === 'pump') return 'pump-lost';
  return fate === 'left-by-exit' ? 'output' : 'light-lost';
}

/** A fate in plain words, without its place. */
export function fateWords({ fate, light, by }: Ending): string {
  switch (fate) {
    case 'missed':
      return 'missed every part';
    case 'reflected-at-entry':
      return 'reflected at entry';
    case 'left-by-exit':
      return light === 'pump' ? 'pump light by the exit' : 'left by the exit';
    case 'left-elsewhere':
      return light === 'pump' ? 'left again unabsorbed' : 'left elsewhere';
    case 'absorbed-by-finish':
      return `absorbed by ${by ?? 'the finish'}`;
    case 'absorbed-by-solid':
      return 'absorbed by the solid';
    case 'absorbed-by-solvent':
      return `absorbed by ${by ?? 'the solvent'}`;
    case 'lost-in-dye':
      return `not re-emitted by ${by ?? 'the dye'}`;
    case 'stokes-heat':
      return `Stokes heat in ${by ?? 'the dye'}`;
    case 'trapped':
      return 'trapped for good';
  }
}

/** The same with its place; where a dye keeps energy, also of which light. */
export function placedWords(row: Ending): string {
  const words = groupOf(row) === 'heat' ? heatWords(row) : fateWords(row);
  return row.where === null ? words : `${words}, ${row.where}`;
}

function heatWords({ fate, light, by }: Ending): string {
  const of = light === 'pump' ? 'pump light' : 'light taken back';
  const dye = by ?? 'the dye';
  return fate === 'stokes-heat' ? `Stokes heat of ${of} in ${dye}` : `${of} not re-emitted by ${dye}`;
}

/** Sum of the fractions. */
export function totalOf(rows: readonly { readonly fraction: number }[]): number {
  return rows.reduce((sum, { fraction }) => sum + fraction, 0);
}
