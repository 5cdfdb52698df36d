import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { checkOutputFolder } from '../../src/cli/output-folder.js';

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('checkOutputFolder', () => {
  it('takes a folder that is not there yet and leaves no trace', async () => {
    await checkOutputFolder(join(folder, 'a', 'b', 'c'));
    expect(await readdir(folder)).toEqual([]);
  });

  it('takes an empty folder and leaves it empty', async () => {
    await checkOutputFolder(folder);
    expect(await readdir(folder)).toEqual([]);
  });

  it('refuses a folder with something in it', async () => {
    await writeFile(join(folder, 'run.json'), '{}');
    await expect(checkOutputFolder(folder)).rejects.toMatchObject({
      name: 'RunFolderError',
      message: expect.stringContaining('never overwritten'),
    });
    expect(await readdir(folder)).toEqual(['run.json']);
  });

  it('refuses a file, and a folder below a file', async () => {
    const file = join(folder, 'file');
    await writeFile(file, '');
    await expect(checkOutputFolder(file)).rejects.toMatchObject({
      name: 'RunFolderError',
      message: expect.stringContaining('--out'),
    });
    await expect(checkOutputFolder(join(file, 'run'))).rejects.toMatchObject({
      name: 'RunFolderError',
      message: expect.stringContaining('--out'),
    });
    expect(await readdir(folder)).toEqual(['file']);
  });

  it.skipIf(process.platform !== 'linux')('refuses a place where the system makes no folders, at once', async () => {
    await expect(checkOutputFolder('/proc/run')).rejects.toMatchObject({ name: 'RunFolderError' });
    await expect(checkOutputFolder('/proc/a/b')).rejects.toMatchObject({ name: 'RunFolderError' });
  });
});
