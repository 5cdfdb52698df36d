/** `coating`: what it prints and writes, and what it refuses. */
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { CommandFault } from '../../src/cli/command-fault.js';
import { type CoatingOptions, coatingCommand } from '../../src/cli/commands/coating.js';
import { EXIT } from '../../src/cli/exit-codes.js';
import { parseWavelengths } from '../../src/cli/option-values.js';

const DESIGN = `design: Coats
media:
  bath: { index: 1.3614, absorption: 0.1 /mm }
finishes:
  coat: { stack: { layers: [{ material: magnesium-fluoride, quarter-waves: 1, at: 550 nm }] } }
  film: { stack: { layers: [{ material: tantalum-pentoxide-film, thickness: 60 nm }] } }
  ideal: { dichroic: { edge: 490 nm, passes: below, transmits: 95 %, reflects: 98 % } }
parts:
  cell: { box: [10 mm, 10 mm, 10 mm], medium: bath }
  lid: { box: [10 mm, 10 mm, 1 mm], medium: borosilicate-crown, against: cell.top, faces: { bottom: film, top: coat } }
pumps:
  beam: { patch: { disc: 1 mm }, power: 1 W, wavelength: 445 nm, toward: cell.front, distance: 40 mm }
exit: lid.top
`;

let cwd = '';
let file = '';
let printed = '';
beforeEach(async () => {
  cwd = await mkdtemp(join(tmpdir(), 'stokeswell-'));
  file = join(cwd, 'coats.yaml');
  await writeFile(file, DESIGN);
  printed = '';
  vi.stubEnv('LANG', 'C.UTF-8');
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    printed += String(text);
    return true;
  });
});
afterEach(async () => {
  vi.restoreAllMocks();
  vi.unstubAllEnvs();
  await rm(cwd, { recursive: true, force: true });
});

const options = (more: Partial<CoatingOptions> = {}): CoatingOptions => ({
  wavelengths: [400, 700],
  files: false,
  dial: {},
  ...more,
});

describe('coating', () => {
  test('takes the media of the first face with the finish', async () => {
    expect(await coatingCommand(file, 'film', options())).toBe(EXIT.ok);
    // Dry, wetted, and back: the liquid lies outside of the lid's bottom.
    expect(printed).toMatch(
      /air → borosilicate-crown.*\n[\s\S]*bath → borosilicate-crown.*\n[\s\S]*borosilicate-crown → bath.*nothing passes beyond/,
    );
  });

  test('a table, the pictures and a CSV whose numbers are the handbook ones', async () => {
    const out = join(cwd, 'out');
    await coatingCommand(file, 'coat', options({ between: ['air', 'borosilicate-crown'], out, files: true }));
    expect((await readdir(out)).sort()).toEqual(['coating.csv', 'curves.svg', 'map.svg', 'polarised.svg']);
    const rows = (await readFile(join(out, 'coating.csv'), 'utf8')).trim().split('\n');
    expect(rows[0]).toBe(
      'from,to,wavelength_nm,angle_deg,reflectance_s,reflectance_p,reflectance,transmittance_s,transmittance_p,transmittance,absorptance_s,absorptance_p,absorptance',
    );
    const row = rows.find((each) => each.startsWith('air,borosilicate-crown,550,0,'));
    // ((n₀nₛ − n₁²)/(n₀nₛ + n₁²))² with n₁ = 1.3785 (Dodge 1984) and nₛ = 1.5185 (data sheet of the crown) at 550 nm: Born & Wolf §1.6.4.
    const expected = ((1.5185 - 1.3785 ** 2) / (1.5185 + 1.3785 ** 2)) ** 2;
    expect(Number(row?.split(',')[6])).toBeCloseTo(expected, 4);
    for (const name of ['curves.svg', 'map.svg', 'polarised.svg']) {
      const text = await readFile(join(out, name), 'utf8');
      expect(text).toMatch(/^<\?xml/);
      // Stands alone: no style from a page, nothing fetched.
      expect(text).not.toMatch(/var\(|currentColor|href="http/);
    }
    await expect(coatingCommand(file, 'coat', options({ between: ['air', 'bath'], out, files: true }))).rejects.toThrow(
      /never overwritten/,
    );
  });

  test('s and p apart: at normal incidence alike, at 60° as a bare film of 1.378 has them', async () => {
    await coatingCommand(file, 'coat', options({ between: ['air', 'borosilicate-crown'] }));
    const block = printed.split('% transmitted of s / p light')[1].split('\n');
    const [s, p] =
      block
        .find((row) => /^ +0° /.test(row))
        ?.match(/(\d+\.\d) \/ (\d+\.\d)/)
        ?.slice(1) ?? [];
    expect(s).toBe(p);
    const [steepS, steepP] =
      block
        .find((row) => /^ +60° /.test(row))
        ?.match(/(\d+\.\d) \/ (\d+\.\d)/)
        ?.slice(1) ?? [];
    // Near the Brewster angles of film (54°) and glass (57°) p passes almost whole; s loses some 10 % and more (Born & Wolf §1.5.3).
    expect(Number(steepP)).toBeGreaterThan(99);
    expect(Number(steepS)).toBeLessThan(95);
  });

  test('finishes that are no stack have curves too', async () => {
    await coatingCommand(file, 'ideal', options({ between: ['air', 'bath'] }));
    expect(printed).toMatch(/0° {2}5\.0 \/ 95\.0 \/ 0\.0/);
    expect(printed).not.toContain('s / p light');
  });

  test.each<[string, Partial<CoatingOptions>, RegExp]>([
    ['caot', {}, /no finish called "caot".*Did you mean coat/],
    ['ideal', {}, /No face carries ideal.*--between/],
    ['coat', { between: ['air'] }, /takes two media/],
    ['coat', { between: ['air', 'ethanl'] }, /no medium called "ethanl".*Did you mean ethanol/],
    [
      'film',
      { wavelengths: [380, 700] },
      /coats\.yaml:6:\d+: tantalum-pentoxide-film has data from 400 to 700 nm only/,
    ],
  ])('%s %j is refused', async (name, more, message) => {
    const attempt = coatingCommand(file, name, options(more));
    await expect(attempt).rejects.toThrow(CommandFault);
    await expect(attempt).rejects.toThrow(message);
  });
});

test('two wavelengths', () => {
  expect(parseWavelengths('420 nm to 650 nm')).toEqual([420, 650]);
  expect(parseWavelengths('420-650nm')).toEqual([420, 650]);
  for (const wrong of ['420', '650 nm to 420 nm', '100 nm to 650 nm', '420 to 650']) {
    expect(() => parseWavelengths(wrong)).toThrow();
  }
});
