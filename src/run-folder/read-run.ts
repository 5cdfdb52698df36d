/** Reads the record of a run back from its folder. */
import { readFile, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { z } from 'zod';
import { RUN_FORMAT, type RunRecord } from '../record/run-record.js';
import { RUN_JSON } from './file-names.js';
import { fileSystemReason, isFileSystemError, RunFolderError } from './run-folder-error.js';
import { runRecordSchema } from './run-schema.js';

/** Far above any record (a design text is at most some MB); keeps a wrong file from filling the memory. */
const LARGEST_BYTES = 64 * 2 ** 20;
const TRACE_AGAIN = 'Name the folder of a run that stokeswell wrote, or trace the design again.';

/** @throws RunFolderError when there is no record, or it is damaged or of another format. */
export async function readRun(folder: string): Promise<RunRecord> {
  const path = join(folder, RUN_JSON);
  const written = parseJson(path, await readText(path));
  checkFormat(path, written);
  const parsed = runRecordSchema.safeParse(written);
  if (parsed.success) return parsed.data;
  throw new RunFolderError('read', path, firstIssue(parsed.error), TRACE_AGAIN);
}

async function readText(path: string): Promise<string> {
  try {
    const found = await stat(path);
    // A pipe or a device would never end.
    if (!found.isFile()) throw new RunFolderError('read', path, 'it is no plain file', TRACE_AGAIN);
    if (found.size > LARGEST_BYTES) {
      throw new RunFolderError('read', path, `${found.size} bytes are too many for a record`, TRACE_AGAIN);
    }
    return await readFile(path, 'utf8');
  } catch (error) {
    if (!isFileSystemError(error)) throw error;
    throw new RunFolderError('read', path, fileSystemReason(error), TRACE_AGAIN, error);
  }
}

function parseJson(path: string, text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    throw new RunFolderError('read', path, `it is not whole JSON (${reason})`, TRACE_AGAIN, error);
  }
}

const headSchema = z.object({
  format: z.int().positive(),
  tool: z.object({ name: z.literal('stokeswell'), version: z.string() }),
});

function checkFormat(path: string, written: unknown): void {
  const head = headSchema.safeParse(written);
  if (!head.success)
    throw new RunFolderError('read', path, `it is no record of a run: ${firstIssue(head.error)}`, TRACE_AGAIN);
  const { format, tool } = head.data;
  if (format !== RUN_FORMAT) {
    throw new RunFolderError(
      'read',
      path,
      `stokeswell ${tool.version} wrote it in format ${format}, and this one reads format ${RUN_FORMAT}`,
      format > RUN_FORMAT
        ? 'Read it with the version that wrote it, or a later one.'
        : 'Trace the design again, or read it with the version that wrote it.',
    );
  }
}

function firstIssue({ issues }: z.ZodError): string {
  const [{ path, message }] = issues;
  const more = issues.length > 1 ? `; ${issues.length - 1} more` : '';
  return `${path.length > 0 ? `at ${path.join('.')}: ` : ''}${message}${more}`;
}
