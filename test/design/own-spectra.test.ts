import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { readDesignText } from '../../src/design/read-design.js';
import { readDye } from '../../src/materials/library.js';
import { numberIn, readTable } from '../../src/materials/read-table.js';

/** Spectra of rhodamine 6G as its library file holds them, with the instrument's baseline still in (published traces; verified). */
const rows = readTable('dyes/rhodamine_6g_ethanol.csv').rows.filter((row) => row.epsilon_raw_L_per_mol_cm !== '');
const column = (name: string) => rows.map((row) => numberIn(row, name));
const nm = column('wavelength_nm');
const raw = column('epsilon_raw_L_per_mol_cm');
const emission = column('emission_photons_per_nm_rel');
const library = readDye('rhodamine-6g', 'ethanol');

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'spectra-'));
  const csv = (heading: string, xs: readonly number[], ys: readonly number[]) =>
    `# looms\n${heading}\n${xs.map((x, i) => `${x},${ys[i]}`).join('\n')}\n`;
  const files: Record<string, string> = {
    'raw.csv': csv('wavelength_nm,extinction_L_per_mol_cm', nm, raw),
    // 5 µmol/L in 4 mm: A = ε c l.
    'absorbance.csv': csv(
      'wavelength_nm,absorbance',
      nm,
      raw.map((e) => e * 5e-6 * 0.4),
    ),
    'transmittance.csv': csv(
      'wavenumber_per_cm,transmittance',
      nm.map((x) => 1e7 / x),
      raw.map((e) => 10 ** (-e * 5e-6 * 0.4)),
    ),
    'light.csv': csv('wavelength_nm,photons_per_nm', nm, emission),
    'energy.csv': csv(
      'wavelength_nm,energy_per_nm',
      nm,
      emission.map((y, i) => y / nm[i]),
    ),
    'wavenumber.csv': csv(
      'wavenumber_per_cm,photons_per_wavenumber',
      nm.map((x) => 1e7 / x),
      emission.map((y, i) => y * nm[i] ** 2),
    ),
    'joule.csv': csv(
      'wavenumber_per_cm,energy_per_wavenumber',
      nm.map((x) => 1e7 / x),
      emission.map((y, i) => y * nm[i]),
    ),
    'unstated.csv': csv('wavelength_nm,intensity', nm, emission),
    'bare.csv': csv('wavelength_nm,counts', nm, emission),
    'negative.csv': csv(
      'wavelength_nm,extinction_L_per_mol_cm',
      nm,
      raw.map((e, i) => (i === 40 ? -3000 : e)),
    ),
    'noisy.csv': csv(
      'wavelength_nm,extinction_L_per_mol_cm',
      nm,
      column('epsilon_L_per_mol_cm').map((e, i) => e + 150 * Math.sin(7 * i * i)),
    ),
    'whole.jdx': jcamp(raw.map((e) => Math.round(e * 2e-6 * 1e6))),
    'half.jdx': jcamp(raw.map((e) => Math.round(e * 2e-6 * 1e6))).slice(0, 900),
    'light.jdx': jcamp(emission.map((y) => Math.round(1e5 * y))).replace('ABSORBANCE', 'ARBITRARY UNITS'),
  };
  for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, name), text);
});
afterAll(() => rmSync(folder, { recursive: true }));

function jcamp(values: readonly number[]): string {
  const data = nm.map((x, i) => `${x} ${values[i]}`).join('\n');
  return `##TITLE=looms\n##JCAMP-DX=4.24\n##DATA TYPE=UV/VIS SPECTRUM\n##XUNITS=NANOMETERS\n##YUNITS=ABSORBANCE\n##XFACTOR=1\n##YFACTOR=1e-6\n##FIRSTX=${nm[0]}\n##LASTX=${nm[nm.length - 1]}\n##NPOINTS=${nm.length}\n##XYDATA=(X++(Y..Y))\n${data}\n##END=\n`;
}

const design = (extinction: string, light: string, more = '') => `design: T
dyes:
  mine: { extinction: ${extinction}, emission: ${light}, yield: 0.95${more} }
media: { bath: { solvent: ethanol, dyes: { mine: 0.1 mmol/L } } }
parts: { cell: { box: [10 mm, 10 mm, 10 mm], medium: bath } }
pumps: { p: { patch: { disc: 1 mm }, power: 1 W, wavelength: 445 nm, divergence: 1 deg, toward: cell.left, distance: 5 mm } }
exit: cell.top
`;
const RAW = '{ file: raw.csv, baseline: subtract }';
const LIGHT = '{ file: light.csv }';

function read(text: string) {
  const reading = readDesignText(text, join(folder, 'design.yaml'));
  if (!reading.ok) throw new Error(reading.faults.map(({ problem }) => problem).join('; '));
  const medium = reading.description.media.get('bath');
  const dye = medium?.dyes[0];
  if (dye === undefined) throw new Error('no dye');
  // Back to L/(mol cm).
  const extinction = (x: number) => (dye.absorption(x) * 10) / Math.LN10 / 1e-4;
  return { ...reading, dye, medium, extinction };
}
const faults = (text: string) => {
  const reading = readDesignText(text, join(folder, 'design.yaml'));
  if (reading.ok) throw new Error('no fault');
  return reading.faults.filter(({ severity }) => severity === 'error');
};

describe('absorption', () => {
  test.each([
    ['extinction', '{ file: raw.csv, baseline: keep }'],
    ['absorbance', '{ file: absorbance.csv, concentration: 5 µmol/L, cuvette: 4 mm, baseline: keep }'],
    [
      'transmittance by wavenumber',
      '{ file: transmittance.csv, concentration: 5 µmol/L, cuvette: 4 mm, baseline: keep }',
    ],
    ['JCAMP-DX', '{ file: whole.jdx, concentration: 2 µmol/L, cuvette: 10 mm, baseline: keep }'],
  ])('as %s is the same dye', (_, entry) => {
    const { extinction, warnings } = read(design(entry, LIGHT));
    expect(warnings).toEqual([]);
    for (const [i, x] of nm.entries()) expect(Math.abs(extinction(x) - Math.max(0, raw[i]))).toBeLessThan(1);
  });

  // The head of the library's file says: red end is instrument baseline, about 79 L/(mol cm).
  test('the baseline is found and told, where nobody asked', () => {
    const { warnings } = read(design('{ file: raw.csv }', LIGHT));
    expect(warnings).toHaveLength(1);
    expect(warnings[0].problem).toContain('instrument baseline');
    expect(Number.parseFloat(warnings[0].found ?? '')).toBeGreaterThan(79 * 0.9);
    expect(Number.parseFloat(warnings[0].found ?? '')).toBeLessThan(79 * 1.1);
  });

  // The library's own cleaned column was made by another hand and another tail.
  test('taken off, what is left is the cleaned spectrum', () => {
    const { extinction, medium, warnings } = read(design(RAW, LIGHT));
    expect(warnings).toEqual([]);
    expect(medium?.notes?.join()).toContain('baseline');
    for (const x of [445, 500, 530, 550, 560])
      expect(Math.abs(extinction(x) / library.extinction(x) - 1)).toBeLessThan(0.03);
    expect(extinction(650)).toBeLessThan(0.1);
  });

  test('noise about zero is let be, more is refused with its line', () => {
    expect(read(design('{ file: noisy.csv }', LIGHT)).extinction(530)).toBeGreaterThan(1e5);
    expect(faults(design('{ file: negative.csv }', LIGHT))).toMatchObject([
      { file: join(folder, 'negative.csv'), line: 43, problem: expect.stringContaining('below zero') },
    ]);
  });

  test('absorbance without concentration and path is refused', () => {
    expect(faults(design('{ file: absorbance.csv }', LIGHT)).map(({ found }) => found)).toEqual([
      'no concentration',
      'no cuvette',
    ]);
  });

  test('a JCAMP-DX file cut in half is refused', () => {
    const [fault] = faults(design('{ file: half.jdx, concentration: 2 µmol/L, cuvette: 10 mm }', LIGHT));
    expect(fault).toMatchObject({ problem: expect.stringContaining('cut off') });
    expect(fault.line).toBeGreaterThan(12);
  });
});

describe('emission', () => {
  test.each([
    ['photons per nm', LIGHT],
    ['energy per nm', '{ file: energy.csv }'],
    ['photons per wavenumber', '{ file: wavenumber.csv }'],
    ['energy per wavenumber', '{ file: joule.csv }'],
    ['said in the design', '{ file: unstated.csv, values: photons-per-nm }'],
    ['JCAMP-DX', '{ file: light.jdx, values: photons-per-nm }'],
  ])('as %s is the same light', (_, entry) => {
    const { dye } = read(design(RAW, entry));
    if (dye.emission.kind !== 'spectrum') throw new Error('no spectrum');
    const { photonsPerNm } = dye.emission;
    for (const x of [530, 552, 580, 620, 660]) {
      expect(photonsPerNm(x) / photonsPerNm(552)).toBeCloseTo(
        library.emission.photonsPerNm(x) / library.emission.photonsPerNm(552),
        3,
      );
    }
  });

  test.each([
    ['a heading that does not say', '{ file: unstated.csv }'],
    ['arbitrary units', '{ file: light.jdx }'],
  ])('%s is refused', (_, entry) => {
    expect(faults(design(RAW, entry))).toMatchObject([
      { code: 'quantity', problem: expect.stringContaining('photons or energy') },
    ]);
  });

  test('a column without a known name is refused in its line, a contradiction too', () => {
    expect(faults(design(RAW, '{ file: bare.csv }'))).toMatchObject([
      { line: 2, expected: expect.stringContaining('photons_per_nm') },
    ]);
    expect(faults(design(RAW, '{ file: light.csv, values: energy-per-nm }'))[0].problem).toContain('different things');
    expect(faults(design('{ file: light.csv }', LIGHT))[0].problem).toContain('not an absorption');
  });
});

describe('sense', () => {
  // Strickler and Berg: about 3.8 ns for rhodamine 6G in ethanol (lifetime 3.8 to 4.0 ns; memory, high).
  test('a lifetime that fits is taken, one ten times as long is warned of', () => {
    expect(read(design(RAW, LIGHT, ', lifetime: 3.9 ns')).warnings).toEqual([]);
    const { warnings } = read(design(RAW, LIGHT, ', lifetime: 39 ns'));
    expect(warnings).toMatchObject([
      { problem: expect.stringContaining('do not fit'), expected: expect.stringMatching(/3\.[78] ns/) },
    ]);
  });

  test('emission to the blue of the absorption is warned of, a yield above 1 refused', () => {
    const blue = '[[400 nm, 0], [420 nm, 1], [440 nm, 0]]';
    expect(read(design(RAW, blue)).warnings[0].problem).toContain('bluer');
    expect(faults(design(RAW, LIGHT).replace('0.95', '1.05'))[0]).toMatchObject({ code: 'range', found: '1.05' });
  });
});
