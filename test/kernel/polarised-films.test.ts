/** The state of polarised light at stacks of thin films, whose shares and products come from tables. */
import { expect, test } from 'vitest';
import { RAY } from '../../src/kernel/photon.js';
import { carryPolarisation, holdDirection, splitPolarised } from '../../src/kernel/polarised-light.js';
import { SHARES } from '../../src/kernel/shares.js';
import { splitLight } from '../../src/kernel/split-light.js';
import { filmInterfaces, filmLayer, parkMiller, unevenLayers } from '../helpers/film-interfaces.js';

test.each([
  ['12 layers', unevenLayers(12)],
  ['metal under a layer', [filmLayer(1.46, 90), filmLayer(0.1, 40, 3)]],
])('%s: light is polarised whole at most, and stays all but whole, seed 16', (_, layers) => {
  const { scene, graph, inward, outward } = filmInterfaces(layers, 1, 1.5, 'carried', 480);
  const shares = new Float64Array(SHARES.COUNT);
  const ray = new Float64Array(RAY.COUNT);
  const random = parkMiller(16);
  let most = 0;
  let least = 1;
  for (let i = 0; i < 3000; i++) {
    // Fully polarised light of any kind along a random direction, about a random axis across it.
    const [cosine, turn] = [0.01 + 0.99 * random(), 2 * Math.PI * random()];
    const sine = Math.sqrt(1 - cosine * cosine);
    const out = random() < 0.5;
    ray[RAY.dx] = sine;
    ray[RAY.dz] = out ? cosine : -cosine;
    holdDirection(ray);
    ray[RAY.axisX] = -ray[RAY.dz] * Math.sin(turn);
    ray[RAY.axisY] = Math.cos(turn);
    ray[RAY.axisZ] = sine * Math.sin(turn);
    const [v, angle] = [2 * random() - 1, 2 * Math.PI * random()];
    ray[RAY.stokesQ] = Math.sqrt(1 - v * v) * Math.cos(angle);
    ray[RAY.stokesU] = Math.sqrt(1 - v * v) * Math.sin(angle);
    ray[RAY.stokesV] = v;
    shares[SHARES.index] = out ? 1.5 : 1;
    shares[SHARES.cosine] = cosine;
    const record = out ? outward : inward;
    const wavelength = Math.floor(random() * scene.wavelengths);
    splitLight(scene, graph.interfaces, record, wavelength, shares);
    splitPolarised(scene, graph.interfaces, record, wavelength, ray, 0, 0, out ? 1 : -1, shares);
    expect(shares[SHARES.reflected] + shares[SHARES.transmitted]).toBeLessThanOrEqual(1 + 1e-12);
    const reflects = random() < 0.5;
    const power = reflects ? shares[SHARES.reflected] : shares[SHARES.transmitted];
    carryPolarisation(shares, reflects, ray);
    const size = Math.hypot(ray[RAY.stokesQ], ray[RAY.stokesU], ray[RAY.stokesV]);
    most = Math.max(most, size);
    // Where next to nothing goes, the error of the table is all there is.
    if (power > 0.05) least = Math.min(least, size);
  }
  expect(most).toBeLessThanOrEqual(1 + 1e-14);
  expect(least).toBeGreaterThan(0.99);
});
