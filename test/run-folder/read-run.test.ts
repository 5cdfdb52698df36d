import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { readRun } from '../../src/run-folder/read-run.js';
import { RunFolderError } from '../../src/run-folder/run-folder-error.js';
import { sampleRun } from './sample-run.js';

let root = '';
beforeEach(async () => {
  root = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(root, { recursive: true, force: true }));

async function readText(text: string): Promise<unknown> {
  await writeFile(join(root, 'run.json'), text);
  return readRun(root);
}

describe('readRun', () => {
  it('tells a newer format, and who wrote it', async () => {
    const newer = JSON.stringify({ format: 7, tool: { name: 'stokeswell', version: '9.1.0' }, anything: true });
    const reading = readText(newer);
    await expect(reading).rejects.toThrow(RunFolderError);
    await expect(reading).rejects.toThrow(
      /stokeswell 9\.1\.0 wrote it in format 7.*this one reads format 3\. Read it with/,
    );
  });

  it('tells an older format, and what to do', async () => {
    const older = JSON.stringify({ ...sampleRun().record, format: 1 });
    await expect(readText(older)).rejects.toThrow(/in format 1, and this one reads format 3\. Trace the design again/);
  });

  it.each([
    ['{"format": 1, "tool"', 'not whole JSON'],
    ['', 'not whole JSON'],
    ['[]', 'no record of a run'],
    ['{"format": 0}', 'at format'],
    ['{"format": 1, "tool": {"name": "other", "version": "1"}}', 'at tool.name'],
    ['{"format": 3, "tool": {"name": "stokeswell", "version": "1"}}', 'at design'],
  ])('refuses %s', async (text, words) => {
    await expect(readText(text)).rejects.toThrow(RunFolderError);
    await expect(readText(text)).rejects.toThrow(words);
  });

  it('says where nothing is', async () => {
    await expect(readRun(root)).rejects.toThrow(/run\.json": it does not exist\. Name the folder of a run/);
    await mkdir(join(root, 'run.json'));
    await expect(readRun(root)).rejects.toThrow('no plain file');
  });

  it('passes over keys it does not know', async () => {
    const { record } = sampleRun();
    expect(await readText(JSON.stringify({ ...record, later: 1 }))).toEqual(record);
  });
});
