/** Reads JSON files of a run folder; what is wrong with one is told as a RunFolderError. */
import { readFile, stat } from 'node:fs/promises';
import type { z } from 'zod';
import { fileSystemReason, isFileSystemError, RunFolderError } from './run-folder-error.js';

export interface JsonFile {
  readonly path: string;
  readonly largestBytes: number;
  /** What to do about a file that cannot be read, a whole sentence. */
  readonly nextStep: string;
}

/** @throws RunFolderError when the file cannot be read or is no JSON; its `cause` is the error of the file system or of the parser */
export async function readJson(file: JsonFile): Promise<unknown> {
  const text = await readText(file);
  try {
    return JSON.parse(text);
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    throw new RunFolderError('read', file.path, `it is not whole JSON (${reason})`, file.nextStep, error);
  }
}

async function readText({ path, largestBytes, nextStep }: JsonFile): Promise<string> {
  try {
    const found = await stat(path);
    // A pipe or a device would never end.
    if (!found.isFile()) throw new RunFolderError('read', path, 'it is no plain file', nextStep);
    if (found.size > largestBytes) {
      throw new RunFolderError('read', path, `${found.size} bytes are too many for it`, nextStep);
    }
    return await readFile(path, 'utf8');
  } catch (error) {
    if (!isFileSystemError(error)) throw error;
    throw new RunFolderError('read', path, fileSystemReason(error), nextStep, error);
  }
}

export function firstIssue({ issues }: z.ZodError): string {
  const [{ path, message }] = issues;
  const more = issues.length > 1 ? `; ${issues.length - 1} more` : '';
  return `${path.length > 0 ? `at ${path.join('.')}: ` : ''}${message}${more}`;
}
