/** Stacks of thin films in a design: what is read, and every fault with its place. */
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import type { FinishDescription } from '../../src/design/description.js';
import type { FaultCode } from '../../src/design/fault.js';
import { locateFaults, readDesignText } from '../../src/design/read-design.js';
import { readLayerMaterial } from '../../src/materials/library.js';
import { checkScene } from '../../src/scene/check-scene.js';

const folder = mkdtempSync(join(tmpdir(), 'stacks-'));
const file = join(folder, 'cell.yaml');

const design = (stack: string, more = '', wavelength = '450 nm') => `design: stack
dials: { size: 10 mm }
media: { bath: { index: 1.36, dyes: { ink: 1 } } }
dyes: { ink: { absorption: 0.3 /mm, emission: 520 nm, yield: 50 % } }
${more}finishes:
  films:
    stack: ${stack}
parts: { cell: { box: [size, 8 mm, 8 mm], medium: bath, faces: { front: films } } }
pumps: { bank: { patch: { disc: 1 mm }, power: 1 W, wavelength: ${wavelength}, toward: cell.front, distance: 5 mm } }
exit: cell.top
`;

function read(stack: string, more?: string, wavelength?: string) {
  const text = design(stack, more, wavelength);
  const reading = readDesignText(text, file);
  return { text, reading, faults: reading.ok ? reading.warnings : reading.faults };
}

function stackOf(stack: string, more?: string): Extract<FinishDescription, { kind: 'stack' }> {
  const { reading } = read(stack, more);
  if (!reading.ok) throw new Error(reading.faults.map(({ problem, found }) => `${problem}: ${found}`).join('; '));
  const finish = reading.description.finishes.get('films');
  if (finish?.kind !== 'stack') throw new Error('no stack');
  return finish;
}

describe('what is read', () => {
  test('layers outermost first, groups unfolded, all scaled', () => {
    const { layers, extrapolates } = stackOf(`
      scale: 1.1
      design-wavelength: 550 nm
      layers:
        - { material: silicon-dioxide-film, thickness: 40 nm }
        - repeat: 2
          layers:
            - { material: titanium-dioxide-film-ald, quarter-waves: 1 }
            - { repeat: 3, layers: [{ material: magnesium-fluoride, half-waves: 1, at: 500 nm }] }
        - { material: silver, thickness: 0.05 um }`);
    const short = layers.map(({ material }) => material[0]).join('');
    expect(short).toBe('stmmmtmmms');
    expect(extrapolates).toBe(false);
    const titania = readLayerMaterial('titanium-dioxide-film-ald');
    const fluoride = readLayerMaterial('magnesium-fluoride');
    const expected = [44, (1.1 * 550) / 4 / titania.n(550), (1.1 * 500) / 2 / fluoride.n(500), 55];
    for (const [i, at] of [0, 1, 2, 9].entries()) expect(layers[at].thicknessNm).toBeCloseTo(expected[i], 9);
  });

  test('materials of the design: constant, rows, and a table beside it', () => {
    writeFileSync(join(folder, 'own.csv'), '# measured\nn,wavelength_nm,k\n2.0,400,0.02\n1.9,800,0\n');
    const { layers } = stackOf(
      'layers: [{ material: plain, quarter-waves: 1, at: 500 nm }, { material: rows, thickness: 9 nm }, { material: own, thickness: size / 1e6 }]'
        .replace(/^/, '{ ')
        .replace(/$/, ' }'),
      `layer-materials:
  plain: { n: 2.5, k: 0.01 }
  rows: { n: [[400 nm, 1.5], [600 nm, 1.4]], k: [[450 nm, 0], [700 nm, 0.1]] }
  own: { table: own.csv }
`,
    );
    expect(layers.map(({ thicknessNm }) => thicknessNm)).toEqual([50, 9, expect.closeTo(10, 9)]);
    expect([layers[0].n(500), layers[0].k(500), layers[0].rangeNm]).toEqual([2.5, 0.01, null]);
    expect([layers[1].n(500), layers[1].rangeNm]).toEqual([1.45, [450, 600]]);
    expect([layers[2].n(600), layers[2].k(600), layers[2].rangeNm]).toEqual([1.95, 0.01, [400, 800]]);
  });
});

const layer = (more: string) => `{ layers: [{ material: silver${more} }] }`;

test.each<[string, FaultCode, string, RegExp]>([
  [layer(', thickness: -5 nm'), 'range', '-5 nm', /too small/],
  [layer(', thickness: 5'), 'quantity', '5 }', /no unit/],
  [layer(', thickness: 30 um'), 'range', '30 um', /too large/],
  [layer(''), 'missing', '{ material', /no thickness/],
  [layer(', thickness: 5 nm, half-waves: 1, at: 500 nm'), 'type', '{ material', /more than one/],
  [layer(', quarter-waves: 1'), 'missing', '{ material', /need a wavelength/],
  [layer(', thickness: 5 nm, at: 500 nm'), 'unknown-key', '500 nm }', /belongs to quarter-waves/],
  [layer(', thickness: 5 nm, repeat: 2'), 'unknown-key', '2 }', /belongs to a group/],
  ['{ layers: [{ material: silwer, thickness: 5 nm }] }', 'unknown-name', 'silwer', /no layer material/],
  ['{ layers: [] }', 'type', 'layers: []', /wrong length/],
  ['{ layers: [{ repeat: 0, layers: [{ material: gold, thickness: 1 nm }] }] }', 'range', '0, layers', /count/],
  ['{ layers: [{ repeat: 2 }] }', 'missing', '{ repeat', /required field/],
  [
    '{ layers: [{ repeat: 500, layers: [{ material: gold, thickness: 1 nm }, { material: silver, thickness: 1 nm }] }] }',
    'range',
    'layers: [{ repeat',
    /too many layers/,
  ],
  ['{ scale: 0, layers: [{ material: gold, thickness: 1 nm }] }', 'range', '0, layers', /too small/],
  ['{ extrapolate: maybe, layers: [{ material: gold, thickness: 1 nm }] }', 'unknown-name', 'maybe', /not known/],
  ['{ design-wavelength: 550 nm }', 'missing', 'stack: {', /required field/],
])('%s: %s', (stack, code, where, problem) => {
  const { text, reading, faults } = read(stack);
  expect(reading.ok).toBe(false);
  const found = faults.find((fault) => problem.test(fault.problem));
  expect(found, JSON.stringify(faults)).toMatchObject({ code, severity: 'error' });
  const before = text.slice(0, text.indexOf(where)).split('\n');
  expect([found?.line, found?.column]).toEqual([before.length, before[before.length - 1].length + 1]);
});

test.each([
  ['wavelength_nm,n\n400,1\n', 1, /lacks k/],
  ['wavelength_nm,n,k\n400,1,0\n400,1,0\n', 3, /must rise/],
  ['wavelength_nm,n,k\n400,1,-2\n', 2, /k is out of range/],
  ['wavelength_nm,n,k\n', 1, /no rows/],
])('a table of n and k that is wrong: %j', (text, line, problem) => {
  writeFileSync(join(folder, 'bad.csv'), text);
  const { faults } = read(
    '{ layers: [{ material: own, thickness: 1 nm }] }',
    'layer-materials: { own: { table: bad.csv } }\n',
  );
  const found = faults.find((fault) => problem.test(fault.problem));
  expect(found, JSON.stringify(faults)).toMatchObject({ line, file: join(folder, 'bad.csv') });
});

test('a layer material that nothing uses is told', () => {
  const { faults } = read(layer(', thickness: 5 nm'), 'layer-materials: { own: { n: 2 } }\n');
  expect(faults).toMatchObject([{ code: 'caution', found: 'own', problem: 'no layer is made of this material' }]);
});

describe('light outside the data of a material', () => {
  const check = (stack: string, wavelength: string) => {
    const { reading } = read(stack, '', wavelength);
    if (!reading.ok) throw new Error('faulty');
    return locateFaults(reading, checkScene(reading.description).faults).filter(({ path }) => path[0] === 'finishes');
  };
  test('is refused', () => {
    expect(check(layer(', thickness: 5 nm'), '390 nm')).toMatchObject([
      {
        code: 'range',
        severity: 'error',
        line: 7,
        found: expect.stringMatching(/silver, data from 400 to 700 nm.*390/),
      },
    ]);
    expect(check(layer(', thickness: 5 nm'), '450 nm')).toEqual([]);
  });
  test('or extrapolated where the design asks for it, and told', () => {
    const stack = '{ extrapolate: yes, layers: [{ material: silver, thickness: 5 nm }] }';
    expect(check(stack, '390 nm')).toMatchObject([{ code: 'caution', severity: 'warning' }]);
  });
});
