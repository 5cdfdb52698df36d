import { join } from 'node:path';
import type { Drawing } from '../record/drawing.js';
import { drawingSchema } from './drawing-json.js';
import { DRAWING_JSON } from './file-names.js';
import { firstIssue, readJson } from './read-json.js';
import { isFileSystemError, RunFolderError } from './run-folder-error.js';

/** Far above the drawing of any design; keeps a wrong file from filling the memory. */
const LARGEST_BYTES = 256 * 2 ** 20;
const NEXT_STEP = 'Trace the design again, or take the file away: the page then has no drawing.';

/** The drawing of a run; null where its folder has none. @throws RunFolderError when it is damaged or of another format */
export async function readDrawing(folder: string): Promise<Drawing | null> {
  const path = join(folder, DRAWING_JSON);
  const written = await readJson({ path, largestBytes: LARGEST_BYTES, nextStep: NEXT_STEP }).catch((error: unknown) => {
    if (isMissing(error)) return undefined;
    throw error;
  });
  if (written === undefined) return null;
  const parsed = drawingSchema.safeParse(written);
  if (parsed.success) return parsed.data;
  throw new RunFolderError('read', path, `it is no drawing: ${firstIssue(parsed.error)}`, NEXT_STEP);
}

function isMissing(error: unknown): boolean {
  return error instanceof RunFolderError && isFileSystemError(error.cause) && error.cause.code === 'ENOENT';
}
