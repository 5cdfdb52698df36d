/** Names of the files of a run folder. Ids hold names of the design, so they are slugged; no two files are named alike. */
import type { RunRecord } from '../record/run-record.js';
import { uniqueSlugs } from './slug.js';

export const RUN_JSON = 'run.json';
export const SPECTRA_CSV = 'spectra.csv';
export const CURVES_CSV = 'curves.csv';
export const LEDGER_CSV = 'ledger.csv';
export const DRAWING_JSON = 'drawing.json';

/** The record with the names of the files its folder holds filled in. */
export function nameFiles(record: RunRecord): RunRecord {
  const maps = mapFileNames(record.maps.map(({ id }) => id));
  const angles = anglesFileNames(record.angles.map(({ id }) => id));
  return {
    ...record,
    maps: record.maps.map((map, i) => ({ ...map, files: [maps[i].npy, maps[i].csv] })),
    spectra: record.spectra.map((spectrum) => ({ ...spectrum, file: SPECTRA_CSV })),
    curves: record.curves.map((curve) => ({ ...curve, file: CURVES_CSV })),
    angles: record.angles.map((one, i) => ({ ...one, file: angles[i] })),
  };
}

/** @param ids of all maps of the run, in order. */
export function mapFileNames(ids: readonly string[]): { readonly npy: string; readonly csv: string }[] {
  return uniqueSlugs(ids, 'map').map((name) => ({ npy: `map-${name}.npy`, csv: `map-${name}.csv` }));
}

/** @param ids of all angle records of the run, in order. */
export function anglesFileNames(ids: readonly string[]): string[] {
  return uniqueSlugs(ids, 'angles').map((name) => `angles-${name}.csv`);
}
