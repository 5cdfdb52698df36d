/** Writes a folder of small files, whole or not at all. */
import { randomUUID } from 'node:crypto';
import { mkdir, readdir, rename, rm, writeFile } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { fileSystemReason, isFileSystemError, RunFolderError } from './run-folder-error.js';

/**
 * Puts the files into a temporary folder beside `folder`, which must not exist or be empty, and gives that its name.
 * @throws RunFolderError when the file system refuses
 */
export async function writeFolder(
  folder: string,
  files: readonly (readonly [name: string, content: string])[],
): Promise<void> {
  const target = resolve(folder);
  const partial = join(dirname(target), `.writing-${randomUUID()}`);
  try {
    if ((await entriesOf(target)) > 0) {
      const reason = 'it has files in it already, and results are never overwritten';
      throw new RunFolderError('write', folder, reason, 'Name a new folder with --out.');
    }
    await mkdir(dirname(target), { recursive: true });
    await mkdir(partial);
    for (const [name, content] of files) await writeFile(join(partial, name), content, { flag: 'wx', flush: true });
    await rename(partial, target);
  } catch (error) {
    await rm(partial, { recursive: true, force: true }).catch(() => undefined);
    if (!isFileSystemError(error)) throw error;
    throw new RunFolderError('write', folder, fileSystemReason(error), 'Name another folder with --out.', error);
  }
}

async function entriesOf(folder: string): Promise<number> {
  try {
    return (await readdir(folder)).length;
  } catch (error) {
    if (isFileSystemError(error) && error.code === 'ENOENT') return 0;
    throw error;
  }
}
