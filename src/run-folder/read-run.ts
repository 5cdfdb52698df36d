/** Reads the record of a run back from its folder. */
import { join } from 'node:path';
import { z } from 'zod';
import { RUN_FORMAT, type RunRecord } from '../record/run-record.js';
import { RUN_JSON } from './file-names.js';
import { firstIssue, readJson } from './read-json.js';
import { RunFolderError } from './run-folder-error.js';
import { runRecordSchema } from './run-schema.js';

/** Far above any record (a design text is at most some MB); keeps a wrong file from filling the memory. */
const LARGEST_BYTES = 64 * 2 ** 20;
const TRACE_AGAIN = 'Name the folder of a run that stokeswell wrote, or trace the design again.';

/** @throws RunFolderError when there is no record, or it is damaged or of another format. */
export async function readRun(folder: string): Promise<RunRecord> {
  const path = join(folder, RUN_JSON);
  const written = await readJson({ path, largestBytes: LARGEST_BYTES, nextStep: TRACE_AGAIN });
  checkFormat(path, written);
  const parsed = runRecordSchema.safeParse(written);
  if (parsed.success) return parsed.data;
  throw new RunFolderError('read', path, firstIssue(parsed.error), TRACE_AGAIN);
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
