/** What the kernel reads from the tables of a stack against the stack worked out directly, at random wavelengths and angles. */
import { expect, test } from 'vitest';
import { SHARES } from '../../src/kernel/shares.js';
import { splitLight } from '../../src/kernel/split-light.js';
import { stackResponse } from '../../src/optics/thin-film-stack.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { beam, describeDesign, finish, medium, part } from '../helpers/describe.js';
import { filmInterfaces, filmLayer, parkMiller, unevenLayers } from '../helpers/film-interfaces.js';

test.each([
  ['21 layers between air and liquid', unevenLayers(21), 1, 1.3614],
  ['40 layers between liquid and glass', unevenLayers(40), 1.3614, 1.52],
  ['21 absorbing layers between air and liquid', unevenLayers(21, 0.002), 1, 1.3614],
  ['12 layers between media almost alike', unevenLayers(12), 1.3614, 1.361],
  ['12 layers between media alike', unevenLayers(12), 1.3614, 1.3614],
  ['50 nm of silver-like metal between air and glass', [filmLayer(0.05, 50, 3.3)], 1, 1.52],
  ['metal under glass-like layers', [filmLayer(1.46, 90), filmLayer(2.4, 60), filmLayer(0.8, 200, 6)], 1, 1.3614],
  ['no thickness at all', [filmLayer(2, 0)], 1, 1.52],
])('%s: within 1e-3 everywhere, seed 11', (_, layers, outside, inside) => {
  const { scene, graph, legend, outward, inward } = filmInterfaces(layers, outside, inside);
  const random = parkMiller(11);
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
    finishes: [finish('films', { kind: 'stack', layers: unevenLayers(5), extrapolates: false })],
    parts: [part('block', { kind: 'box', size: [4, 4, 4] }, 'inner', { faces: { top: 'films', left: 'films' } })],
    pumps: [beam([0, 0, 9], [0, 0, -1], { wavelengthNm: 440 })],
    exit: 'block.bottom',
  });
  const { scene } = compileScene(description);
  expect(scene.filmBlock.length).toBe(1);
  // Compiled again for a trial and a trace, the description brings the same table.
  expect(compileScene(description).scene.filmNodes).toBe(scene.filmNodes);
});
