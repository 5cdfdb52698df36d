import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { readArrays } from '../../src/run-folder/read-arrays.js';
import { readRun } from '../../src/run-folder/read-run.js';
import { RunFolderError } from '../../src/run-folder/run-folder-error.js';
import { writeRun } from '../../src/run-folder/write-run.js';
import { sampleRun } from './sample-run.js';

const sample = sampleRun();
// As the outcome stage makes them: a column for each spectrum of the record.
const record = {
  ...sample.record,
  spectra: sample.arrays.spectra.columns.map(({ id }) => ({ ...sample.record.spectra[0], id })),
};

let folder = '';
beforeEach(async () => {
  folder = join(await mkdtemp(join(tmpdir(), 'stokeswell-')), 'run');
  await writeRun(folder, record, sample.arrays);
});
afterEach(() => rm(join(folder, '..'), { recursive: true, force: true }));

const read = async () => readArrays(folder, await readRun(folder));
const change = async (name: string, by: (text: string) => string) =>
  writeFile(join(folder, name), by(await readFile(join(folder, name), 'utf8')));

describe('readArrays', () => {
  it('gives back what was written, to the last bit', async () => {
    expect(await read()).toEqual(sample.arrays);
  });

  it('has no drawing where its file was taken away, as in runs of older versions', async () => {
    await rm(join(folder, 'drawing.json'));
    expect(await read()).toEqual({ ...sample.arrays, drawing: null });
  });

  it.each([
    ['a damaged drawing', () => change('drawing.json', (text) => text.slice(0, -9)), 'drawing.json'],
    ['a missing table', () => rm(join(folder, 'map-exit-lid-top.csv')), 'does not exist'],
    ['a lost line', () => change('map-exit-lid-top.csv', (text) => text.replace(/\n[^\n]+\n$/, '\n')), '5 cells'],
    ['words for numbers', () => change('spectra.csv', (text) => text.replace('500', 'five')), 'line 2'],
    [
      'a lost column',
      () => change('spectra.csv', (text) => text.replace(/,[^,]*\n/, '\n').replace(/,[^,]*\n/g, '\n')),
      'fields',
    ],
    [
      'rings that do not close',
      () => change('angles-exit-lid-top.csv', (text) => text.replace(/\n[^\n]+\n$/, '\n')),
      'rings',
    ],
  ] as const)('tells %s by file', async (_, harm, words) => {
    await harm();
    await expect(read()).rejects.toThrow(RunFolderError);
    await expect(read()).rejects.toThrow(words);
  });
});

describe('files of the caller', () => {
  it('are made of the record as written and land with the rest', async () => {
    const other = join(folder, '..', 'other');
    const names = await writeRun(other, record, sample.arrays, undefined, [
      ['note.txt', ({ maps }) => maps.flatMap(({ files }) => files).join('\n')],
    ]);
    expect(names).toContain('note.txt');
    expect(await readFile(join(other, 'note.txt'), 'utf8')).toContain('map-exit-lid-top.npy');
  });

  it('that cannot be made leave no folder', async () => {
    const other = join(folder, '..', 'other');
    const fail = () => {
      throw new Error('no page');
    };
    await expect(writeRun(other, record, sample.arrays, undefined, [['note.txt', fail]])).rejects.toThrow('no page');
    await expect(readRun(other)).rejects.toThrow('does not exist');
  });
});
