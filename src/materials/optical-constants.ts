import { linearCurve } from '../numerics/interpolate.js';
import type { LayerMaterialData } from './material-data.js';
import { numberIn, readTable } from './read-table.js';

/** Complex index of a material of a table with the columns material, wavelength_nm, n, k; linear, held beyond. */
export function opticalConstants(file: string, material: string): Omit<LayerMaterialData, 'status'> {
  const { rows, notes } = readTable(file);
  const own = rows.filter((row) => row.material === material);
  const nm = own.map((row) => numberIn(row, 'wavelength_nm'));
  const curve = (column: 'n' | 'k') =>
    linearCurve(
      nm,
      own.map((row) => numberIn(row, column)),
      { below: 'hold', above: 'hold' },
    );
  const source = notes.find((note) => note.startsWith(`${material}:`));
  if (source === undefined) throw new Error(`${file} names no source for ${material}`);
  return {
    name: material,
    n: curve('n'),
    k: curve('k'),
    rangeNm: [nm[0], nm[nm.length - 1]],
    source: source.slice(material.length + 1).trim(),
  };
}
