import { numberIn, type Row, readTable } from './read-table.js';

/** A constant of a dye with how far published values lie apart. */
export interface RangedConstant {
  readonly value: number;
  readonly low: number;
  readonly high: number;
  /** What it was measured in. */
  readonly measuredIn: string;
  readonly status: string;
  readonly source: string;
}

export interface Photostability {
  /** Molecules destroyed per photon absorbed; null where nothing is known. */
  readonly bleachYield: RangedConstant | null;
  /** Share of excitations that end in the triplet, and its lifetime in ns; null where either is not known. */
  readonly triplet: { readonly yield: RangedConstant; readonly lifetimeNs: RangedConstant } | null;
}

/** What the library knows of how a dye fades and fills its triplet; nulls for a dye it knows nothing of. */
export function readPhotostability(dye: string, solvent: string): Photostability {
  const { rows } = readTable('photostability.csv');
  const find = (quantity: string): RangedConstant | null => {
    const of = (where: string) =>
      rows.find((row) => row.dye === dye && row.quantity === quantity && row.solvent === where);
    const row = of(solvent) ?? of('*');
    return row === undefined ? null : constantOf(row);
  };
  const [tripletYield, lifetimeNs] = [find('triplet-yield'), find('triplet-lifetime')];
  return {
    bleachYield: find('bleach-yield'),
    triplet: tripletYield === null || lifetimeNs === null ? null : { yield: tripletYield, lifetimeNs },
  };
}

function constantOf(row: Row): RangedConstant {
  const { measured_in: measuredIn, status, source } = row;
  return {
    value: numberIn(row, 'value'),
    low: numberIn(row, 'low'),
    high: numberIn(row, 'high'),
    measuredIn,
    status,
    source,
  };
}
