/** Writes a folder of files, whole or not at all. */
import { randomUUID } from 'node:crypto';
import { dirname, join, resolve } from 'node:path';
import { type Disk, disk } from './disk.js';
import { fileSystemReason, isFileSystemError, RunFolderError } from './run-folder-error.js';

export type NamedFile = readonly [name: string, content: string | Uint8Array];

/**
 * Writes files into `folder`, which must not exist or be empty. Everything goes into a temporary folder beside it first, which then
 * takes its name in one step; on a failure it is taken away again.
 * @param files asked for one after the other, so that not all of them need be in memory
 * @returns names of the files written
 * @throws RunFolderError when the file system refuses
 */
export async function writeFolder(
  folder: string,
  files: Iterable<NamedFile>,
  on: Disk = disk,
): Promise<readonly string[]> {
  const target = await freeFolder(folder, on);
  const parent = dirname(target);
  const partial = join(parent, `.writing-${randomUUID()}`);
  let made: string | undefined;
  const names: string[] = [];
  try {
    made = await on.mkdir(parent, { recursive: true });
    await on.mkdir(partial);
    for (const [name, content] of files) {
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
