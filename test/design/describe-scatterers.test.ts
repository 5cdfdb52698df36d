import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import type { ScattererDescription } from '../../src/design/description.js';
import type { LocatedFault } from '../../src/design/fault.js';
import { readDesignText } from '../../src/design/read-design.js';
import { checkScene } from '../../src/scene/check-scene.js';

const design = (medium: string, more = '') => `design: turbid
dials: { loading: 1 % }
media:
  bath: ${medium}
${more}
parts:
  cell: { box: [10 mm, 10 mm, 10 mm], medium: bath${more.includes('sheet:') ? ', faces: { top: sheet }' : ''} }
pumps:
  one: { patch: { disc: 1 mm }, power: 1 W, wavelength: 450 nm, toward: cell.bottom, distance: 5 mm }
exit: cell.top
`;
const read = (medium: string, more = '', file = 'turbid.yaml') => readDesignText(design(medium, more), file);
const faults = (medium: string): readonly LocatedFault[] => {
  const reading = read(medium);
  return reading.ok ? reading.warnings.filter(({ found }) => found !== 'loading') : reading.faults;
};
function scatterers(medium: string): readonly ScattererDescription[] {
  const reading = read(medium);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.description.media.get('bath')?.scatterers ?? [];
}
function bead(fields: string, host = 'solvent: water'): Extract<ScattererDescription, { kind: 'beads' }> {
  const [one] = scatterers(`{ ${host}, scatterers: { ball: { beads: { ${fields} } } } }`);
  if (one.kind !== 'beads') throw new Error('no beads');
  return one;
}

describe('scatterers as written', () => {
  test('a coefficient and a mean cosine, plain or by wavelength, in a medium with dye', () => {
    const [plain, table] = scatterers(
      '{ solvent: ethanol, pH: 11, dyes: { fluorescein: 0.1 mmol/L }, scatterers: {' +
        ' haze: { henyey-greenstein: { coefficient: 3 /cm, anisotropy: 0.8 } },' +
        ' mist: { henyey-greenstein: { coefficient: [[400 nm, 1 /mm], [500 nm, 2 /mm]], anisotropy: -0.2 } } } }',
    );
    if (plain.kind !== 'henyey-greenstein' || table.kind !== 'henyey-greenstein') throw new Error('kinds');
    expect(plain.coefficient(450)).toBeCloseTo(0.3, 12);
    expect(plain.anisotropy(450)).toBe(0.8);
    expect(table.coefficient(450)).toBeCloseTo(1.5, 12);
    expect(table.coefficient(900)).toBe(2);
  });

  test('beads by radius or diameter, index or solid, and number, volume or mass', () => {
    const volume = (4 / 3) * Math.PI * 0.0005 ** 3;
    expect(bead('radius: 0.5 um, index: 1.59, number-density: 2e6 /mm³')).toMatchObject({ radius: 0.0005 });
    expect(bead('radius: 0.5 um, index: 1.59, number-density: 2e6 /mm³').volumeFraction).toBeCloseTo(2e6 * volume, 12);
    expect(bead('diameter: 1 um, solid: fused-silica, volume-fraction: loading').volumeFraction).toBe(0.01);
    // Malitson 1965, verified: 1.4585 at 589 nm.
    expect(bead('diameter: 1 um, solid: fused-silica, volume-fraction: 1 %').index(589)).toBeCloseTo(1.4585, 3);
    // 1 g of beads of 2 g/mL in 99 g of a host of 1 g/mL: 0.5 mL in 99.5 mL.
    const dense = bead('radius: 1 um, index: 1.5, k: 0.01, mass-fraction: 1 %, density: 2 g/mL, host-density: 1 g/mL');
    expect(dense.volumeFraction).toBeCloseTo(0.5 / 99.5, 12);
    expect(dense.extinction(500)).toBe(0.01);
    // The library knows the density of water, 0.997 g/mL.
    const wet = bead('radius: 1 um, index: 1.5, mass-fraction: 1 %, density: 2 g/mL');
    expect(wet.volumeFraction).toBeCloseTo(0.5 / (0.5 + 99 / 0.997), 5);
  });

  test.each([
    ['a mean cosine of 1', '{ henyey-greenstein: { coefficient: 1 /mm, anisotropy: 1 } }', 'range', 'below 1'],
    ['a negative coefficient', '{ henyey-greenstein: { coefficient: -1 /mm, anisotropy: 0 } }', 'range', 'at least 0'],
    ['beads of no radius', '{ beads: { radius: 0 um, index: 1.5, volume-fraction: 1 % } }', 'range', 'above 0'],
    ['beads that are lenses', '{ beads: { radius: 1 mm, index: 1.5, volume-fraction: 1 % } }', 'range', 'at most 0.05'],
    ['too many beads', '{ beads: { radius: 1 um, index: 1.5, volume-fraction: 90 % } }', 'range', '74 %'],
    ['mass without density', '{ beads: { radius: 1 um, index: 1.5, mass-fraction: 1 % } }', 'missing', 'density'],
    [
      'density without mass',
      '{ beads: { radius: 1 um, index: 1.5, volume-fraction: 1 %, density: 2 g/mL } }',
      'unknown-key',
      '',
    ],
    [
      'an unknown solid',
      '{ beads: { radius: 1 um, solid: fused-silicon, volume-fraction: 1 % } }',
      'unknown-name',
      'fused-silica',
    ],
    [
      'radius and diameter',
      '{ beads: { radius: 1 um, diameter: 1 um, index: 1.5, volume-fraction: 1 % } }',
      '',
      'radius, diameter',
    ],
    ['no kind', '{ }', 'missing', 'beads'],
    [
      'a falling table',
      '{ henyey-greenstein: { coefficient: [[500 nm, 1 /mm], [400 nm, 1 /mm]], anisotropy: 0 } }',
      'range',
      '',
    ],
  ])('%s is refused', (_, text, code, words) => {
    const found = faults(`{ index: 1.4, scatterers: { one: ${text} } }`);
    const fault = found.find((each) => each.severity === 'error');
    expect(fault).toBeDefined();
    if (code !== '') expect(fault?.code).toBe(code);
    expect(fault?.line).toBe(4);
    expect(JSON.stringify(fault)).toContain(words);
  });

  test('mass in a medium of unknown density asks for it', () => {
    const [fault] = faults(
      '{ solid: pmma, scatterers: { one: { beads: { radius: 1 um, index: 1.5, mass-fraction: 1 %, density: 2 g/mL } } } }',
    );
    expect(fault).toMatchObject({ code: 'missing', expected: expect.stringContaining('host-density') });
  });
});

describe('cautions about scatterers', () => {
  const cautions = (fields: string, host = 'index: 1.4') => {
    const reading = read(`{ ${host}, scatterers: { one: { ${fields} } } }`);
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    return checkScene(reading.description).faults.filter(({ path }) => path.includes('scatterers'));
  };

  test('a few clear beads need none', () => {
    expect(cautions('beads: { radius: 1 um, index: 1.5, volume-fraction: 1e-3 }')).toEqual([]);
  });

  test.each([
    ['close', 'beads: { radius: 1 um, index: 1.41, volume-fraction: 20 % }', 'close'],
    ['absorbing', 'beads: { radius: 1 um, index: 1.5, k: 0.1, volume-fraction: 1e-3 }', 'absorb'],
    ['invisible', 'beads: { radius: 1 um, index: 1.4, volume-fraction: 1e-3 }', 'do not scatter'],
    ['very turbid', 'henyey-greenstein: { coefficient: 100 /mm, anisotropy: 0.1 }', 'slow'],
  ])('%s', (_, fields, words) => {
    expect(cautions(fields)).toMatchObject([
      { code: 'caution', severity: 'warning', problem: expect.stringContaining(words) },
    ]);
  });

  test('the surroundings may not scatter', () => {
    const text = `${design('water')}surroundings: fog\n`.replace(
      'bath: water',
      'bath: water\n  fog: { index: 1, scatterers: { one: { henyey-greenstein: { coefficient: 1 /mm, anisotropy: 0 } } } }',
    );
    const reading = readDesignText(text, 'fog.yaml');
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    expect(checkScene(reading.description).faults).toContainEqual(
      expect.objectContaining({ code: 'geometry', severity: 'error', path: ['surroundings'] }),
    );
  });
});

describe('a table of scatter', () => {
  const folder = mkdtempSync(join(tmpdir(), 'scatter-'));
  afterAll(() => rmSync(folder, { recursive: true }));
  const bsdf = (csv: string) => {
    writeFileSync(join(folder, 'sheet.csv'), csv);
    return read('water', 'finishes:\n  sheet: { bsdf: sheet.csv }', join(folder, 'turbid.yaml'));
  };
  const rows = (
    f: (incidence: number, scatter: number) => string,
    heading = 'incidence_deg,scatter_deg,reflected_per_sr',
  ) =>
    `# invented\n${heading}\n${[0, 45, 90].flatMap((i) => [0, 45, 90].map((s) => `${i},${s},${f(i, s)}`)).join('\n')}\n`;

  test('is read on its grid, with what is left out as nothing', () => {
    const reading = bsdf(rows((_, s) => String(0.1 + s / 900)));
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    const finish = reading.description.finishes.get('sheet');
    if (finish?.kind !== 'bsdf') throw new Error('no table');
    expect(finish.scatterDeg).toEqual([0, 45, 90]);
    expect(finish.azimuthDeg).toEqual([0]);
    expect(finish.reflected[1]).toEqual([[0.1], [expect.closeTo(0.15, 12)], [0.2]]);
    expect(finish.transmitted.flat(2).every((value) => value === 0)).toBe(true);
    // 0.1 against 0.15 /sr between 0 and 45 degrees.
    expect(reading.warnings).toContainEqual(
      expect.objectContaining({ code: 'caution', found: expect.stringContaining('/sr') }),
    );
  });

  test.each([
    ['energy', rows(() => '0.4'), 'energy', '%'],
    ['a missing row', rows(() => '0.1').replace('45,45,0.1\n', ''), 'finish', '8 rows'],
    ['a row twice', `${rows(() => '0.1')}45,45,0.1\n`, 'finish', 'twice'],
    ['no value column', rows(() => '0.1', 'incidence_deg,scatter_deg,value'), 'finish', 'reflected_per_sr'],
    ['no angle column', rows(() => '0.1', 'incidence,scatter_deg,reflected_per_sr'), 'finish', 'incidence_deg'],
    ['text for a number', rows((i) => (i === 45 ? 'dark' : '0.1')), 'quantity', 'dark'],
    ['a negative value', rows((i) => (i === 45 ? '-1' : '0.1')), 'range', '-1'],
    ['an angle above 90', rows(() => '0.1').replace('90,90', '90,95'), 'range', '95'],
    ['no rows', 'incidence_deg,scatter_deg,reflected_per_sr\n', 'finish', 'no rows'],
  ])('%s is refused with file and line', (_, csv, code, words) => {
    const reading = bsdf(csv);
    expect(reading.ok).toBe(false);
    if (reading.ok) return;
    expect(reading.faults[0]).toMatchObject({ code, severity: 'error', file: expect.stringContaining('sheet.csv') });
    expect(JSON.stringify(reading.faults[0])).toContain(words);
  });
});
