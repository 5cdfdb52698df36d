/** What the kernel reads from the tables of a stack against the stack worked out directly, at random wavelengths and angles. */
import { expect, test } from 'vitest';
import type { LayerDescription } from '../../src/design/description.js';
import { SHARES } from '../../src/kernel/shares.js';
import { splitLight } from '../../src/kernel/split-light.js';
import { stackResponse } from '../../src/optics/thin-film-stack.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { beam, describeDesign, finish, flat, medium, part, plainDye } from '../helpers/describe.js';

const layer = (n: number, thicknessNm: number, k = 0): LayerDescription => ({
  material: 'own',
  n: flat(n),
  k: flat(k),
  rangeNm: null,
  thicknessNm,
  path: [],
});

/** `count` layers for 575 nm, each off by up to a tenth: narrow resonances inside the band. */
const uneven = (count: number, k = 0) =>
  Array.from({ length: count }, (_, i) => {
    const n = i % 2 ? 1.48 : 2.42;
    return layer(n, (575 / 4 / n) * (1 + 0.1 * Math.sin(7 * i)), k);
  });

/** A scene whose part in medium `inside` carries the stack on its top, and the interface there both ways. */
function interfaces(layers: readonly LayerDescription[], outside: number, inside: number) {
  const description = describeDesign({
    media: [medium('outer', outside), medium('inner', inside, { dyes: [plainDye(0.1, 0.9, 700)] })],
    surroundings: 'outer',
    finishes: [finish('films', { kind: 'stack', layers, extrapolates: false })],
    parts: [part('block', { kind: 'box', size: [4, 4, 4] }, 'inner', { faces: { top: 'films' } })],
    pumps: [beam([0, 0, 9], [0, 0, -1], { wavelengthNm: 440 })],
    exit: 'block.bottom',
  });
  const { scene, legend } = compileScene(description);
  const graph = new RegionGraph(scene);
  const within = graph.locate(0, 0, 1, 0, 0, 1);
  const outward = graph.resolve(within, 5);
  const inward = graph.resolve(graph.neighbour[within * graph.ways + 5], 4);
  return { scene, graph, legend, outward, inward };
}

/** Random numbers from a fixed seed (Park & Miller 1988). */
function numbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

test.each([
  ['21 layers between air and liquid', uneven(21), 1, 1.3614],
  ['40 layers between liquid and glass', uneven(40), 1.3614, 1.52],
  ['21 absorbing layers between air and liquid', uneven(21, 0.002), 1, 1.3614],
  ['12 layers between media almost alike', uneven(12), 1.3614, 1.361],
  ['12 layers between media alike', uneven(12), 1.3614, 1.3614],
  ['50 nm of silver-like metal between air and glass', [layer(0.05, 50, 3.3)], 1, 1.52],
  ['metal under glass-like layers', [layer(1.46, 90), layer(2.4, 60), layer(0.8, 200, 6)], 1, 1.3614],
  ['no thickness at all', [layer(2, 0)], 1, 1.52],
])('%s: within 1e-3 everywhere, seed 11', (_, layers, outside, inside) => {
  const { scene, graph, legend, outward, inward } = interfaces(layers, outside, inside);
  const random = numbers(11);
  const shares = new Float64Array(SHARES.COUNT);
  const absorbing = layers.some(({ k }) => k(500) > 0);
  let worst = 0;
  for (let i = 0; i < 4000; i++) {
    const wavelength = Math.floor(random() * scene.wavelengths);
    // As many near grazing and near the critical angle as elsewhere.
    const critical = Math.sqrt(Math.max(0, 1 - (Math.min(outside, inside) / Math.max(outside, inside)) ** 2));
    const u = random();
    const cosine = [u, u ** 4, critical + 0.02 * (u - 0.5)][i % 3];
    if (!(cosine > 0)) continue;
    const out = i % 2 === 0;
    const [n1, n2] = out ? [inside, outside] : [outside, inside];
    shares[SHARES.index] = n1;
    shares[SHARES.cosine] = cosine;
    splitLight(scene, graph.interfaces, out ? outward : inward, wavelength, shares);
    const nm = legend.grid.nm[wavelength];
    const met = layers.map(({ n, k, thicknessNm }) => ({ n: n(nm), k: k(nm), thicknessNm }));
    const { s, p } = stackResponse(out ? met.toReversed() : met, n1, n2, cosine, nm);
    const reflected = (s.reflectance + p.reflectance) / 2;
    const transmitted = (s.transmittance + p.transmittance) / 2;
    worst = Math.max(
      worst,
      Math.abs(shares[SHARES.reflected] - reflected),
      Math.abs(shares[SHARES.transmitted] - transmitted),
    );
    // Nothing is lost in a table: shares of what absorbs nothing add up to the last bit a random number has.
    const sum = shares[SHARES.reflected] + shares[SHARES.transmitted];
    if (!absorbing) expect(Math.abs(sum - 1)).toBeLessThan(2 ** -33);
    expect(shares[SHARES.reflected]).toBeGreaterThanOrEqual(0);
    if (n1 * Math.sqrt(1 - cosine * cosine) > n2 * (1 + 1e-12)) expect(shares[SHARES.transmitted]).toBe(0);
  }
  expect(worst).toBeLessThan(1e-3);
});

test('one table serves both ways where nothing absorbs, and both of two faces', () => {
  const description = describeDesign({
    media: [medium('inner', 1.36)],
    finishes: [finish('films', { kind: 'stack', layers: uneven(5), extrapolates: false })],
    parts: [part('block', { kind: 'box', size: [4, 4, 4] }, 'inner', { faces: { top: 'films', left: 'films' } })],
    pumps: [beam([0, 0, 9], [0, 0, -1], { wavelengthNm: 440 })],
    exit: 'block.bottom',
  });
  const { scene } = compileScene(description);
  expect(scene.filmBlock.length).toBe(1);
  // Compiled again for a trial and a trace, the description brings the same table.
  expect(compileScene(description).scene.filmNodes).toBe(scene.filmNodes);
});
