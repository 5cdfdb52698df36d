import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { reflectMetal, reflectTransparent } from '../../src/optics/polarised-reflection.js';
import { PRODUCTS, stackProducts } from '../../src/optics/stack-products.js';
import { AMPLITUDES, amplitudesAt } from '../../src/optics/thin-film-stack.js';
import { type FilmLayer, thinFilms } from '../../src/optics/thin-films.js';

const amplitudes = new Float64Array(AMPLITUDES.COUNT);
const products = new Float64Array(PRODUCTS.COUNT);
const bare = new Float64Array(4);

function work(layers: readonly FilmLayer[], n1: number, n2: number, cosine: number): void {
  amplitudesAt(thinFilms(layers, 550), n1, n2, cosine, amplitudes);
  stackProducts(amplitudes, n2 / n1, products);
}

/** Shares and product of reflection as `polarised-reflection.ts` has them. */
function expectReflection(): void {
  expect(amplitudes[AMPLITUDES.reflectanceS]).toBeCloseTo(bare[0], 10);
  expect(amplitudes[AMPLITUDES.reflectanceP]).toBeCloseTo(bare[1], 10);
  expect(products[PRODUCTS.reflectedReal]).toBeCloseTo(bare[2], 10);
  expect(products[PRODUCTS.reflectedImaginary]).toBeCloseTo(bare[3], 10);
}

const index = fc.double({ min: 1, max: 2.6, noNaN: true });
const cosine = fc.double({ min: 1e-3, max: 1, noNaN: true });

describe('products of s and p amplitudes of a stack', () => {
  test('without layers are those of a bare interface, total reflection included', () => {
    fc.assert(
      fc.property(index, index, cosine, (n1, n2, cos) => {
        work([], n1, n2, cos);
        reflectTransparent(n1, n2, cos, bare, 0);
        expectReflection();
        if (amplitudes[AMPLITUDES.transmittanceS] === 0) return;
        expect(products[PRODUCTS.transmittedReal]).toBeCloseTo(Math.sqrt((1 - bare[0]) * (1 - bare[1])), 7);
        expect(products[PRODUCTS.transmittedImaginary]).toBeCloseTo(0, 10);
      }),
    );
  });

  test('of one thick metal are those of that metal', () => {
    const n = fc.double({ min: 0.05, max: 3, noNaN: true });
    const k = fc.double({ min: 0.5, max: 8, noNaN: true });
    fc.assert(
      fc.property(index, n, k, cosine, (n1, re, im, cos) => {
        work([{ n: re, k: im, thicknessNm: 1e6 }], n1, 1.5, cos);
        reflectMetal(n1, re, im, cos, bare, 0);
        expectReflection();
      }),
    );
  });

  test('have the size of the shares: a stack does not depolarise', () => {
    const layer = fc.record({
      n: index,
      k: fc.constantFrom(0, 0, 0.01, 2),
      thicknessNm: fc.double({ min: 0, max: 200, noNaN: true }),
    });
    fc.assert(
      fc.property(fc.array(layer, { maxLength: 8 }), index, index, cosine, (layers, n1, n2, cos) => {
        work(layers, n1, n2, cos);
        const size2 = (at: number) => products[at] ** 2 + products[at + 1] ** 2;
        const back = amplitudes[AMPLITUDES.reflectanceS] * amplitudes[AMPLITUDES.reflectanceP];
        expect(size2(PRODUCTS.reflectedReal)).toBeCloseTo(back, 9);
        const on = amplitudes[AMPLITUDES.transmittanceS] * amplitudes[AMPLITUDES.transmittanceP];
        if (on > 0) expect(size2(PRODUCTS.transmittedReal)).toBeCloseTo(on, 9);
      }),
    );
  });
});
