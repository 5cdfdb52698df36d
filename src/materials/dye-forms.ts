import type { Curve } from '../units/curve.js';
import type { DyeForm } from './material-data.js';
import { numberIn, type Row, readTable } from './read-table.js';

/** Forms of a dye in a solvent, most protonated first; none where the library knows no others. @param measured extinction in the dye's own file */
export function readDyeForms(dye: string, solvent: string, measured: Curve): readonly DyeForm[] {
  return readTable('dye-forms.csv')
    .rows.filter((row) => row.dye === dye && row.solvent === solvent)
    .map((row) => ({
      name: row.form,
      pKa: row.pKa === '' ? null : numberIn(row, 'pKa'),
      extinction: row.absorption_model === 'file' ? measured : bandModel(row),
      quantumYield: numberIn(row, 'quantum_yield'),
    }));
}

/** Where the model is scaled and cut, nm. */
const FROM_NM = 300;
const TO_NM = 650;

/** Sum of Gaussians in wavenumber, scaled so that its highest point is the published one. */
function bandModel(row: Row): Curve {
  const bands = row.absorption_model.split(';').map((band) => band.split(':').map(Number));
  const shape: Curve = (nm) =>
    bands.reduce(
      (sum, [amplitude, centre, sigma]) => sum + amplitude * Math.exp(-0.5 * ((1e7 / nm - centre) / sigma) ** 2),
      0,
    );
  let top = 0;
  for (let nm = FROM_NM; nm <= TO_NM; nm += 0.5) top = Math.max(top, shape(nm));
  const scale = numberIn(row, 'epsilon_L_per_mol_cm') / top;
  return (nm) => scale * shape(nm);
}
