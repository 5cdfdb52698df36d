import { mkdir, mkdtemp, readdir, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { dirname, join, relative, sep } from 'node:path';
import fc from 'fast-check';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { runFolderPath } from '../../src/run-folder/run-folder-path.js';

let root = '';
beforeEach(async () => {
  root = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(root, { recursive: true, force: true }));

const identity = { hash: 'deadbeef'.repeat(8), seed: '1', histories: 200_000 };

describe('runFolderPath', () => {
  it('counts on where runs alike were kept, and makes nothing', async () => {
    const path = () => runFolderPath(root, 'Loom strobe', identity);
    const run = join(root, 'loom-strobe', 'deadbeef-seed-1-200000');
    expect(await path()).toBe(run);
    expect(await readdir(root)).toEqual([]);
    await mkdir(run, { recursive: true });
    expect(await path()).toBe(`${run}-2`);
    await symlink('nowhere', `${run}-2`);
    expect(await path()).toBe(`${run}-3`);
  });

  it('stays two folders below its root for any title and seed', async () => {
    const text = fc.string({ unit: fc.constantFrom('.', '/', '\\', '\0', ':', 'a', 'é', '\u202e') });
    await fc.assert(
      fc.asyncProperty(text, text, async (title, seed) => {
        const path = await runFolderPath(root, title, { ...identity, seed });
        const inside = relative(root, path).split(sep);
        expect(inside).toHaveLength(2);
        for (const name of inside) expect(name).toMatch(/^[\p{L}\p{N}][\p{L}\p{N}-]*$/u);
      }),
    );
  });

  it('names a file in the way', async () => {
    await writeFile(join(root, 'loom'), '');
    await expect(runFolderPath(root, 'loom', identity)).rejects.toThrow(`${dirname(join(root, 'loom', 'x'))}`);
  });
});
