import { mkdir, readdir, rm, rmdir, stat, writeFile } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { fileSystemReason, isFileSystemError, RunFolderError } from '../run-folder/run-folder-error.js';

/** Where runs go when no folder is asked for. */
export const RESULTS = 'results';

/**
 * Makes sure, before any time is spent on tracing, that a run can be written, and leaves no trace of having tried.
 * @param out folder asked for, which must be new or empty; undefined: somewhere new below `results`
 * @throws RunFolderError
 */
export async function checkOutputFolder(out: string | undefined): Promise<void> {
  const folder = out ?? RESULTS;
  if (out !== undefined && (await entriesOf(out)).length > 0) {
    throw new RunFolderError(
      'write',
      out,
      'it has files in it already, and results are never overwritten',
      'Name a new folder with --out.',
    );
  }
  const made: string[] = [];
  try {
    for (const missing of await missingFolders(folder)) {
      await mkdir(missing);
      made.unshift(missing);
    }
    const probe = join(folder, `.can-write-${process.pid}`);
    await writeFile(probe, 'x', { flag: 'wx' });
    await rm(probe);
  } catch (error) {
    throw unwritable(folder, error);
  } finally {
    // Innermost first; one that somebody has put something in stays.
    for (const path of made) await rmdir(path).catch(() => undefined);
  }
}

/** Folders to make, outermost first. Node's own recursive mkdir never returns where the system refuses with ENOENT, as in /proc. */
async function missingFolders(folder: string): Promise<string[]> {
  const missing: string[] = [];
  for (let at = resolve(folder); ; at = dirname(at)) {
    try {
      await stat(at);
      return missing;
    } catch (error) {
      if (!isFileSystemError(error) || error.code !== 'ENOENT' || dirname(at) === at) throw error;
      missing.unshift(at);
    }
  }
}

async function entriesOf(folder: string): Promise<string[]> {
  try {
    return await readdir(folder);
  } catch (error) {
    if (isFileSystemError(error) && error.code === 'ENOENT') return [];
    throw unwritable(folder, error);
  }
}

function unwritable(folder: string, error: unknown): unknown {
  if (!isFileSystemError(error)) return error;
  return new RunFolderError('write', folder, fileSystemReason(error), 'Name another folder with --out.', error);
}
