import { lstat } from 'node:fs/promises';
import { join } from 'node:path';
import { fileSystemReason, isFileSystemError, RunFolderError } from './run-folder-error.js';
import { slug } from './slug.js';

/** What tells the runs of a design apart. */
export interface RunIdentity {
  /** Hash of the design as used, hex; its first eight digits name the run. */
  readonly hash: string;
  readonly seed: string;
  readonly histories: number;
}

/**
 * Path of a folder for a run that is not there yet: outRoot/<title>/<hash>-seed-<seed>-<histories>, with -2, -3, … where runs alike were kept
 * before. Makes nothing.
 * @throws RunFolderError when the place cannot be looked at
 */
export async function runFolderPath(
  outRoot: string,
  title: string,
  { hash, seed, histories }: RunIdentity,
): Promise<string> {
  const run = `${slug(hash.slice(0, 8), 'design')}-seed-${slug(seed, 'other')}-${slug(String(histories), 'all')}`;
  return freePath(join(outRoot, slug(title, 'design')), run);
}

/** Path of a folder for the drawing of a design: outRoot/<title>/<hash>-drawing, with -2, -3, … as above. */
export async function drawingFolderPath(outRoot: string, title: string, hash: string): Promise<string> {
  return freePath(join(outRoot, slug(title, 'design')), `${slug(hash.slice(0, 8), 'design')}-drawing`);
}

/** Path of a folder that is not there yet: folder/name, with -2, -3, … as above. */
export async function freePath(folder: string, name: string): Promise<string> {
  for (let copy = 1; ; copy++) {
    const path = join(folder, copy === 1 ? name : `${name}-${copy}`);
    if (!(await exists(path))) return path;
  }
}

async function exists(path: string): Promise<boolean> {
  try {
    await lstat(path);
    return true;
  } catch (error) {
    if (!isFileSystemError(error)) throw error;
    if (error.code === 'ENOENT') return false;
    throw new RunFolderError('write', path, fileSystemReason(error), 'Name another folder.', error);
  }
}
