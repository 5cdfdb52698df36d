/** Words for what became of the light, the same on terminal and page. */
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

/** What is wanted, what was lost before and after the dye, and what the dye itself keeps. */
export function groupOf({ fate, light }: Pick<LedgerRow, 'fate' | 'light'>): Group {
  if (fate === 'stokes-heat' || fate === 'lost-in-dye' || fate === 'quenched') return 'heat';
  if (light === 'pump') return 'pump-lost';
  return fate === 'left-by-exit' ? 'output' : 'light-lost';
}

/** A fate in plain words, without its place. */
export function fateWords({ fate, light, by }: Pick<LedgerRow, 'fate' | 'light' | 'by'>): string {
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
      return `absorbed by ${material(by) ?? 'the solid'}`;
    case 'absorbed-by-solvent':
      return `absorbed by ${material(by) ?? 'the solvent'}`;
    case 'lost-in-dye':
      return `not re-emitted by ${by ?? 'the dye'}`;
    case 'quenched':
      return `quenched in ${by ?? 'the dye'}`;
    case 'stokes-heat':
      return `Stokes heat in ${by ?? 'the dye'}`;
    case 'trapped':
      return 'trapped for good';
  }
}

/** Library name of a material; one of the design's own has none. */
const material = (by: string | null): string | null => (by === 'custom' ? null : by);

/** What one change could mend: all that one finish or dye takes, wherever it is, or all that goes one way at one place. */
export function causeWords(row: LedgerRow): string {
  return row.by !== null || row.where === null ? fateWords(row) : `${fateWords(row)}, ${row.where}`;
}
