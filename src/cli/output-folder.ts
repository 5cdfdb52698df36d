import { mkdir, readdir, rm, writeFile } from 'node:fs/promises';
import { basename, join } from 'node:path';
import { CommandFault } from './command-fault.js';
import { EXIT } from './exit-codes.js';
import { safeText } from './safe-text.js';

const RESULTS = 'results';

/**
 * Folder of a run when none is asked for: results/<design file's name>/<UTC date and time>, a new one each time.
 * @param now time the run starts
 */
export function defaultRunFolder(designFile: string, now: Date): string {
  const name = basename(designFile)
    .replace(/\.ya?ml$/i, '')
    .replace(/[^\p{L}\p{N}._-]+/gu, '-')
    .replace(/^\.+/, '');
  const stamp = now.toISOString().replace(/\..*/, '').replace('T', '-').replaceAll(':', '');
  const milliseconds = String(now.getUTCMilliseconds()).padStart(3, '0');
  return join(RESULTS, name || 'design', `${stamp}-${milliseconds}`);
}

/**
 * Makes sure, before any time is spent on tracing, that a run can be written to `folder`, and leaves no trace of having
 * tried. A folder with something in it is refused: results are never overwritten.
 * @throws CommandFault
 */
export async function checkRunFolder(folder: string): Promise<void> {
  const shown = safeText(folder);
  if ((await entriesOf(folder)).length > 0) {
    throw new CommandFault(
      EXIT.unwritable,
      `the folder "${shown}" is not empty, and results are never overwritten. Name a new folder with --out.`,
    );
  }
  let created: string | undefined;
  try {
    created = await mkdir(folder, { recursive: true });
    const probe = join(folder, `.can-write-${process.pid}`);
    await writeFile(probe, 'x', { flag: 'wx' });
    await rm(probe);
  } catch (error) {
    throw unwritable(folder, error);
  } finally {
    if (created !== undefined) await rm(created, { recursive: true, force: true });
  }
}

/** The fault to tell when writing `folder` failed; anything that is not the file system's is passed on as it is. */
export function unwritable(folder: string, error: unknown): unknown {
  if (!isFileSystemError(error)) return error;
  return new CommandFault(
    EXIT.unwritable,
    `cannot write results to "${safeText(folder)}": ${reason(error)}. Name another folder with --out.`,
  );
}

async function entriesOf(folder: string): Promise<string[]> {
  try {
    return await readdir(folder);
  } catch (error) {
    if (isFileSystemError(error) && error.code === 'ENOENT') return [];
    throw unwritable(folder, error);
  }
}

const REASONS: Readonly<Record<string, string>> = {
  EACCES: 'permission denied',
  EPERM: 'permission denied',
  EROFS: 'the file system is read-only',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  ENOTDIR: 'part of the path is a file, not a folder',
  EEXIST: 'a file of that name is in the way',
  ENAMETOOLONG: 'the name is too long',
  ENOENT: 'part of the path does not exist and cannot be made',
};

function reason(error: NodeJS.ErrnoException): string {
  return REASONS[error.code ?? ''] ?? safeText(error.message);
}

function isFileSystemError(error: unknown): error is NodeJS.ErrnoException {
  return error instanceof Error && 'code' in error && 'syscall' in error;
}
