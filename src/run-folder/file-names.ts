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
  const radiance = radianceFileNames(record.radiance.map(({ id }) => id));
  const photometric = photometricFileNames(record.angles);
  return {
    ...record,
    maps: record.maps.map((map, i) => ({ ...map, files: [maps[i].npy, maps[i].csv] })),
    spectra: record.spectra.map((spectrum) => ({ ...spectrum, file: SPECTRA_CSV })),
    curves: record.curves.map((curve) => ({ ...curve, file: CURVES_CSV })),
    angles: record.angles.map((one, i) => ({ ...one, file: angles[i], photometricFile: photometric[i] })),
    radiance: record.radiance.map((one, i) => ({ ...one, files: [radiance[i].npy, radiance[i].csv] })),
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

/** @param ids of all radiance records of the run, in order. */
export function radianceFileNames(ids: readonly string[]): { readonly npy: string; readonly csv: string }[] {
  return uniqueSlugs(ids, 'radiance').map((name) => ({ npy: `radiance-${name}.npy`, csv: `radiance-${name}.csv` }));
}

/** Blank where light is dark to the eye or the record is no far field. */
export function photometricFileNames(angles: RunRecord['angles']): string[] {
  const slugs = uniqueSlugs(
    angles.map(({ id }) => id),
    'angles',
  );
  return angles.map(({ id, opening, lumens }, i) => {
    if (opening === null || !(lumens > 0)) return '';
    return id.startsWith('exit-') ? 'exit.ies' : `${slugs[i]}.ies`;
  });
}
