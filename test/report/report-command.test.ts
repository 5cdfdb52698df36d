/** The page lands with its run, and `stokeswell report` makes it again. */
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runCli } from '../cli/run-cli.js';

let cwd = '';
const run = (...words: string[]) => runCli(words, { cwd });
const page = () => readFile(join(cwd, 'run/report.html'), 'utf8');

beforeAll(async () => {
  cwd = await mkdtemp(join(tmpdir(), 'stokeswell-'));
  await run('new', 'cell.yaml');
  await run('trace', 'cell.yaml', '--histories', '5000', '--out', 'run');
});
afterAll(() => rm(cwd, { recursive: true, force: true }));

describe('report', () => {
  it('makes the same page again from the record and its tables, and leaves nothing else', async () => {
    const traced = await page();
    const files = await readdir(join(cwd, 'run'));
    expect(files).toContain('report.html');
    await writeFile(join(cwd, 'run/report.html'), 'lost');
    const { code, out, err } = await run('report', 'run');
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out.trim()).toBe(join('run', 'report.html'));
    expect(await page()).toBe(traced);
    expect(await readdir(join(cwd, 'run'))).toEqual(files);
  });

  it('tells a folder that is no run, and a run with a table lost', async () => {
    const none = await run('report', '.');
    expect(none.code).toBe(3);
    expect(none.err).toContain('run.json');
    await rm(join(cwd, 'run/spectra.csv'));
    const before = await page();
    const lost = await run('report', 'run');
    expect(lost.code).toBe(3);
    expect(lost.err).toContain('spectra.csv');
    expect(await page()).toBe(before);
  });
});
