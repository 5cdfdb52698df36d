import { randomUUID } from 'node:crypto';
import { rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { choiceOf, type PictureChoice } from '../../report/pictures/picture-choice.js';
import { REPORT_HTML, runPage } from '../../report/run-page.js';
import { readArrays } from '../../run-folder/read-arrays.js';
import { readRun } from '../../run-folder/read-run.js';
import { fileSystemReason, isFileSystemError, RunFolderError } from '../../run-folder/run-folder-error.js';
import { drawnPictures } from '../drawn-pictures.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { print } from '../output-stream.js';
import { safeText } from '../safe-text.js';

export interface ReportOptions {
  /** undefined: in the formats the run has. */
  readonly pictures?: PictureChoice;
}

/** `stokeswell report FOLDER`: the page and the pictures of a run made again, in place of those that are there; run.json is left as it is. */
export async function reportCommand(folder: string, options: ReportOptions): Promise<ExitCode> {
  const record = await readRun(folder);
  const arrays = await readArrays(folder, record);
  const page = runPage(record, arrays);
  const { files } = await drawnPictures(record, arrays, options.pictures ?? choiceOf(record));
  for (const [name, content] of [[REPORT_HTML, page] as const, ...files]) {
    const path = join(folder, name);
    await replaceFile(path, content);
    print(`${safeText(path)}\n`);
  }
  return EXIT.ok;
}

/** Whole or not at all: a reader never sees half a page. */
async function replaceFile(path: string, text: string | Uint8Array): Promise<void> {
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
