import type { LedgerRow } from '../../record/run-record.js';

/** Groups of the ledger, in the order they are shown. */
export const GROUPS = ['output', 'lost pump light', 'lost emitted light', 'heat in the dye'] as const;
export type Group = (typeof GROUPS)[number];

/** The group a fate belongs to: what is wanted, what was lost before and after the dye, and what the dye itself keeps. */
export function groupOf(row: LedgerRow): Group {
  if (row.fate === 'stokes-heat' || row.fate === 'lost-in-dye') return 'heat in the dye';
  if (row.light === 'pump') return 'lost pump light';
  return row.fate === 'left-by-exit' ? 'output' : 'lost emitted light';
}

/** A fate in plain words. */
export function fateWords(row: LedgerRow): string {
  switch (row.fate) {
    case 'missed':
      return 'missed every part';
    case 'reflected-at-entry':
      return 'reflected at entry';
    case 'left-by-exit':
      return row.light === 'pump' ? 'pump light by the exit' : 'left by the exit';
    case 'left-elsewhere':
      return row.light === 'pump' ? 'left again unabsorbed' : 'left elsewhere';
    case 'absorbed-by-finish':
      return `absorbed by ${row.by ?? 'the finish'}`;
    case 'absorbed-by-solid':
      return 'absorbed by the solid';
    case 'absorbed-by-solvent':
      return 'absorbed by the solvent';
    case 'lost-in-dye':
      return `not re-emitted: ${row.by ?? 'dye'}`;
    case 'stokes-heat':
      return `Stokes heat: ${row.by ?? 'dye'}`;
    case 'trapped':
      return 'trapped for good';
  }
}
