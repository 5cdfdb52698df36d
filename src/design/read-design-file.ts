/** Files of a design: read whole or refused, never more than a bounded number of bytes. */
import { open, readdir, stat } from 'node:fs/promises';
import { basename, dirname, extname, join } from 'node:path';
import { nearestName } from '../units/nearest-name.js';
import type { Fault } from './fault.js';

export const LARGEST_DESIGN_BYTES = 1_000_000;

export type FileReading = { readonly ok: true; readonly text: string } | { readonly ok: false; readonly fault: Fault };

/** The text of a design file, or why it cannot be had. Never throws for what a file system can do. */
export async function readDesignFile(file: string): Promise<FileReading> {
  try {
    const status = await stat(file);
    if (!status.isFile()) return await refuseNoFile(file, status.isDirectory());
    if (status.size > LARGEST_DESIGN_BYTES) return refuseSize(status.size);
    return decodeText(await readBounded(file));
  } catch (error) {
    return await refuseError(file, error);
  }
}

/** Bytes to text: what is not text is refused. */
export function decodeText(bytes: Uint8Array): FileReading {
  if (bytes.length > LARGEST_DESIGN_BYTES) return refuseSize(bytes.length);
  if (bytes.includes(0)) return refuse('the file is not text: it has zero bytes', 'a design in YAML, UTF-8');
  try {
    return { ok: true, text: new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes) };
  } catch {
    return refuse('the file is not text in UTF-8', 'a design in YAML, saved as UTF-8');
  }
}

/** A file may grow between the look at its size and the reading; one byte above the limit tells. */
async function readBounded(file: string): Promise<Uint8Array> {
  const handle = await open(file, 'r');
  try {
    const buffer = new Uint8Array(LARGEST_DESIGN_BYTES + 1);
    let length = 0;
    while (length < buffer.length) {
      const { bytesRead } = await handle.read(buffer, length, buffer.length - length, length);
      if (bytesRead === 0) break;
      length += bytesRead;
    }
    return buffer.subarray(0, length);
  } finally {
    await handle.close();
  }
}

const refuse = (problem: string, expected: string, found?: string, suggestion?: string): FileReading => ({
  ok: false,
  fault: {
    code: 'file',
    severity: 'error',
    path: [],
    problem,
    expected,
    ...(found === undefined ? {} : { found }),
    ...(suggestion === undefined ? {} : { suggestion }),
  },
});

const refuseSize = (bytes: number): FileReading =>
  refuse('the file is too large for a design', `at most ${LARGEST_DESIGN_BYTES} bytes`, `${bytes} bytes`);

async function refuseNoFile(file: string, isFolder: boolean): Promise<FileReading> {
  const designs = isFolder ? await designsIn(file) : [];
  const hint = designs.length === 0 ? undefined : `name one of its designs: ${designs.slice(0, 5).join(', ')}`;
  return refuse('this is not a file', 'a design file', isFolder ? 'a folder' : 'a device or pipe', hint);
}

async function refuseError(file: string, error: unknown): Promise<FileReading> {
  const code = error instanceof Error && 'code' in error ? String(error.code) : '';
  if (code === 'ENOENT' || code === 'ENOTDIR') {
    const folder = dirname(file);
    const designs = await designsIn(folder);
    const nearest = nearestName(basename(file), designs);
    const listed = designs.length === 0 ? 'an existing design file' : `one of ${designs.slice(0, 8).join(', ')}`;
    const same = designs.find((name) => basename(name, extname(name)) === basename(file, extname(file)));
    const suggestion = same ?? nearest;
    return refuse(
      'there is no such file',
      listed,
      basename(file),
      suggestion === null ? undefined : join(folder, suggestion),
    );
  }
  if (code === 'EACCES' || code === 'EPERM')
    return refuse('the file may not be read', 'a file you have the right to read');
  if (code === '') throw error;
  return refuse(`the file cannot be read (${code})`, 'a readable file');
}

async function designsIn(folder: string): Promise<string[]> {
  try {
    return (await readdir(folder)).filter((name) => /\.ya?ml$/i.test(name)).sort();
  } catch {
    return [];
  }
}
