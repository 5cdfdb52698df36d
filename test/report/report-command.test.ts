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
    const pictures = files.filter((name) => /^picture-.*\.(svg|png)$/.test(name));
    expect(pictures.filter((name) => name.endsWith('.png')).length).toBe(pictures.length / 2);
    expect(pictures).toContain('picture-flow.png');
    const bytes = (name: string) => readFile(join(cwd, 'run', name));
    const drawn = await Promise.all(pictures.map(bytes));
    const { pictures: named } = JSON.parse(await readFile(join(cwd, 'run/run.json'), 'utf8'));
    expect(named.flatMap((one: { files: string[] }) => one.files).sort()).toEqual(pictures);
    await writeFile(join(cwd, 'run/report.html'), 'lost');
    for (const name of pictures) await writeFile(join(cwd, 'run', name), 'lost');
    const { code, out, err } = await run('report', 'run');
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out.trim().split('\n').sort()).toEqual(['report.html', ...pictures].map((name) => join('run', name)).sort());
    expect(await page()).toBe(traced);
    expect(await Promise.all(pictures.map(bytes))).toEqual(drawn);
    expect(await readdir(join(cwd, 'run'))).toEqual(files);
  });

  it('draws what is asked for, and leaves what run.json says', async () => {
    await run('trace', 'cell.yaml', '--histories', '2000', '--pictures', 'none', '--out', 'bare');
    expect((await readdir(join(cwd, 'bare'))).filter((name) => name.startsWith('picture-'))).toEqual([]);
    const { code, out } = await run('report', 'bare', '--pictures', 'svg');
    expect(code).toBe(0);
    expect(out).toContain('picture-spectra.svg');
    expect(out).not.toContain('.png');
    expect((await run('report', 'bare')).out.trim()).toBe(join('bare', 'report.html'));
    const wrong = await run('report', 'bare', '--pictures', 'jpeg');
    expect(wrong.code).toBe(2);
    expect(wrong.err).toContain('none, svg, all');
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
