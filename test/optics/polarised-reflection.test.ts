import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fresnelReflectance } from '../../src/optics/fresnel.js';
import { metalReflectance } from '../../src/optics/metal-reflectance.js';
import { REFLECTION, reflectMetal, reflectTransparent } from '../../src/optics/polarised-reflection.js';

interface Complex {
  readonly re: number;
  readonly im: number;
}
const times = (a: Complex, b: Complex): Complex => ({ re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re });
const over = (a: Complex, b: Complex): Complex => {
  const norm = b.re * b.re + b.im * b.im;
  return { re: (a.re * b.re + a.im * b.im) / norm, im: (a.im * b.re - a.re * b.im) / norm };
};
const plus = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });
const minus = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im });
const real = (re: number): Complex => ({ re, im: 0 });
/** The root with a negative imaginary part: a wave that dies away, time law exp(+iωt). */
const root = ({ re, im }: Complex): Complex => {
  const size = Math.hypot(re, im);
  return { re: Math.sqrt((size + re) / 2), im: -Math.sqrt(Math.max(0, (size - re) / 2)) };
};

/** Fresnel's amplitudes with complex numbers, Born & Wolf §1.5 (20) and (21). */
function amplitudes(n1: number, n2: Complex, cosine: number): { s: Complex; p: Complex } {
  const sine = over(real(n1 * Math.sqrt(1 - cosine * cosine)), n2);
  const beyond = root(minus(real(1), times(sine, sine)));
  const a = real(n1 * cosine);
  const b = times(n2, beyond);
  const c = times(real(n1), beyond);
  const d = times(n2, real(cosine));
  return { s: over(minus(a, b), plus(a, b)), p: over(minus(d, c), plus(d, c)) };
}

const index = fc.double({ min: 1, max: 2.6, noNaN: true });
const cosine = fc.double({ min: 1e-3, max: 1, noNaN: true });

function check(out: Float64Array, { s, p }: { s: Complex; p: Complex }): void {
  const cross = times(s, { re: p.re, im: -p.im });
  expect(out[REFLECTION.s]).toBeCloseTo(s.re ** 2 + s.im ** 2, 10);
  expect(out[REFLECTION.p]).toBeCloseTo(p.re ** 2 + p.im ** 2, 10);
  expect(out[REFLECTION.real]).toBeCloseTo(cross.re, 10);
  expect(out[REFLECTION.imaginary]).toBeCloseTo(cross.im, 10);
}

describe('reflection of s and p light', () => {
  const out = new Float64Array(4);

  test('of transparent media follows Fresnel’s complex amplitudes, total reflection included', () => {
    fc.assert(
      fc.property(index, index, cosine, (n1, n2, cos) => {
        reflectTransparent(n1, n2, cos, out, 0);
        check(out, amplitudes(n1, real(n2), cos));
        expect((out[REFLECTION.s] + out[REFLECTION.p]) / 2).toBeCloseTo(fresnelReflectance(n1, n2, cos), 12);
      }),
    );
  });

  test('of metals follows them with n − ik', () => {
    const n = fc.double({ min: 0.05, max: 3, noNaN: true });
    const k = fc.double({ min: 0.1, max: 8, noNaN: true });
    fc.assert(
      fc.property(index, n, k, cosine, (n1, re, im, cos) => {
        reflectMetal(n1, re, im, cos, out, 0);
        check(out, amplitudes(n1, { re, im: -im }, cos));
        expect((out[REFLECTION.s] + out[REFLECTION.p]) / 2).toBeCloseTo(metalReflectance(n1, re, im, cos), 10);
      }),
    );
  });

  test('a metal with k = 0 is transparent glass, and a mirror turns the handedness at normal incidence', () => {
    reflectMetal(1, 1.5, 0, 0.6, out, 0);
    const glass = new Float64Array(4);
    reflectTransparent(1, 1.5, 0.6, glass, 0);
    for (let i = 0; i < 4; i++) expect(out[i]).toBeCloseTo(glass[i], 12);
    reflectTransparent(1, 1.5, 1, out, 0);
    expect(out[REFLECTION.real]).toBeCloseTo(-0.04, 12);
  });

  // Born & Wolf §1.5.4 (from memory): n = 1.51 gives 45° at 48°37′ and at 54°37′; printed to a minute of arc.
  test.each([48 + 37 / 60, 54 + 37 / 60])(
    'total reflection in glass of 1.51 at %f° turns s against p by 45°',
    (angle) => {
      reflectTransparent(1.51, 1, Math.cos((angle * Math.PI) / 180), out, 0);
      expect((Math.abs(Math.atan2(out[REFLECTION.imaginary], out[REFLECTION.real])) * 180) / Math.PI).toBeCloseTo(
        45,
        1,
      );
    },
  );
});
