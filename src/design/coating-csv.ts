/** Columns of a coating table in CSV. */
import { type NumberColumn, readNumberRows } from './number-csv.js';

export interface CoatingPoint {
  readonly wavelengthNm: number;
  readonly angleDeg: number;
  readonly reflectance: number;
  readonly transmittance: number;
}

const COLUMNS: readonly NumberColumn<keyof CoatingPoint>[] = [
  { name: 'wavelength_nm', field: 'wavelengthNm', least: 200, most: 2000 },
  { name: 'angle_deg', field: 'angleDeg', least: 0, most: 90 },
  { name: 'reflectance', field: 'reflectance', least: 0, most: 1 },
  { name: 'transmittance', field: 'transmittance', least: 0, most: 1 },
];

export const readCoatingRows = (text: string) => readNumberRows(text, COLUMNS);
