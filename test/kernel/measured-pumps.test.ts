/** Pumps from measurement and of more than one bank: what is launched against what the tables and the design say. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { formatFault } from '../../src/design/format-fault.js';
import { readDesign } from '../../src/design/read-design.js';
import { batchStream } from '../../src/engine/trace-share.js';
import { launchPump } from '../../src/kernel/launch-pump.js';
import { NOW, RAY } from '../../src/kernel/photon.js';
import { nextUnit } from '../../src/numerics/random-stream.js';
import { SOBOL_DIMENSIONS, stepSobol } from '../../src/numerics/sobol.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'pumps-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const design = (pump: string) => `design: pumps
media: { bath: { index: 1 } }
parts: { cell: { box: [20 mm, 20 mm, 20 mm], medium: bath } }
pumps:
  bank: { power: 6 W, ${pump} }
exit: cell.top
`;

async function read(pump: string, tables: Readonly<Record<string, string>> = {}) {
  for (const [name, text] of Object.entries(tables)) writeFileSync(join(folder, name), text);
  const file = join(folder, 'design.yaml');
  writeFileSync(file, design(pump));
  return readDesign(file);
}

async function faultsOf(pump: string, tables: Readonly<Record<string, string>> = {}): Promise<string> {
  const reading = await read(pump, tables);
  return reading.ok ? 'no faults' : reading.faults.map((fault) => formatFault(fault)).join('\n');
}

interface Launch {
  readonly at: readonly number[];
  readonly along: readonly number[];
  readonly nm: number;
}

async function launches(pump: string, tables: Readonly<Record<string, string>> = {}, count = 8192): Promise<Launch[]> {
  const reading = await read(pump, tables);
  if (!reading.ok) throw new Error(reading.faults.map((fault) => formatFault(fault)).join('\n'));
  const { scene } = compileScene(reading.description);
  const graph = new RegionGraph(scene);
  const random = batchStream('launch', 0);
  const points = Int32Array.from({ length: SOBOL_DIMENSIONS }, () => (nextUnit(random) * 2 ** 32) | 0);
  const start = new Int32Array(scene.pumpCount).fill(-1);
  const ray = new Float64Array(RAY.COUNT);
  const now = new Int32Array(NOW.COUNT);
  return Array.from({ length: count }, (_, i) => {
    launchPump(scene, graph, points, start, ray, now);
    stepSobol(points, i);
    return { at: [...ray.subarray(0, 3)], along: [...ray.subarray(3, 6)], nm: scene.wavelengthNm[now[NOW.wavelength]] };
  });
}

const mean = (values: readonly number[]) => values.reduce((a, b) => a + b, 0) / values.length;
const spread = (values: readonly number[]) => Math.sqrt(mean(values.map((v) => (v - mean(values)) ** 2)));
const distinct = (values: readonly number[]) =>
  [...new Set(values.map((v) => Math.round(v * 1e6) / 1e6))].sort((a, b) => a - b);

const place = (at: readonly number[]) => `${at[0].toFixed(4)} ${at[2].toFixed(4)}`;
const near = (found: readonly number[], wanted: readonly number[]) => {
  for (const [axis, value] of wanted.entries()) expect(found[axis]).toBeCloseTo(value, 9);
};

const AIM = 'at: [0 mm, -30 mm, 0 mm], direction: [0, 1, 0]';

describe('banks', () => {
  test('a ring turns the pump about its axis and shares the power', async () => {
    const reading = await read(
      'diodes: { across: 1, along: 1, pitch: [1 mm, 1 mm] }, divergence: 0 deg, wavelength: 450 nm, toward: cell.front, distance: 5 mm, ring: { count: 4 }',
    );
    if (!reading.ok) throw new Error('faults');
    expect(reading.description.pumps.map(({ name, power }) => [name, power])).toEqual([
      ['bank 1', 1.5],
      ['bank 2', 1.5],
      ['bank 3', 1.5],
      ['bank 4', 1.5],
    ]);
    const { scene } = compileScene(reading.description);
    const origins = [0, 1, 2, 3].map((pump) => [...scene.pumps.subarray(pump * 28, pump * 28 + 3)]);
    const expected = [
      [0, -15, 0],
      [15, 0, 0],
      [0, 15, 0],
      [-15, 0, 0],
    ];
    for (const [i, origin] of origins.entries()) near(origin, expected[i]);
  });

  test('a stack folds its rows together, each further back', async () => {
    const all = await launches(
      `diodes: { across: 2, along: 1, pitch: [3 mm, 1 mm], stack: { rows: 3, pitch: 0.5 mm, step: 4 mm } }, divergence: 0 deg, wavelength: 450 nm, ${AIM}`,
    );
    // u = z × y = −x, v = z for a pump that looks along y.
    expect(distinct(all.map(({ at }) => at[0]))).toEqual([-1.5, 1.5]);
    expect(distinct(all.map(({ at }) => Math.abs(at[2])))).toEqual([0, 0.5]);
    expect(distinct(all.map(({ at }) => at[1]))).toEqual([-38, -34, -30]);
    for (const { at } of all)
      expect(Math.abs(Math.abs(at[2]) - Math.abs((-30 - at[1]) / 4 - 1) * 0.5)).toBeLessThan(1e-9);
  });

  test('pointing errors are one for each emitter, of the stated spread, and change with the seed', async () => {
    const bank = (seed: string) =>
      `diodes: { across: 40, along: 50, pitch: [0.1 mm, 0.1 mm], pointing: { spread: 1 deg, seed: ${seed} } }, divergence: 0 deg, wavelength: 450 nm, ${AIM}`;
    const all = await launches(bank('a'), {}, 16384);
    const byEmitter = new Map(all.map(({ at, along }) => [place(at), along]));
    const slopes = [...byEmitter.values()].map(([x, y]) => Math.atan2(x, y));
    expect(byEmitter.size).toBeGreaterThan(1900);
    // 2000 normal draws: the spread is known to 1/√4000, four standard errors 6.4 %.
    expect(Math.abs(spread(slopes) / (Math.PI / 180) - 1)).toBeLessThan(0.064);
    for (const { at, along } of all) expect(byEmitter.get(place(at))).toEqual(along);
    const other = await launches(bank('b'), {}, 1);
    expect(other[0].along).not.toEqual(all[0].along);
  });
});

describe('measured far field', () => {
  test('a triangle and a box come out with their second moments, 1/√6 and 1/√3 of the half width', async () => {
    const all = await launches(`patch: { disc: 1 mm }, far-field: far.csv, wavelength: 450 nm, ${AIM}`, {
      'far.csv': '# made up\nangle_deg,fast,slow\n-10,0,0\n0,2,0\n0.001,2,1\n5,1,1\n5.001,1,0\n10,0,0\n',
    });
    const fast = all.map(({ along }) => Math.atan2(along[2], along[1]) * (180 / Math.PI));
    const slow = all.map(({ along }) => Math.atan2(-along[0], along[1]) * (180 / Math.PI));
    // Sobol points: far closer than the 4/√n of independent draws.
    expect(Math.abs(spread(fast) - 10 / Math.sqrt(6))).toBeLessThan(0.02);
    expect(Math.abs(mean(slow) - 2.5)).toBeLessThan(0.02);
    expect(Math.abs(spread(slow) - 5 / Math.sqrt(12))).toBeLessThan(0.02);
    expect(Math.min(...slow)).toBeGreaterThan(-0.01);
  });

  test('tables without sense are refused with line and column', async () => {
    const pump = `patch: { disc: 1 mm }, far-field: far.csv, wavelength: 450 nm, ${AIM}`;
    const found = (text: string) => faultsOf(pump, { 'far.csv': text });
    expect(await found('angle_deg,fast\n0,1\n')).toMatch(/far\.csv:1:1.*lacks slow/);
    expect(await found('angle_deg,fast,slow\n0,1,1\n1,x,1\n')).toMatch(/far\.csv:3:3.*fast is not a number/);
    expect(await found('angle_deg,fast,slow\n0,1,1\n1,-1,1\n')).toMatch(/far\.csv:3:3.*out of range/);
    expect(await found('angle_deg,fast,slow\n0,1,1\n0,1,1\n')).toMatch(/far\.csv:3:1.*must rise/);
    expect(await found('angle_deg,fast,slow\n0,0,1\n1,0,1\n')).toMatch(/fast is 0 everywhere/);
    expect(await found('')).toMatch(/no rows/);
    expect(await faultsOf(pump.replace('far.csv', '../up.csv'))).toMatch(/leaves the folder/);
    expect(await faultsOf(pump.replace('far.csv', 'absent.csv'))).toMatch(/no such file/);
    expect(
      await faultsOf(pump.replace('patch:', 'divergence: 2 deg, patch:'), {
        'far.csv': 'angle_deg,fast,slow\n0,1,1\n1,1,1\n',
      }),
    ).toMatch(/without `divergence`/);
  });
});

describe('rays', () => {
  const RAYS = `u_mm,v_mm,w_mm,direction_u,direction_v,direction_w,watts,wavelength_nm
1,2,0,0,0,2,1,400
-1,0,3,1,0,1,1,500
0,0,0,0,0,1,0,450
`;
  test('start where the table says, in the axes of the pump, as often as they have photons', async () => {
    const all = await launches(`rays: rays.csv, ${AIM}`, { 'rays.csv': RAYS });
    const blue = all.filter(({ nm }) => nm === 400);
    expect(new Set(all.map(({ nm }) => nm))).toEqual(new Set([400, 500]));
    // Photons of equal watts go as the wavelength: 4 : 5.
    expect(blue.length / all.length).toBeCloseTo(4 / 9, 3);
    for (const { at, along, nm } of all) {
      near(at, nm === 400 ? [-1, -30, 2] : [1, -27, 0]);
      near(along, nm === 400 ? [0, 1, 0] : [-Math.SQRT1_2, Math.SQRT1_2, 0]);
    }
  });

  test('need a colour, once', async () => {
    const plain = RAYS.replaceAll(/,(wavelength_nm|400|500|450)$/gm, '');
    expect(await faultsOf(`rays: rays.csv, ${AIM}`, { 'rays.csv': plain })).toMatch(/no wavelength/);
    expect(await faultsOf(`rays: rays.csv, wavelength: 450 nm, ${AIM}`, { 'rays.csv': RAYS })).toMatch(/twice/);
    const all = await launches(`rays: rays.csv, wavelength: 450 nm, ${AIM}`, { 'rays.csv': plain }, 64);
    expect(all.every(({ nm }) => nm === 450)).toBe(true);
    expect(await faultsOf(`rays: rays.csv, ${AIM}`, { 'rays.csv': RAYS.replace('0,0,2', '0,0,0') })).toMatch(
      /rays\.csv:2:1.*looks nowhere/,
    );
  });
});

describe('measured spectrum', () => {
  test('watts are turned into photons', async () => {
    const pump = `patch: { disc: 1 mm }, spectrum: lamp.csv, ${AIM}`;
    const nm = async (text: string) => (await launches(pump, { 'lamp.csv': text }, 16384)).map((launch) => launch.nm);
    const photons = await nm('wavelength_nm,photons_per_nm\n440,1\n460,1\n');
    expect(mean(photons)).toBeCloseTo(450, 1);
    expect(spread(photons)).toBeCloseTo(20 / Math.sqrt(12), 0);
    // ∫λ²dλ/∫λdλ over 400–500 nm.
    const watts = await nm('wavelength_nm,watts_per_nm\n400,1\n500,1\n');
    expect(mean(watts)).toBeCloseTo((500 ** 3 - 400 ** 3) / 3 / ((500 ** 2 - 400 ** 2) / 2), 0);
    expect(await faultsOf(pump, { 'lamp.csv': 'wavelength_nm,counts\n400,1\n' })).toMatch(
      /what the spectrum counts|too short/,
    );
    expect(
      await faultsOf(pump, { 'lamp.csv': 'wavelength_nm,watts_per_nm,photons_per_nm\n400,1,1\n410,1,1\n' }),
    ).toMatch(/both/);
    expect(
      await faultsOf(pump.replace('spectrum', 'wavelength: 450 nm, spectrum'), {
        'lamp.csv': 'wavelength_nm,watts_per_nm\n400,1\n500,1\n',
      }),
    ).toMatch(/twice/);
  });
});
