import type { QuenchingData } from './material-data.js';
import { numberIn, readTable } from './read-table.js';

/** How a dye quenches itself in a solvent, or null where no constants are held. */
export function readDyeQuenching(dye: string, solvent: string): QuenchingData | null {
  const row = readTable('dye-quenching.csv').rows.find((entry) => entry.dye === dye && entry.solvent === solvent);
  if (row === undefined) return null;
  return {
    radiusNm: numberIn(row, 'R0_nm'),
    dimerRadiusNm: numberIn(row, 'R0_dimer_nm'),
    pairing: numberIn(row, 'K_L_per_mol'),
    most: numberIn(row, 'most_mol_per_L'),
    status: row.status,
    source: row.source,
  };
}
