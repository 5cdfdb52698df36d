/** Exit statuses and streams of the built command, as documented in `stokeswell --help`. */
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { runCli } from './run-cli.js';

let cwd = '';
beforeEach(async () => {
  cwd = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(cwd, { recursive: true, force: true }));

const run = (...words: string[]) => runCli(words, { cwd });

/** Sentences, not a stack trace. */
const expectSentences = (text: string): void => {
  expect(text.trim()).not.toBe('');
  expect(text).not.toMatch(/^\s+at /m);
  expect(text).not.toMatch(/node:internal|defect/);
};

describe('command line', () => {
  it('--help documents commands and every exit status', async () => {
    const { code, out, err } = await run('--help');
    expect({ code, err }).toEqual({ code: 0, err: '' });
    for (const word of ['new', 'check', 'draw', 'trace', 'explain', 'prove', 'schema'])
      expect(out).toMatch(new RegExp(`^ +${word} `, 'm'));
    for (const status of ['0', '1', '2', '3', '4', '70', '130'])
      expect(out).toMatch(new RegExp(`^ +${status} +\\w`, 'm'));
  });

  it('--version prints the version', async () => {
    const version = JSON.parse(await readFile(new URL('../../package.json', import.meta.url), 'utf8')).version;
    expect(await run('--version')).toEqual({ code: 0, out: `${version}\n`, err: '' });
  });

  it.each([
    [[]],
    [['tarce', 'x.yaml']],
    [['trace']],
    [['check']],
    [['trace', 'a.yaml', 'b.yaml']],
    [['draw']],
    [['draw', 'a.yaml', '--dial', 'depth']],
    [['trace', 'a.yaml', '--unknown']],
    [['trace', 'a.yaml', '--histories', '0']],
    [['trace', 'a.yaml', '--histories', '-3']],
    [['trace', 'a.yaml', '--histories', 'NaN']],
    [['trace', 'a.yaml', '--precision', '0.2']],
    [['trace', 'a.yaml', '--for', '30']],
    [['trace', 'a.yaml', '--ledger', 'lumens']],
    [['trace', 'a.yaml', '--dial', 'depth']],
    [['schema', 'page']],
    [['explain', 'no-such-word-at-all']],
  ])('usage fault %j ends with 2 and a sentence', async (words) => {
    const { code, out, err } = await run(...words);
    expect({ code, out }).toEqual({ code: 2, out: '' });
    expectSentences(err);
  });

  it('suggests the nearest command', async () => {
    expect((await run('tarce')).err).toContain('trace');
  });
});

describe('new', () => {
  it('writes a starter design that passes check, and never overwrites', async () => {
    const first = await run('new', 'cell.yaml');
    expect(first).toMatchObject({ code: 0, err: '' });
    const text = await readFile(join(cwd, 'cell.yaml'), 'utf8');
    const second = await run('new', 'cell.yaml');
    expect(second).toMatchObject({ code: 2, out: '' });
    expectSentences(second.err);
    expect(await readFile(join(cwd, 'cell.yaml'), 'utf8')).toBe(text);
    expect(await run('check', 'cell.yaml')).toMatchObject({ code: 0, err: '' });
  });

  it('ends with 3 where nothing can be written', async () => {
    await writeFile(join(cwd, 'file'), '');
    const { code, err } = await run('new', 'file/cell.yaml');
    expect(code).toBe(3);
    expectSentences(err);
    expect(await readdir(cwd)).toEqual(['file']);
  });
});

describe('designs that cannot be read', () => {
  it.each(['check', 'draw', 'trace'])(
    '%s: missing, empty, binary, folder: 2, a sentence that names the file, nothing written',
    async (command) => {
      await writeFile(join(cwd, 'empty.yaml'), '');
      await writeFile(join(cwd, 'binary.yaml'), Buffer.from([0x7f, 0x45, 0x4c, 0x46, 0, 1, 2, 0xff, 0xfe, 0]));
      const before = await readdir(cwd);
      for (const file of ['missing.yaml', 'empty.yaml', 'binary.yaml', '.']) {
        const { code, out, err } = await run(command, file);
        expect({ file, code }).toEqual({ file, code: 2 });
        expectSentences(out + err);
        expect(out + err).toContain(file);
      }
      expect(await readdir(cwd)).toEqual(before);
    },
  );

  it('check goes on with the other designs', async () => {
    await run('new', 'good.yaml');
    const { code, out } = await run('check', 'missing.yaml', 'good.yaml');
    expect(code).toBe(2);
    expect(out).toMatch(/^good\.yaml: no faults$/m);
  });

  it('check --json prints one document', async () => {
    await run('new', 'good.yaml');
    const { code, out, err } = await run('check', 'missing.yaml', 'good.yaml', '--json');
    expect({ code, err }).toEqual({ code: 2, err: '' });
    const checks: unknown = JSON.parse(out);
    expect(checks).toMatchObject([
      { file: 'missing.yaml', ok: false, faults: [{ severity: 'error' }] },
      { file: 'good.yaml', ok: true },
    ]);
  });

  it('check --faces lists every face', async () => {
    await run('new', 'good.yaml');
    const { code, out } = await run('check', 'good.yaml', '--faces');
    expect(code).toBe(0);
    expect(out).toMatch(/^ +cell\.top +flat /m);
    expect(out).toMatch(/surroundings/);
  });
});

describe('schema', () => {
  it.each(['design', 'run'])('prints the JSON Schema of a %s', async (of) => {
    const { code, out, err } = await run('schema', of);
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(JSON.parse(out)).toHaveProperty('$schema');
  });
});
