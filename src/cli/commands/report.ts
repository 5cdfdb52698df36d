import { randomUUID } from 'node:crypto';
import { rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { REPORT_HTML, runPage } from '../../report/run-page.js';
import { readArrays } from '../../run-folder/read-arrays.js';
import { readRun } from '../../run-folder/read-run.js';
import { fileSystemReason, isFileSystemError, RunFolderError } from '../../run-folder/run-folder-error.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { print } from '../output-stream.js';
import { safeText } from '../safe-text.js';

/** `stokeswell report FOLDER`: the page of a run made again, in place of the one that is there. */
export async function reportCommand(folder: string): Promise<ExitCode> {
  const record = await readRun(folder);
  const page = runPage(record, await readArrays(folder, record));
  const path = join(folder, REPORT_HTML);
  await replaceFile(path, page);
  print(`${safeText(path)}\n`);
  return EXIT.ok;
}

/** Whole or not at all: a reader never sees half a page. */
async function replaceFile(path: string, text: string): Promise<void> {
  const partial = `${path}.${randomUUID()}`;
  try {
    await writeFile(partial, text, { flag: 'wx', flush: true });
    await rename(partial, path);
  } catch (error) {
    await rm(partial, { force: true }).catch(() => undefined);
    if (!isFileSystemError(error)) throw error;
    throw new RunFolderError(
      'write',
      path,
      fileSystemReason(error),
      'Copy the run to a folder you may write to.',
      error,
    );
  }
}
