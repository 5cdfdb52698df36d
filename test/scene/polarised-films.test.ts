/** What polarised light reads from the tables of a stack against the stack worked out directly. */
import { describe, expect, test } from 'vitest';
import type { LayerDescription } from '../../src/design/description.js';
import { SHARES } from '../../src/kernel/shares.js';
import { splitLight } from '../../src/kernel/split-light.js';
import { REFLECTION, reflectMetal, reflectTransparent } from '../../src/optics/polarised-reflection.js';
import { stackResponse } from '../../src/optics/thin-film-stack.js';
import { filmInterfaces, filmLayer, parkMiller, unevenLayers } from '../helpers/film-interfaces.js';
import { throughLayers } from '../optics/maxwell-steps.js';

type Meeting = ReturnType<typeof filmInterfaces>;
const shares = new Float64Array(SHARES.COUNT);

function meet({ scene, graph, outward, inward }: Meeting, out: boolean, wavelength: number, n1: number, cos: number) {
  shares[SHARES.index] = n1;
  shares[SHARES.cosine] = cos;
  splitLight(scene, graph.interfaces, out ? outward : inward, wavelength, shares);
}

/** As many angles near grazing and near the critical angle, on either side of it, as elsewhere. */
function cosineAt(i: number, u: number, outside: number, inside: number): number {
  const critical = Math.sqrt(Math.max(0, 1 - (Math.min(outside, inside) / Math.max(outside, inside)) ** 2));
  return [u, u ** 4, critical + 0.02 * (u - 0.5), critical + 1e-4 * (u - 0.5)][i % 4];
}

const seen = (layers: readonly LayerDescription[], nm: number, out: boolean) => {
  const met = layers.map(({ n, k, thicknessNm }) => ({ n: n(nm), k: k(nm), thicknessNm }));
  return out ? met.toReversed() : met;
};

const silver = [filmLayer(0.05, 50, 3.3)];

describe('stacks read by polarised light', () => {
  test.each([
    ['21 layers between air and liquid', unevenLayers(21), 1, 1.3614],
    ['28 layers between liquid and glass', unevenLayers(28), 1.3614, 1.52],
    ['21 absorbing layers between air and liquid', unevenLayers(21, 0.002), 1, 1.3614],
    ['12 layers between media almost alike', unevenLayers(12), 1.3614, 1.361],
    ['12 layers between media alike', unevenLayers(12), 1.3614, 1.3614],
    ['silver-like metal between air and glass', silver, 1, 1.52],
    ['metal under glass-like layers', [filmLayer(1.46, 90), filmLayer(2.4, 60), filmLayer(0.8, 200, 6)], 1, 1.3614],
    ['no thickness at all', [filmLayer(2, 0)], 1, 1.52],
  ])('%s: shares and products within 1e-3 everywhere, seed 12', (_, layers, outside, inside) => {
    const meeting = filmInterfaces(layers, outside, inside, 'carried', 500);
    expect(meeting.scene.polarised).toBe(1);
    const random = parkMiller(12);
    const lossless = layers.every(({ k }) => k(500) === 0);
    let worst = 0;
    let excess = 0;
    let least = 1;
    let [fewest, most] = [1, 1];
    for (let i = 0; i < 3000; i++) {
      const wavelength = Math.floor(random() * meeting.scene.wavelengths);
      const cosine = cosineAt(i, random(), outside, inside);
      if (!(cosine > 0)) continue;
      const out = random() < 0.5;
      const [n1, n2] = out ? [inside, outside] : [outside, inside];
      meet(meeting, out, wavelength, n1, cosine);
      const nm = meeting.legend.grid.nm[wavelength];
      const { s, p } = stackResponse(seen(layers, nm, out), n1, n2, cosine, nm);
      // Phases of the tangential field: that of r_p has the other sign.
      const back = Math.sqrt(s.reflectance * p.reflectance);
      const turn = s.reflectedPhase - p.reflectedPhase + Math.PI;
      const on = Math.sqrt(s.transmittance * p.transmittance);
      const shift = s.transmittedPhase - p.transmittedPhase;
      const expected: [SHARES, number][] = [
        [SHARES.reflectedS, s.reflectance],
        [SHARES.reflectedP, p.reflectance],
        [SHARES.reflectedReal, back * Math.cos(turn)],
        [SHARES.reflectedImaginary, back * Math.sin(turn)],
        [SHARES.transmittedS, s.transmittance],
        [SHARES.transmittedP, p.transmittance],
        [SHARES.transmittedReal, on * Math.cos(shift)],
        [SHARES.transmittedImaginary, on * Math.sin(shift)],
      ];
      for (const [slot, value] of expected) worst = Math.max(worst, Math.abs(shares[slot] - value));
      for (const [reflected, transmitted] of [
        [SHARES.reflectedS, SHARES.transmittedS],
        [SHARES.reflectedP, SHARES.transmittedP],
      ] as const) {
        const sum = shares[reflected] + shares[transmitted];
        most = Math.max(most, sum);
        fewest = Math.min(fewest, sum);
        least = Math.min(least, shares[reflected], shares[transmitted]);
      }
      for (const [at, real] of [
        [SHARES.reflectedS, SHARES.reflectedReal],
        [SHARES.transmittedS, SHARES.transmittedReal],
      ] as const) {
        excess = Math.max(excess, shares[real] ** 2 + shares[real + 1] ** 2 - shares[at] * shares[at + 1]);
      }
    }
    expect(worst).toBeLessThan(1e-3);
    expect(least).toBeGreaterThanOrEqual(0);
    expect(most).toBeLessThanOrEqual(1 + 1e-15);
    if (lossless) expect(fewest).toBeGreaterThan(1 - 2 ** -33);
    expect(excess).toBeLessThan(1e-3);
  });

  test('nothing at all is a bare interface, both ways and beyond the critical angle, seed 13', () => {
    const bare = new Float64Array(4);
    const meeting = filmInterfaces([filmLayer(2, 0)], 1, 1.52, 'carried', 500);
    const random = parkMiller(13);
    for (let i = 0; i < 1000; i++) {
      const cosine = cosineAt(i, random(), 1, 1.52);
      const out = random() < 0.5;
      const [n1, n2] = out ? [1.52, 1] : [1, 1.52];
      meet(meeting, out, 0, n1, cosine);
      reflectTransparent(n1, n2, cosine, bare, 0);
      for (let j = 0; j < 4; j++) expect(Math.abs(shares[SHARES.reflectedS + j] - bare[j])).toBeLessThan(1e-4);
      const passed = Math.sqrt(Math.max(0, (1 - bare[0]) * (1 - bare[1])));
      expect(Math.abs(shares[SHARES.transmittedReal] - passed)).toBeLessThan(1e-4);
      expect(Math.abs(shares[SHARES.transmittedImaginary])).toBeLessThan(1e-4);
    }
  });

  test('a thick metal is that metal, seed 14', () => {
    const metal = new Float64Array(4);
    const meeting = filmInterfaces([filmLayer(0.8, 1e6, 6)], 1.3614, 1.52, 'carried', 500);
    const random = parkMiller(14);
    for (let i = 0; i < 500; i++) {
      const cosine = random();
      meet(meeting, false, 0, 1.3614, cosine);
      reflectMetal(1.3614, 0.8, 6, cosine, metal, 0);
      for (const j of [REFLECTION.s, REFLECTION.p, REFLECTION.real, REFLECTION.imaginary]) {
        expect(Math.abs(shares[SHARES.reflectedS + j] - metal[j])).toBeLessThan(1e-4);
      }
      expect(shares[SHARES.transmittedS]).toBe(0);
    }
  });

  test('agrees with the field equations followed step by step, seed 15', () => {
    const layers = [filmLayer(2.4, 70), filmLayer(1.46, 120, 0.01), filmLayer(2.1, 55)];
    const meeting = filmInterfaces(layers, 1, 1.3614, 'carried', 500);
    const random = parkMiller(15);
    for (let i = 0; i < 60; i++) {
      const wavelength = Math.floor(random() * meeting.scene.wavelengths);
      const cosine = 0.02 + 0.98 * random();
      const out = i % 2 === 0;
      const [n1, n2] = out ? [1.3614, 1] : [1, 1.3614];
      meet(meeting, out, wavelength, n1, cosine);
      const nm = meeting.legend.grid.nm[wavelength];
      const { s, p } = throughLayers(seen(layers, nm, out), n1, n2, cosine, nm);
      // p along direction × s: the tangential field of the reflected wave is its negative.
      const real = -(s.r[0] * p.r[0] + s.r[1] * p.r[1]);
      const imaginary = -(s.r[1] * p.r[0] - s.r[0] * p.r[1]);
      expect(Math.abs(shares[SHARES.reflectedS] - s.reflectance)).toBeLessThan(1e-3);
      expect(Math.abs(shares[SHARES.reflectedP] - p.reflectance)).toBeLessThan(1e-3);
      expect(Math.abs(shares[SHARES.reflectedReal] - real)).toBeLessThan(1e-3);
      expect(Math.abs(shares[SHARES.reflectedImaginary] - imaginary)).toBeLessThan(1e-3);
      if (s.transmittance === 0) continue;
      const size = Math.sqrt((s.transmittance * p.transmittance) / (norm(s.t) * norm(p.t)));
      expect(Math.abs(shares[SHARES.transmittedReal] - size * (s.t[0] * p.t[0] + s.t[1] * p.t[1]))).toBeLessThan(1e-3);
      expect(Math.abs(shares[SHARES.transmittedImaginary] - size * (s.t[1] * p.t[0] - s.t[0] * p.t[1]))).toBeLessThan(
        1e-3,
      );
    }
  });
});

const norm = ([a, b]: readonly [number, number]): number => a * a + b * b;
