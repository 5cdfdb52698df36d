/** `stokeswell trace` from end to end on the starter design, as a shell would run it. */
import type { ChildProcess } from 'node:child_process';
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { RunRecord } from '../../src/record/run-record.js';
import { runCli } from './run-cli.js';

let cwd = '';
beforeEach(async () => {
  cwd = await mkdtemp(join(tmpdir(), 'stokeswell-'));
  await runCli(['new', 'cell.yaml'], { cwd });
});
afterEach(() => rm(cwd, { recursive: true, force: true }));

const run = (...words: string[]) => runCli(words, { cwd });

/** What must be the same to the last bit, whoever traced it. */
const bits = (record: RunRecord) => {
  const { figures, ledger, maps, spectra, angles, histograms } = record;
  return { figures, ledger, maps, spectra, angles, histograms };
};

describe('trace', () => {
  it('prints the ledger and writes the run, its total 100 %', async () => {
    const { code, out, err } = await run('trace', 'cell.yaml', '--histories', '2e4', '--out', 'run');
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out).toMatch(/^total +100\.00$/m);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: there must be none in a pipe
    expect(out).not.toMatch(/[\u001b\r]/);
    for (const line of out.split('\n')) expect([...line].length).toBeLessThanOrEqual(80);
    const record: RunRecord = JSON.parse(await readFile(join(cwd, 'run', 'run.json'), 'utf8'));
    for (const rows of [record.ledger.photons, record.ledger.watts]) {
      expect(Math.abs(rows.reduce((sum, row) => sum + row.fraction, 0) - 1)).toBeLessThan(1e-12);
    }
    expect(record.run.histories).toBe(20_000);
  });

  it('--plain prints the record and nothing else; --no-files leaves nothing behind', async () => {
    const { code, out, err } = await run('trace', 'cell.yaml', '--histories', '5000', '--plain', '--no-files');
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(JSON.parse(out)).toMatchObject({ format: 3, run: { histories: 5000, stopReason: 'histories' } });
    expect(await readdir(cwd)).toEqual(['cell.yaml']);
  });

  it('gives the same bits for 1, 2 and 7 threads, and others for another seed', async () => {
    const traced: RunRecord[] = [];
    for (const [threads, seed] of [
      ['1', 'a'],
      ['2', 'a'],
      ['7', 'a'],
      ['2', 'b'],
    ] as const) {
      const words = ['--histories', '10500', '--threads', threads, '--seed', seed, '--plain', '--no-files'];
      traced.push(JSON.parse((await run('trace', 'cell.yaml', ...words)).out));
    }
    const [one, two, seven, other] = traced.map(bits);
    expect(two).toEqual(one);
    expect(seven).toEqual(one);
    expect(other).not.toEqual(one);
  });

  it('refuses a folder in use or out of reach before tracing', async () => {
    await writeFile(join(cwd, 'file'), '');
    for (const folder of ['.', 'file', 'file/run']) {
      const { code, out, err } = await run('trace', 'cell.yaml', '--for', '60s', '--out', folder);
      expect({ folder, code, out }).toEqual({ folder, code: 3, out: '' });
      expect(err).toContain('--out');
    }
    expect((await readdir(cwd)).sort()).toEqual(['cell.yaml', 'file']);
  });

  it('stops on time and on precision', async () => {
    const timed = await run('trace', 'cell.yaml', '--for', '1s', '--plain', '--no-files');
    expect(JSON.parse(timed.out).run.stopReason).toBe('time');
    const precise = await run('trace', 'cell.yaml', '--precision', '3%', '--plain', '--no-files');
    const record: RunRecord = JSON.parse(precise.out);
    expect(record.run.stopReason).toBe('precision');
    const { value, standardError } = record.figures.exitPhotonFraction;
    expect((standardError ?? 1) / (value ?? 0)).toBeLessThanOrEqual(0.03);
  });

  it('names a dial that is not there and writes nothing', async () => {
    const { code, err } = await run('trace', 'cell.yaml', '--dial', 'no-such-dial=1 mm');
    expect(code).toBe(2);
    expect(err).toContain('no-such-dial');
    expect(await readdir(cwd)).toEqual(['cell.yaml']);
  });

  it('--progress writes a line a quarter to standard error only', async () => {
    const { code, out, err } = await run(
      'trace',
      'cell.yaml',
      '--histories',
      '2e4',
      '--progress',
      '--plain',
      '--no-files',
    );
    expect(code).toBe(0);
    expect(JSON.parse(out)).toHaveProperty('format');
    expect(err).toMatch(/^100 %, 20 000 histories/m);
  });
});

describe('Ctrl-C', () => {
  const words = ['trace', 'cell.yaml', '--for', '100s', '--progress', '--out', 'run'];
  /** Ctrl-C once tracing is under way. The time bound is far off; a quarter of it is never reached. */
  const interruptAfter = (milliseconds: number) => (child: ChildProcess) => {
    setTimeout(() => child.kill('SIGINT'), milliseconds);
  };

  it('once: keeps what is done, to the same bits as asking for that many histories', async () => {
    const { code, out } = await runCli(words, { cwd, meanwhile: interruptAfter(4000) });
    expect(code).toBe(4);
    expect(out).toContain('interrupted');
    const record: RunRecord = JSON.parse(await readFile(join(cwd, 'run', 'run.json'), 'utf8'));
    expect(record.run.stopReason).toBe('interrupted');
    await run('trace', 'cell.yaml', '--histories', String(record.run.histories), '--out', 'again');
    const again: RunRecord = JSON.parse(await readFile(join(cwd, 'again', 'run.json'), 'utf8'));
    expect(bits(again)).toEqual(bits(record));
  });

  it('before anything is traced: 130 and nothing written, or kept if a batch was done', async () => {
    const { code } = await runCli(words, { cwd, meanwhile: interruptAfter(300) });
    const files = await readdir(cwd);
    if (code === 4) expect(files).toContain('run');
    else if (code === 130) expect(files).toEqual(['cell.yaml']);
    else {
      // The signal came before the program had started to listen: at most the trial of the folder is left, empty.
      expect(code).toBeNull();
      if (files.includes('run')) expect(await readdir(join(cwd, 'run'))).toEqual([]);
    }
  });
});

describe('a reader that goes away', () => {
  it('is left quietly; the run is kept', async () => {
    const { code, err } = await runCli(['trace', 'cell.yaml', '--histories', '5000', '--out', 'run'], {
      cwd,
      meanwhile: (child) => child.stdout?.destroy(),
    });
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(await readdir(join(cwd, 'run'))).toContain('run.json');
  });
});
