/** The tables of a run folder. Header names carry the unit in plain letters, so that every spreadsheet shows them right. */

import type { AnglesArray, CurvesArray, MapArray, RadianceArray, SpectraArray } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import { type CsvField, csvText } from './csv-text.js';

/** A row per cell: the centre of the cell, the value (blank off the face or liquid), and how much face or liquid the cell holds. */
export function mapCsv({ shape, extentMm, extentDeg, axes, unit, values, measure }: MapArray): string {
  const [value, size] =
    unit === 'W/cm²' ? ['irradiance_W_per_cm2', 'area_mm2'] : ['absorbed_power_density_W_per_cm3', 'volume_mm3'];
  const ends = extentDeg ?? extentMm;
  const header = [...axisNames(axes, extentDeg), value, size];
  return csvText(header, mapRows());

  function* mapRows(): Generator<CsvField[]> {
    for (let i = 0; i < values.length; i++) {
      let rest = i;
      const centre = shape.map((cells, axis) => {
        const at = rest % cells;
        rest = (rest - at) / cells;
        return cellMiddle(ends[axis], cells, at);
      });
      yield [...centre, values[i], measure[i]];
    }
  }
}

const axisNames = (axes: readonly string[], extentDeg: MapArray['extentDeg']): string[] =>
  axes.map((axis) => `${axis.replaceAll(' ', '_')}_${extentDeg === undefined ? 'mm' : 'deg'}`);

const cellMiddle = ([low, high]: readonly [number, number], cells: number, at: number): number =>
  low + ((at + 0.5) / cells) * (high - low);

/** A row per wavelength; a column per spectrum, photons per launched photon per nm. */
export function spectraCsv({ wavelengthsNm, columns }: SpectraArray): string {
  const header = ['wavelength_nm', ...columns.map(({ id }) => `${id}_per_nm`)];
  return csvText(
    header,
    Array.from(wavelengthsNm, (nm, i) => [nm, ...columns.map(({ values }) => values[i])]),
  );
}

const UNIT_WORDS: Readonly<Record<RunRecord['curves'][number]['unit'], string>> = {
  '1/mm': '_per_mm',
  'L/(mol cm)': '_L_per_mol_cm',
  '1/nm': '_per_nm',
  '1': '',
};

/** A row per wavelength; a column per curve, in the unit its name ends with. @param records of the same curves, in the same order */
export function curvesCsv({ wavelengthsNm, columns }: CurvesArray, records: RunRecord['curves']): string {
  const header = columns.map(({ id }) => {
    const record = records.find((curve) => curve.id === id);
    return `${id.replaceAll(' ', '_')}${record === undefined ? '' : UNIT_WORDS[record.unit]}`;
  });
  return csvText(
    ['wavelength_nm', ...header],
    Array.from(wavelengthsNm, (nm, i) => [nm, ...columns.map(({ values }) => values[i])]),
  );
}

/** A row per direction, at the centre of its cell. */
export function anglesCsv({ polarCells, azimuthCells, polarToDeg, wattsPerSr, candela }: AnglesArray): string {
  return csvText(
    ['polar_deg', 'azimuth_deg', 'radiant_intensity_W_per_sr', 'luminous_intensity_cd'],
    Array.from(wattsPerSr, (intensity, i) => {
      const azimuth = i % azimuthCells;
      const polar = (i - azimuth) / azimuthCells;
      return [((polar + 0.5) * polarToDeg) / polarCells, ((azimuth + 0.5) * 360) / azimuthCells, intensity, candela[i]];
    }),
  );
}

/** A row per place and direction, at the centres of their cells; blank off the face. */
export function radianceCsv({ shape, extentMm, extentDeg, axes, values }: RadianceArray): string {
  const [nu, nv, polar, azimuth] = shape;
  const [u, v] = extentDeg ?? extentMm;
  return csvText(
    [...axisNames(axes, extentDeg), 'polar_from_normal_deg', 'azimuth_about_normal_deg', 'radiance_W_per_m2_sr'],
    Array.from(values, (value, i) => {
      const place = Math.floor(i / (polar * azimuth));
      return [
        cellMiddle(u, nu, place % nu),
        cellMiddle(v, nv, Math.floor(place / nu)),
        cellMiddle([0, 90], polar, Math.floor(i / azimuth) % polar),
        cellMiddle([0, 360], azimuth, i % azimuth),
        value,
      ];
    }),
  );
}

/** Both ledgers, one under the other; `of` tells which. Fractions of launched photons, or of launched power. */
export function ledgerCsv({ ledger }: RunRecord): string {
  const rows = (['photons', 'watts'] as const).flatMap((of) =>
    ledger[of].map(({ fate, light, where, by, fraction, standardError }) => [
      of,
      fate,
      light,
      where,
      by,
      fraction,
      standardError,
    ]),
  );
  return csvText(['of', 'fate', 'light', 'where', 'by', 'fraction', 'standard_error'], rows);
}
