/** Refractive index formulas of the library: Sellmeier, Cauchy, polynomial; coefficients and sources in data/dispersion.csv. */
import type { Curve } from '../units/curve.js';
import { numberIn, type Row, readTable } from './read-table.js';

export interface Dispersion {
  readonly index: Curve;
  readonly rangeNm: readonly [number, number];
  readonly source: string;
  readonly status: string;
}

/**
 * Index of a row of the table. Values are relative to air, as refractometers give them; air itself is 1 at every wavelength
 * in this library, so that interfaces with air stay right to 1e-6.
 */
export function readDispersion(material: string): Dispersion {
  const row = readTable('dispersion.csv').rows.find((entry) => entry.material === material);
  if (row === undefined) throw new Error(`no dispersion data for ${material}`);
  return {
    index: dispersionFormula(row),
    rangeNm: [numberIn(row, 'min_nm'), numberIn(row, 'max_nm')],
    source: row.source,
    status: row.note === '' ? row.status : `${row.status} (${row.note})`,
  };
}

function dispersionFormula(row: Row): Curve {
  const c = Array.from({ length: 8 }, (_, i) => Number(row[`c${i + 1}`] || 0));
  switch (row.form) {
    case 'sellmeier':
      return (nm) => {
        const l2 = (nm / 1000) ** 2;
        let n2 = 1;
        for (let i = 0; i < 8; i += 2) n2 += (c[i] * l2) / (l2 - c[i + 1]);
        return Math.sqrt(n2);
      };
    case 'cauchy':
      return (nm) => {
        const u = (nm / 1000) ** -2;
        return c[0] + u * (c[1] + u * (c[2] + u * c[3]));
      };
    case 'polynomial':
      return (nm) => {
        const l2 = (nm / 1000) ** 2;
        const u = 1 / l2;
        return Math.sqrt(c[0] + c[1] * l2 + u * (c[2] + u * (c[3] + u * c[4])));
      };
    default:
      throw new Error(`unknown dispersion formula ${row.form}`);
  }
}
