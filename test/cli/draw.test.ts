/** `stokeswell draw` as a shell would run it. */
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { runCli } from './run-cli.js';

let cwd = '';
beforeEach(async () => {
  cwd = await mkdtemp(join(tmpdir(), 'stokeswell-'));
});
afterEach(() => rm(cwd, { recursive: true, force: true }));

const run = (...words: string[]) => runCli(words, { cwd });
const starter = () => run('new', 'cell.yaml');
const text = (path: string) => readFile(join(cwd, path), 'utf8');

describe('draw', () => {
  it('writes the page and the sheet, prints their paths, and draws the same again', async () => {
    await starter();
    const { code, out, err } = await run('draw', 'cell.yaml', '--out', 'one');
    expect({ code, out, err }).toEqual({ code: 0, out: 'one/drawing.html\none/drawing.svg\n', err: '' });
    expect((await readdir(join(cwd, 'one'))).sort()).toEqual(['drawing.html', 'drawing.svg']);
    const svg = await text('one/drawing.svg');
    expect(svg).toMatch(/^<\?xml.*\n<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg"/);
    const page = await text('one/drawing.html');
    expect(page).toContain('class 4');
    expect(page).toContain('<pre class="design-text"');
    await run('draw', 'cell.yaml', '--out', 'two');
    expect(await text('two/drawing.svg')).toBe(svg);
    expect(await text('two/drawing.html')).toBe(page);
  });

  it('goes to a new folder below results, another for other dials; dials change sizes', async () => {
    await starter();
    const first = await run('draw', 'cell.yaml');
    const again = await run('draw', 'cell.yaml');
    const turned = await run('draw', 'cell.yaml', '--dial', 'depth=17.5 mm');
    const folders = [first, again, turned].map(({ out }) => out.split('\n')[0].replace('/drawing.html', ''));
    for (const folder of folders) expect(folder).toMatch(/^results\/[^/]+\/[0-9a-f]{8}-drawing(-2)?$/);
    expect(new Set(folders).size).toBe(3);
    expect(folders[1]).toBe(`${folders[0]}-2`);
    expect(await text(`${folders[0]}/drawing.svg`)).not.toContain('>17.5<');
    expect(await text(`${folders[2]}/drawing.svg`)).toContain('>17.5<');
  });

  it('tells faults as trace does, ends with 2 and writes nothing', async () => {
    await starter();
    const sound = await text('cell.yaml');
    // Not well-formed; found by the reader, by its names, by the scene, by the trial.
    const faulty = [
      'design: [',
      sound.replace(/exit: .*/, 'exit: nowhere.top'),
      sound.replace(/medium: bath/, 'medium: bathh'),
      sound.replace(/toward: cell.front\n +distance: .*/, 'at: [0 mm, -40 mm, 0 mm]\n    direction: [0, -1, 0]'),
    ];
    for (const design of faulty) {
      expect(design).not.toBe(sound);
      await writeFile(join(cwd, 'bad.yaml'), design);
      const drawn = await run('draw', 'bad.yaml');
      expect(drawn).toMatchObject({ code: 2, out: '' });
      expect(drawn.err).toBe((await run('trace', 'bad.yaml', '--histories', '1000')).err);
    }
    expect((await readdir(cwd)).sort()).toEqual(['bad.yaml', 'cell.yaml']);
  });

  it('refuses a folder in use or out of reach with 3, and leaves nothing behind', async () => {
    await starter();
    await writeFile(join(cwd, 'file'), '');
    for (const folder of ['.', 'file', 'file/drawing']) {
      const { code, out, err } = await run('draw', 'cell.yaml', '--out', folder);
      expect({ folder, code, out }).toEqual({ folder, code: 3, out: '' });
      expect(err).toContain('--out');
    }
    expect((await readdir(cwd)).sort()).toEqual(['cell.yaml', 'file']);
  });

  it('keeps hostile titles and comments out of page, sheet, path and terminal', async () => {
    await starter();
    const evil = `</title><script>globalThis.pwned = 1</script><img src=x onerror=alert(1)>../../etc`;
    const design = (await text('cell.yaml')).replace(/design: .*/, () => `design: '${evil}\u202e'\n# ${evil}`);
    await writeFile(join(cwd, 'evil.yaml'), design);
    const { code, out } = await run('draw', 'evil.yaml');
    expect(code).toBe(0);
    const [page, sheet] = out.trim().split('\n');
    expect(resolve(cwd, page).startsWith(join(cwd, 'results/'))).toBe(true);
    for (const path of [page, sheet]) {
      const written = await text(path);
      expect(written).not.toContain('<script>globalThis');
      expect(written).not.toContain('<img src=x');
      expect(written).not.toContain('\u202e');
      expect(written).toContain('&lt;script&gt;globalThis');
    }
  });
});
