/** Stacks of thin films against handbook values, closed forms, and Maxwell's equations solved step by step. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fresnelReflectance } from '../../src/optics/fresnel.js';
import { metalReflectance } from '../../src/optics/metal-reflectance.js';
import { AMPLITUDES, amplitudesAt, stackResponse } from '../../src/optics/thin-film-stack.js';
import { type FilmLayer, thinFilms } from '../../src/optics/thin-films.js';
import '../helpers/fixed-seeds.js';
import { complex as c, throughLayers } from './maxwell-steps.js';

const cosine = (degrees: number) => Math.cos((degrees * Math.PI) / 180);
const film = (n: number, thicknessNm: number, k = 0): FilmLayer => ({ n, k, thicknessNm });
const quarter = (n: number, nm: number) => film(n, nm / (4 * n));

function shares(layers: readonly FilmLayer[], n1: number, n2: number, degrees: number, nm: number) {
  const { s, p } = stackResponse(layers, n1, n2, cosine(degrees), nm);
  return { rs: s.reflectance, rp: p.reflectance, ts: s.transmittance, tp: p.transmittance };
}
/** H(LH)^pairs of quarter waves. */
const mirror = (high: number, low: number, pairs: number, nm: number) => [
  quarter(high, nm),
  ...Array.from({ length: pairs }, () => [quarter(low, nm), quarter(high, nm)]).flat(),
];

describe('single and double coats', () => {
  test.each([
    // Born & Wolf §1.6.4 and Macleod, Thin-Film Optical Filters: ((n₀nₛ − n₁²)/(n₀nₛ + n₁²))², the usual 1.26 %.
    ['magnesium fluoride on crown glass', [quarter(1.38, 550)], 1, 1.52, 0, 550, 0.012601, 0.012601],
    ['the same at 450 nm', [quarter(1.38, 550)], 1, 1.52, 0, 450, 0.016204, 0.016204],
    ['the same at 45°', [quarter(1.38, 550)], 1, 1.52, 45, 550, 0.040048, 0.001356],
    ['bare glass', [], 1, 1.52, 0, 550, 0.04258, 0.04258],
    ['bare glass at 60°', [], 1, 1.52, 60, 550, 0.183438, 0.001527],
    // Two-layer condition of Catalán (1962), in Macleod: exactly nothing at 550 nm.
    ['V coat', [film(1.38, 129.29), film(2.35, 11.67)], 1, 1.52, 0, 550, 0, 0],
    ['V coat at 500 nm', [film(1.38, 129.29), film(2.35, 11.67)], 1, 1.52, 0, 500, 0.005141, 0.005141],
    ['V coat at 600 nm', [film(1.38, 129.29), film(2.35, 11.67)], 1, 1.52, 0, 600, 0.003006, 0.003006],
    ['metal, n = 0.7 − 5.5i', [film(0.7, 5000, 5.5)], 1, 1.5, 0, 550, 0.91551, 0.91551],
    ['metal under 89 nm', [film(1.46, 89), film(0.7, 5000, 5.5)], 1, 1.5, 0, 520, 0.843981, 0.843981],
  ])('%s', (_, layers, n1, n2, degrees, nm, rs, rp) => {
    const found = shares(layers, n1, n2, degrees, nm);
    expect(found.rs).toBeCloseTo(rs, 5);
    expect(found.rp).toBeCloseTo(rp, 5);
  });

  test('50 nm of silver-like metal between liquid and glass at 30°', () => {
    // Table of independently computed multilayer values, 6 decimals.
    const found = shares([film(0.05, 50, 3.3)], 1.3614, 1.5168, 30, 520);
    expect(found.rs).toBeCloseTo(0.951325, 5);
    expect(found.ts).toBeCloseTo(0.028958, 5);
    expect(found.rp).toBeCloseTo(0.931581, 5);
    expect(found.tp).toBeCloseTo(0.042564, 5);
  });
});

describe('quarter-wave mirrors', () => {
  test.each([
    [2.35, 1.46, 3, 1, 1.52],
    [2.35, 1.46, 7, 1, 1.52],
    [2.35, 1.38, 4, 1, 1.52],
    [2.15, 1.46, 7, 1.3614, 1.5168],
  ])('peak of H(LH)^p with %s, %s, p = %s: Born & Wolf §1.6.5', (high, low, pairs, n0, substrate) => {
    const admittance = (high / low) ** (2 * pairs) * (high ** 2 / substrate);
    const peak = ((n0 - admittance) / (n0 + admittance)) ** 2;
    expect(shares(mirror(high, low, pairs, 550), n0, substrate, 0, 550).rs).toBeCloseTo(peak, 12);
  });

  test.each([
    [2.35, 1.46],
    [2.35, 1.38],
    [2.15, 1.46],
  ])('width of the band of a long one, %s and %s: Δg = (2/π) asin((H − L)/(H + L))', (high, low) => {
    // Macleod, Thin-Film Optical Filters; Born & Wolf §1.6.5. Of 120 pairs the edges are sharp to a fraction of a nm.
    const width = (2 / Math.PI) * Math.asin((high - low) / (high + low));
    const layers = mirror(high, low, 120, 550);
    for (const sign of [-1, 1]) {
      const edge = 550 / (1 + sign * width);
      expect(shares(layers, 1, 1.52, 0, edge - sign * -0.4).rs).toBeGreaterThan(0.9);
      const outside = Array.from(
        { length: 40 },
        (_, i) => shares(layers, 1, 1.52, 0, edge - sign * (0.4 + 0.1 * i)).rs,
      );
      expect(Math.min(...outside)).toBeLessThan(0.6);
    }
  });

  // Table of independently computed multilayer values: 15 layers for 520 nm, from air and from inside a liquid.
  test.each([
    [445, 0, 1, 0.792325, 0.792325],
    [480, 0, 1, 0.996438, 0.996438],
    [520, 0, 1, 0.998596, 0.998596],
    [560, 0, 1, 0.997247, 0.997247],
    [600, 0, 1, 0.979753, 0.979753],
    [520, 45, 1, 0.999308, 0.979437],
    [445, 45, 1, 0.999477, 0.985972],
    [520, 30, 1.3614, 0.998883, 0.983165],
    [445, 30, 1.3614, 0.998906, 0.983782],
    [520, 45, 1.3614, 0.997678, 0.074491],
    [445, 45, 1.3614, 0.9999, 0.95014],
    [520, 60, 1.3614, 0.891896, 0.000806],
    [445, 60, 1.3614, 0.99996, 0.005895],
  ])('15 layers at %s nm, %s° in n = %s', (nm, degrees, n0, rs, rp) => {
    const found = shares(mirror(2.35, 1.46, 7, 520), n0, 1.52, degrees, nm);
    expect(found.rs).toBeCloseTo(rs, 6);
    expect(found.rp).toBeCloseTo(rp, 6);
  });

  test.each([
    ['s', 0, 474.2, 654.5, null],
    ['s', 30, 450.0, 636.0, 1.752],
    ['p', 30, 459.1, 618.7, 1.752],
    ['s', 45, 424.5, 617.0, 1.748],
    ['p', 45, 443.5, 580.8, 1.748],
    ['s', 60, 397.4, 597.4, 1.743],
    ['p', 60, 427.1, 540.4, 1.741],
  ] as const)(
    'half-maximum edges of 31 layers, %s at %s° in air, and the effective index',
    (which, degrees, low, high, index) => {
      const layers = mirror(2.35, 1.46, 15, 550);
      const at = (nm: number) => shares(layers, 1, 1.52, degrees, nm)[which === 's' ? 'rs' : 'rp'];
      const edge = (inside: number, outside: number) => {
        let [a, b] = [inside, outside];
        for (let i = 0; i < 60; i++) {
          const middle = (a + b) / 2;
          if (at(middle) > 0.5) a = middle;
          else b = middle;
        }
        return a;
      };
      const centre = 2 / (1 / low + 1 / high);
      const found = [edge(centre, low - 3), edge(centre, high + 3)];
      // Printed to 0.1 nm.
      expect(Math.abs(found[0] - low)).toBeLessThan(0.1);
      expect(Math.abs(found[1] - high)).toBeLessThan(0.1);
      if (index === null) return;
      // λ(θ) = λ₀ √(1 − (sin θ/n)²): the centre of the band, Macleod.
      const shifted = 2 / (1 / found[0] + 1 / found[1]);
      const effective = Math.sin((degrees * Math.PI) / 180) / Math.sqrt(1 - (shifted / 549.95) ** 2);
      expect(Math.abs(effective - index)).toBeLessThan(0.002);
    },
  );

  test('an absentee: a half wave changes nothing at its wavelength (Born & Wolf §1.6.4)', () => {
    const bare = shares(mirror(2.35, 1.46, 3, 550), 1, 1.52, 0, 550);
    const added = shares([film(1.7, 550 / (2 * 1.7)), ...mirror(2.35, 1.46, 3, 550)], 1, 1.52, 0, 550);
    expect(added.rs).toBeCloseTo(bare.rs, 12);
  });
});

describe('frustrated total reflection', () => {
  // T⁻¹ = 1 + sinh²(κd)·((n² cos² + κ²)/(2n cos κ))² for s, with n² in place of 1 in front of κ for p; κ in units of 2π/λ. Zhu, Yu, Hawley & Roy, Am. J. Phys. 54 601 (1986).
  test.each([
    [1.3614, 50, 100, 520],
    [1.52, 45, 300, 450],
    [1.52, 80, 60, 600],
  ])('n = %s, %s°, %s nm of air at %s nm', (n, degrees, gap, nm) => {
    const sine = n * Math.sin((degrees * Math.PI) / 180);
    const kappa = Math.sqrt(sine * sine - 1);
    const normal = n * cosine(degrees);
    const sinh2 = Math.sinh((2 * Math.PI * gap * kappa) / nm) ** 2;
    const factor = (a: number, b: number) => 1 / (1 + sinh2 * ((a * a + b * b) / (2 * a * b)) ** 2);
    const found = shares([film(1, gap)], n, n, degrees, nm);
    expect(found.ts).toBeCloseTo(factor(normal, kappa), 12);
    expect(found.tp).toBeCloseTo(factor(normal / (n * n), kappa), 12);
  });

  test('through 100 nm of air at 50°: values of the table', () => {
    const found = shares([film(1, 100)], 1.3614, 1.3614, 50, 520);
    expect(found.rs).toBeCloseTo(0.265891, 6);
    expect(found.rp).toBeCloseTo(0.141452, 6);
  });

  test('nothing gets out beyond the critical angle, and what absorbs there takes its share', () => {
    const clear = shares([film(2.3, 80)], 1.3614, 1, 50, 520);
    expect(clear).toEqual({ rs: 1, rp: 1, ts: 0, tp: 0 });
    // The plasmon of a silver-like film: p light all but vanishes at one angle (Kretschmann & Raether 1968; Otto 1968).
    const dip = Array.from({ length: 200 }, (_, i) => shares([film(0.12, 50, 3.6)], 1.52, 1, 42 + 0.04 * i, 600).rp);
    expect(Math.min(...dip)).toBeLessThan(0.1);
    expect(shares([film(0.05, 50, 3.3)], 1.52, 1, 45, 600).ts).toBe(0);
  });
});

const layer = fc.record({
  n: fc.double({ min: 0.05, max: 4, noNaN: true }),
  k: fc.oneof(fc.constant(0), fc.double({ min: 0, max: 7, noNaN: true })),
  thicknessNm: fc.double({ min: 0, max: 300, noNaN: true }),
});
const clearLayer = fc.record({
  n: fc.double({ min: 1, max: 4, noNaN: true }),
  k: fc.constant(0),
  thicknessNm: fc.double({ min: 0, max: 300, noNaN: true }),
});
const medium = fc.double({ min: 1, max: 2, noNaN: true });
const angle = fc.double({ min: 0.001, max: 1, noNaN: true });
const wavelength = fc.double({ min: 350, max: 1000, noNaN: true });

/** |r|² and T from the amplitudes, before anything is rounded to close. */
function raw(layers: readonly FilmLayer[], n1: number, n2: number, cos: number, nm: number) {
  const out = new Float64Array(AMPLITUDES.COUNT);
  amplitudesAt(thinFilms(layers, nm), n1, n2, cos, out);
  const size = (slot: number) => out[slot] ** 2 + out[slot + 1] ** 2;
  const out2 = (n2 - n1) * (n2 + n1) + (n1 * cos) ** 2;
  const normalOut = Math.sqrt(Math.max(0, out2));
  const ratio = normalOut / (n1 * cos);
  const ratioP = out2 > 0 ? (n2 * n2 * n1 * cos) / (normalOut * n1 * n1) : 0;
  return {
    rs: size(AMPLITUDES.reflectedSReal),
    rp: size(AMPLITUDES.reflectedPReal),
    ts: ratio * size(AMPLITUDES.transmittedSReal),
    tp: ratioP * size(AMPLITUDES.transmittedPReal),
  };
}

describe('any stack', () => {
  test('R + T = 1 to 1e-12 where nothing absorbs, from the bare amplitudes', () => {
    fc.assert(
      fc.property(
        fc.array(clearLayer, { maxLength: 12 }),
        medium,
        medium,
        angle,
        wavelength,
        (layers, n1, n2, cos, nm) => {
          const { rs, rp, ts, tp } = raw(layers, n1, n2, cos, nm);
          expect(Math.abs(rs + ts - 1)).toBeLessThan(1e-12);
          expect(Math.abs(rp + tp - 1)).toBeLessThan(1e-12);
        },
      ),
      { numRuns: 300 },
    );
  });

  test('R, T and A against the field equations solved by small steps', () => {
    fc.assert(
      fc.property(fc.array(layer, { maxLength: 4 }), medium, medium, angle, wavelength, (thick, n1, n2, cos, nm) => {
        // Thin where it absorbs strongly: growing solutions spoil a step-by-step one.
        const layers = thick.map((each) => ({ ...each, thicknessNm: each.thicknessNm / (1 + 4 * each.k) }));
        const expected = throughLayers(layers, n1, n2, cos, nm);
        const { s, p } = stackResponse(layers, n1, n2, cos, nm);
        for (const [found, truth] of [
          [s, expected.s],
          [p, expected.p],
        ] as const) {
          expect(found.reflectance).toBeCloseTo(truth.reflectance, 6);
          expect(found.transmittance).toBeCloseTo(truth.transmittance, 6);
          // The heat, an integral over the layers: R + T + A = 1 is Poynting's theorem and no definition.
          expect(found.absorptance).toBeCloseTo(truth.absorbed, 6);
          const turned = c.power(
            c.sub([Math.cos(found.reflectedPhase), Math.sin(found.reflectedPhase)], c.unit(truth.r)),
          );
          if (truth.reflectance > 1e-6) expect(turned).toBeLessThan(1e-6);
        }
      }),
      { numRuns: 60 },
    );
  }, 20_000);

  test('T is the same both ways (Stokes reciprocity; Born & Wolf §1.6.3)', () => {
    fc.assert(
      fc.property(fc.array(layer, { maxLength: 8 }), medium, medium, angle, wavelength, (layers, n1, n2, cos, nm) => {
        const sine = (n1 / n2) * Math.sqrt(1 - cos * cos);
        fc.pre(sine < 0.999);
        const there = stackResponse(layers, n1, n2, cos, nm);
        const back = stackResponse(layers.toReversed(), n2, n1, Math.sqrt(1 - sine * sine), nm);
        expect(back.s.transmittance).toBeCloseTo(there.s.transmittance, 10);
        expect(back.p.transmittance).toBeCloseTo(there.p.transmittance, 10);
      }),
      { numRuns: 200 },
    );
  });

  test('no layer, or one of no thickness, is a bare interface: Fresnel', () => {
    fc.assert(
      fc.property(medium, medium, angle, (n1, n2, cos) => {
        for (const layers of [[], [film(2, 0)], [film(1.3, 0, 2)]]) {
          const { s, p } = stackResponse(layers, n1, n2, cos, 500);
          expect((s.reflectance + p.reflectance) / 2).toBeCloseTo(fresnelReflectance(n1, n2, cos), 9);
        }
      }),
    );
  });

  test('a thick metal is the bare metal, at any angle and without overflow', () => {
    fc.assert(
      fc.property(medium, angle, fc.double({ min: 3e3, max: 1e7, noNaN: true }), (n1, cos, thicknessNm) => {
        const { s, p } = stackResponse([film(0.9, thicknessNm, 6.3)], n1, 1.5, cos, 500);
        expect((s.reflectance + p.reflectance) / 2).toBeCloseTo(metalReflectance(n1, 0.9, 6.3, cos), 9);
        expect(s.transmittance).toBeLessThan(1e-60);
      }),
    );
  });

  test('500 layers keep finite', () => {
    const layers = Array.from({ length: 500 }, (_, i) => (i % 2 ? film(2.4, 55) : film(0.2, 40, i % 4 ? 0 : 4)));
    const { s, p } = stackResponse(layers, 1.36, 1.52, 0.4, 500);
    for (const value of [...Object.values(s), ...Object.values(p)]) expect(Number.isFinite(value)).toBe(true);
    expect(s.absorptance).toBeGreaterThan(0);
  });
});

test('aluminium has its p minimum at the pseudo-Brewster angle of its optical constants', () => {
  // tan θ ≈ √(n² + k²) for a good metal, to a few tenths of a degree (Potter, Appl. Opt. 4 (1965) 53; from memory).
  const [n, k] = [0.8878, 6.281];
  const at = (degrees: number) => shares([film(n, 5000, k)], 1, 1.5, degrees, 520).rp;
  let lowest = 45;
  for (let degrees = 45; degrees < 90; degrees += 0.01) if (at(degrees) < at(lowest)) lowest = degrees;
  const expected = (Math.atan(Math.hypot(n, k)) * 180) / Math.PI;
  expect(Math.abs(lowest - expected)).toBeLessThan(0.5);
  // Rakić, Appl. Opt. 34 4755 (1995): reflectance of the opaque film at 520 nm.
  expect(at(0)).toBeCloseTo(0.9174, 4);
});
