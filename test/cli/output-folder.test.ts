import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { checkRunFolder, defaultRunFolder, unwritable } from '../../src/cli/output-folder.js';

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('checkRunFolder', () => {
  it('takes a folder that is not there yet and leaves no trace', async () => {
    await checkRunFolder(join(folder, 'a', 'b', 'c'));
    expect(await readdir(folder)).toEqual([]);
  });

  it('takes an empty folder and leaves it empty', async () => {
    await checkRunFolder(folder);
    expect(await readdir(folder)).toEqual([]);
  });

  it('refuses a folder with something in it', async () => {
    await writeFile(join(folder, 'run.json'), '{}');
    await expect(checkRunFolder(folder)).rejects.toMatchObject({ exitCode: 3, message: /never overwritten/ });
    expect(await readdir(folder)).toEqual(['run.json']);
  });

  it('refuses a file, and a folder below a file', async () => {
    const file = join(folder, 'file');
    await writeFile(file, '');
    await expect(checkRunFolder(file)).rejects.toMatchObject({ exitCode: 3 });
    await expect(checkRunFolder(join(file, 'run'))).rejects.toMatchObject({ exitCode: 3 });
    expect(await readdir(folder)).toEqual(['file']);
  });
});

describe('unwritable', () => {
  it('tells a full disk in words and leaves defects of the program as they are', () => {
    const full = Object.assign(new Error('ENOSPC: no space left on device, write'), {
      code: 'ENOSPC',
      syscall: 'write',
    });
    expect(unwritable('x', full)).toMatchObject({ exitCode: 3, message: /the disk is full/ });
    const defect = new TypeError('x is not a function');
    expect(unwritable('x', defect)).toBe(defect);
  });
});

describe('defaultRunFolder', () => {
  it('is named after the design file and the time', () => {
    const now = new Date('2026-12-01T08:09:10.011Z');
    expect(defaultRunFolder('geometries/two-bank.yaml', now)).toBe(
      join('results', 'two-bank', '2026-12-01-080910-011'),
    );
    expect(defaultRunFolder('../a b;c.yml', now)).toBe(join('results', 'a-b-c', '2026-12-01-080910-011'));
    expect(defaultRunFolder('..', now)).toBe(join('results', 'design', '2026-12-01-080910-011'));
  });
});
