import { mkdir, mkdtemp, readdir, readFile, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type Disk, disk } from '../../src/run-folder/disk.js';
import { readRun } from '../../src/run-folder/read-run.js';
import { RunFolderError } from '../../src/run-folder/run-folder-error.js';
import { writeRun } from '../../src/run-folder/write-run.js';
import { sampleRun } from './sample-run.js';

let root = '';
beforeEach(async () => {
  root = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(root, { recursive: true, force: true }));

const { record, arrays } = sampleRun();
const write = (path: string, on?: Disk) => writeRun(join(root, path), record, arrays, on);
/** A disk on which the `nth` call (from 1) of one kind fails. */
function failing(call: 'writeFile' | 'rename' | 'mkdir', code: string, nth = 1): Disk {
  let calls = 0;
  const real: (...words: never[]) => Promise<unknown> = disk[call];
  const broken = async (...words: never[]) => {
    calls += 1;
    if (calls === nth) throw Object.assign(new Error(`${code}: ${call}`), { code, syscall: call });
    return real(...words);
  };
  return { ...disk, [call]: broken };
}

describe('writeRun', () => {
  it('writes all files, named in run.json, and nothing beside the folder', async () => {
    const names = await write('loom/run');
    expect(await readdir(join(root, 'loom'))).toEqual(['run']);
    expect((await readdir(join(root, 'loom/run'))).sort()).toEqual([...names].sort());
    const read = await readRun(join(root, 'loom/run'));
    const named = [
      ...read.maps.flatMap(({ files }) => files),
      ...read.radiance.flatMap(({ files }) => files),
      ...read.angles.map(({ photometricFile }) => photometricFile),
      ...read.angles,
      ...read.spectra,
      ...read.curves,
    ].map((of) => (typeof of === 'string' ? of : of.file));
    expect([...new Set([...named, 'run.json', 'ledger.csv', 'drawing.json'])].sort()).toEqual([...names].sort());
    expect(names).toContain('map-detector-etc.npy');
    expect(names).toContain('map-detector-etc-2.npy');
    const npy = await readFile(join(root, 'loom/run/map-exit-lid-top.npy'), 'latin1');
    expect(npy).toContain("'shape': (2, 3), }");
  });

  it('keeps every value of the record', async () => {
    await write('run');
    const blank = (of: typeof record) => ({
      ...of,
      maps: of.maps.map((map) => ({ ...map, files: [] })),
      spectra: of.spectra.map((spectrum) => ({ ...spectrum, file: '' })),
      curves: of.curves.map((curve) => ({ ...curve, file: '' })),
      angles: of.angles.map((one) => ({ ...one, file: '', photometricFile: '' })),
      radiance: of.radiance.map((one) => ({ ...one, files: [] })),
    });
    expect(blank(await readRun(join(root, 'run')))).toEqual(record);
  });

  it('writes the same bytes whatever order the keys of the record stood in', async () => {
    const turned = Object.fromEntries(Object.entries(record).reverse()) as unknown as typeof record;
    await write('a');
    await writeRun(join(root, 'b'), turned, arrays);
    expect(await readFile(join(root, 'b/run.json'), 'utf8')).toBe(await readFile(join(root, 'a/run.json'), 'utf8'));
  });

  it('takes an empty folder, also behind a link, and never one with something in it', async () => {
    await mkdir(join(root, 'empty'));
    await symlink('empty', join(root, 'link'));
    await write('link');
    expect(await readdir(join(root, 'empty'))).toContain('run.json');
    const before = await readFile(join(root, 'empty/run.json'), 'utf8');
    await expect(write('empty')).rejects.toThrow(/never overwritten.*Name a new folder/);
    expect(await readFile(join(root, 'empty/run.json'), 'utf8')).toBe(before);
    expect((await readdir(root)).sort()).toEqual(['empty', 'link']);
  });

  it('gives way to somebody who takes the name while it writes', async () => {
    const late: Disk = {
      ...disk,
      rename: async (from, to) => {
        await mkdir(to.toString());
        await writeFile(join(to.toString(), 'theirs'), 'kept');
        await disk.rename(from, to);
      },
    };
    await expect(write('run', late)).rejects.toThrow(RunFolderError);
    expect(await readdir(root)).toEqual(['run']);
    expect(await readdir(join(root, 'run'))).toEqual(['theirs']);
  });

  it.each([
    ['writeFile', 'ENOSPC', 1, 'the disk is full. Make room'],
    ['writeFile', 'ENOSPC', 5, 'the disk is full. Make room'],
    ['writeFile', 'EDQUOT', 2, 'quota'],
    ['mkdir', 'EROFS', 1, 'read-only'],
    ['mkdir', 'EACCES', 2, 'permission denied'],
    ['rename', 'EBUSY', 1, 'mount point'],
  ] as const)('leaves nothing behind when %s fails with %s (call %i)', async (call, code, nth, words) => {
    const failure = write('new/deep/run', failing(call, code, nth));
    await expect(failure).rejects.toThrow(RunFolderError);
    await expect(failure).rejects.toThrow(words);
    await expect(failure).rejects.toThrow(join(root, 'new/deep/run'));
    expect(await readdir(root)).toEqual([]);
  });

  it('leaves what others put into a folder made on the way', async () => {
    const on = failing('writeFile', 'ENOSPC', 3);
    const both: Disk = {
      ...on,
      rm: async (path, how) => {
        await writeFile(join(root, 'new/theirs'), 'kept');
        await disk.rm(path, how);
      },
    };
    await expect(write('new/deep/run', both)).rejects.toThrow(RunFolderError);
    expect(await readdir(join(root, 'new'))).toEqual(['theirs']);
  });

  it('tells a file in the way from a folder', async () => {
    await writeFile(join(root, 'file'), 'mine');
    await expect(write('file')).rejects.toThrow('a file stands where a folder is needed');
    await expect(write('file/run')).rejects.toThrow('a file stands where a folder is needed');
    expect(await readFile(join(root, 'file'), 'utf8')).toBe('mine');
    expect(await readdir(root)).toEqual(['file']);
  });

  it('lets a defect of the program pass as it is, and cleans up', async () => {
    const [map] = arrays.maps;
    const wrong = { ...arrays, maps: [{ ...map, values: new Float64Array(5) }] };
    await expect(writeRun(join(root, 'run'), record, wrong)).rejects.toThrow(RangeError);
    expect(await readdir(root)).toEqual([]);
  });
});
