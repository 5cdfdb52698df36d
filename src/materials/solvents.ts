import { linearCurve } from '../numerics/interpolate.js';
import type { Curve } from '../units/curve.js';
import { readDispersion } from './dispersion.js';
import { type MaterialData, type ThermalData, unknownName } from './material-data.js';
import { numberIn, readTable } from './read-table.js';

/**
 * Row of the dispersion table for each solvent. Ethanol: the fit that covers 445 nm (Kozma 2005), not the one that starts at 476 nm
 * (Rheims 1997); past its red end at 641 nm it stays within 1.7e-3 of that other one up to 750 nm. Glycerol: the visible fit, not the one that flattens in the blue. Ethylene glycol: the row that agrees with handbook n_D.
 */
const DISPERSION: Readonly<Record<string, string | undefined>> = {
  water: 'water',
  ethanol: 'ethanol-uv',
  methanol: 'methanol',
  'ethylene-glycol': 'ethylene-glycol',
  glycerol: 'glycerol-vis',
};

export const solventNames = (): readonly string[] => Object.keys(DISPERSION);

/** @throws RangeError for an unknown name. */
export function readSolvent(name: string): MaterialData {
  const row = Object.hasOwn(DISPERSION, name) ? DISPERSION[name] : undefined;
  if (row === undefined) throw unknownName('solvent', name, solventNames());
  const dispersion = readDispersion(row);
  const absorption = solventAbsorption(name);
  const dark = absorption === null ? 'absorption: no data, taken as lossless' : `absorption: ${absorption.status}`;
  return {
    name,
    kind: 'liquid',
    index: dispersion.index,
    absorption: absorption?.curve ?? (() => 0),
    thermal: solventThermal(name),
    rangeNm: dispersion.rangeNm,
    source: dispersion.source,
    status: `index: ${dispersion.status}; ${dark}`,
  };
}

/** 1/mm; held beyond the table's ends. */
function solventAbsorption(name: string): { curve: Curve; status: string } | null {
  const rows = readTable('solvent-absorption.csv').rows.filter(({ solvent }) => solvent === name);
  if (rows.length === 0) return null;
  const nm = rows.map((row) => numberIn(row, 'wavelength_nm'));
  const perMm = rows.map((row) => numberIn(row, 'absorption_per_m') / 1000);
  const held = `held outside ${nm[0]} to ${nm[nm.length - 1]} nm`;
  return { curve: linearCurve(nm, perMm, { below: 'hold', above: 'hold' }), status: `${rows[0].status}, ${held}` };
}

/** The row at 25 °C. */
function solventThermal(name: string): ThermalData | null {
  const wanted = name.replace('-', ' ');
  const row = readTable('thermal.csv').rows.find(
    (entry) => entry.solvent === wanted && Number(entry.temperature_C) === 25,
  );
  if (row === undefined) return null;
  return {
    densityKgPerM3: numberIn(row, 'density_kg_per_m3'),
    specificHeatJPerKgK: numberIn(row, 'specific_heat_J_per_kgK'),
    conductivityWPerMK: numberIn(row, 'thermal_conductivity_W_per_mK'),
    viscosityMPaS: numberIn(row, 'viscosity_mPa_s'),
    boilingPointC: numberIn(row, 'boiling_point_C'),
    indexPerKelvin: row.dn_dT_per_K === '' ? null : numberIn(row, 'dn_dT_per_K'),
    flashPointC: flashPoint(wanted),
    temperatureC: numberIn(row, 'temperature_C'),
    source: row.source,
  };
}

/** The first number of the cell: some give a range, or the same in other units after it. */
function flashPoint(item: string): number | null {
  const row = readTable('safety.csv').rows.find(
    (entry) => entry.topic === item && entry.item.startsWith('flash point'),
  );
  if (row === undefined) return null;
  const value = Number.parseFloat(row.value);
  if (!Number.isFinite(value)) throw new Error(`safety.csv: no number in the flash point of ${item}`);
  return value;
}
