/** Writes the folder of a run, whole or not at all. */
import type { RunArrays } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import { type Disk, disk } from './disk.js';
import { drawingJson } from './drawing-json.js';
import { anglesCsv, curvesCsv, ledgerCsv, mapCsv, radianceCsv, spectraCsv } from './encode-csv.js';
import { encodeNpy } from './encode-npy.js';
import {
  anglesFileNames,
  CURVES_CSV,
  DRAWING_JSON,
  LEDGER_CSV,
  mapFileNames,
  nameFiles,
  RUN_JSON,
  radianceFileNames,
  SPECTRA_CSV,
} from './file-names.js';
import { photometricFile } from './photometric-file.js';
import { runJson } from './run-json.js';
import { type NamedFile, writeFolder } from './write-folder.js';

/** A file that the caller adds to the folder of a run: its name, and what makes its contents. */
export type ExtraFile = readonly [name: string, make: (record: RunRecord, arrays: RunArrays) => string | Uint8Array];

/**
 * Writes run.json, the ledgers, spectra, maps, angles, radiance, photometric files and the drawing into `folder`, which must not exist or be empty; whole or not at all.
 * @param extras files of the caller's, made of the record as written
 * @returns names of the files written
 * @throws RunFolderError when the file system refuses
 */
export async function writeRun(
  folder: string,
  record: RunRecord,
  arrays: RunArrays,
  on: Disk = disk,
  extras: readonly ExtraFile[] = [],
): Promise<readonly string[]> {
  return writeFolder(folder, runFiles(nameFiles(record), arrays, extras), on);
}

/** One file after another, so that not all of them need be in memory. */
function* runFiles(record: RunRecord, arrays: RunArrays, extras: readonly ExtraFile[]): Generator<NamedFile> {
  yield [RUN_JSON, runJson(record)];
  yield [LEDGER_CSV, ledgerCsv(record)];
  yield [SPECTRA_CSV, spectraCsv(arrays.spectra)];
  yield [CURVES_CSV, curvesCsv(arrays.curves, record.curves)];
  const mapNames = mapFileNames(arrays.maps.map(({ id }) => id));
  for (const [i, map] of arrays.maps.entries()) {
    // NumPy counts the slowest axis first: [w][v][u].
    yield [mapNames[i].npy, encodeNpy(map.values, map.shape.toReversed())];
    yield [mapNames[i].csv, mapCsv(map)];
  }
  const angleNames = anglesFileNames(arrays.angles.map(({ id }) => id));
  for (const [i, angles] of arrays.angles.entries()) yield [angleNames[i], anglesCsv(angles)];
  for (const [i, one] of record.angles.entries()) {
    if (one.photometricFile !== '') yield [one.photometricFile, photometricFile(record, one, arrays.angles[i])];
  }
  const radianceNames = radianceFileNames(arrays.radiance.map(({ id }) => id));
  for (const [i, radiance] of arrays.radiance.entries()) {
    const [u, v, polar, azimuth] = radiance.shape;
    yield [radianceNames[i].npy, encodeNpy(radiance.values, [v, u, polar, azimuth])];
    yield [radianceNames[i].csv, radianceCsv(radiance)];
  }
  if (arrays.drawing !== null) yield [DRAWING_JSON, drawingJson(arrays.drawing)];
  for (const [name, make] of extras) yield [name, make(record, arrays)];
}
