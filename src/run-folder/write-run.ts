/** Writes the folder of a run, whole or not at all. */
import { randomUUID } from 'node:crypto';
import { dirname, join, resolve } from 'node:path';
import type { RunArrays } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import { type Disk, disk } from './disk.js';
import { drawingJson } from './drawing-json.js';
import { anglesCsv, ledgerCsv, mapCsv, spectraCsv } from './encode-csv.js';
import { encodeNpy } from './encode-npy.js';
import {
  anglesFileNames,
  DRAWING_JSON,
  LEDGER_CSV,
  mapFileNames,
  nameFiles,
  RUN_JSON,
  SPECTRA_CSV,
} from './file-names.js';
import { fileSystemReason, isFileSystemError, RunFolderError } from './run-folder-error.js';
import { runJson } from './run-json.js';

/** A file that the caller adds to the folder of a run: its name, and what makes its contents. */
export type ExtraFile = readonly [name: string, make: (record: RunRecord, arrays: RunArrays) => string | Uint8Array];

/**
 * Writes run.json, the ledgers, spectra, maps, angles and the drawing into `folder`, which must not exist or be empty. Everything goes into a temporary
 * folder beside it first, which then takes its name in one step; on a failure it is taken away again.
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
  const target = await freeFolder(folder, on);
  const parent = dirname(target);
  const partial = join(parent, `.writing-${randomUUID()}`);
  let made: string | undefined;
  const names: string[] = [];
  try {
    made = await on.mkdir(parent, { recursive: true });
    await on.mkdir(partial);
    for (const [name, content] of runFiles(nameFiles(record), arrays, extras)) {
      // Flushed, so that after a power cut a folder with its final name has its files' contents too.
      await on.writeFile(join(partial, name), content, { flag: 'wx', flush: true });
      names.push(name);
    }
    // Refused by the system if someone has meanwhile put something there.
    await on.rename(partial, target);
    return names;
  } catch (error) {
    await on.rm(partial, { recursive: true, force: true }).catch(() => undefined);
    if (made !== undefined) await removeEmpty(parent, made, on);
    throw unwritable(folder, error);
  }
}

/** One file after another, so that not all of them need be in memory. */
function* runFiles(
  record: RunRecord,
  arrays: RunArrays,
  extras: readonly ExtraFile[],
): Generator<readonly [name: string, content: string | Uint8Array]> {
  yield [RUN_JSON, runJson(record)];
  yield [LEDGER_CSV, ledgerCsv(record)];
  yield [SPECTRA_CSV, spectraCsv(arrays.spectra)];
  const mapNames = mapFileNames(arrays.maps.map(({ id }) => id));
  for (const [i, map] of arrays.maps.entries()) {
    // NumPy counts the slowest axis first: [w][v][u].
    yield [mapNames[i].npy, encodeNpy(map.values, map.shape.toReversed())];
    yield [mapNames[i].csv, mapCsv(map)];
  }
  const angleNames = anglesFileNames(arrays.angles.map(({ id }) => id));
  for (const [i, angles] of arrays.angles.entries()) yield [angleNames[i], anglesCsv(angles)];
  if (arrays.drawing !== null) yield [DRAWING_JSON, drawingJson(arrays.drawing)];
  for (const [name, make] of extras) yield [name, make(record, arrays)];
}

/** Full path of a folder that is not there yet or is empty, links followed. */
async function freeFolder(folder: string, on: Disk): Promise<string> {
  try {
    const real = await on.realpath(folder);
    if ((await on.readdir(real)).length === 0) return real;
  } catch (error) {
    if (isFileSystemError(error) && error.code === 'ENOENT') return resolve(folder);
    throw unwritable(folder, error);
  }
  throw new RunFolderError(
    'write',
    folder,
    'it has files in it already, and results are never overwritten',
    'Name a new folder.',
  );
}

/** Takes away the folders made on the way to `folder`, innermost first, as far as nobody else has put something in. */
async function removeEmpty(folder: string, outermost: string, on: Disk): Promise<void> {
  for (let at = folder; at.length >= outermost.length; at = dirname(at)) {
    try {
      await on.rmdir(at);
    } catch {
      return;
    }
  }
}

function unwritable(folder: string, error: unknown): unknown {
  if (!isFileSystemError(error)) return error;
  const step = error.code === 'ENOSPC' || error.code === 'EDQUOT' ? 'Make room, or name' : 'Name';
  return new RunFolderError('write', folder, fileSystemReason(error), `${step} another folder.`, error);
}
