/** The idealised dichroic against its own definition; there is no outside source for a shape we chose. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type DichroicLaw, dichroicShares } from '../../src/optics/dichroic.js';

const law: DichroicLaw = { edgeNm: 490, widthNm: 8, passes: 'below', transmits: 0.95, reflects: 0.98, absorbs: 0.01 };

describe('dichroicShares', () => {
  test('far from the edge: pass band transmits, stop band reflects, the rest goes the other way', () => {
    const pass = dichroicShares(law, 400);
    expect(pass.transmittance).toBeCloseTo(0.95, 9);
    expect(pass.reflectance).toBeCloseTo(0.04, 9);
    const stop = dichroicShares(law, 600);
    expect(stop.reflectance).toBeCloseTo(0.98, 9);
    expect(stop.transmittance).toBeCloseTo(0.01, 9);
  });

  test('the width is that from 90 to 10 % of the step, the edge its middle', () => {
    const plain = { ...law, transmits: 1, reflects: 1, absorbs: 0 };
    const transmittance = (nm: number) => dichroicShares(plain, nm).transmittance;
    expect(transmittance(486)).toBeCloseTo(0.9, 12);
    expect(transmittance(490)).toBeCloseTo(0.5, 12);
    expect(transmittance(494)).toBeCloseTo(0.1, 12);
  });

  test('passing above is the mirror image', () => {
    for (const off of [-30, -3, 0.5, 8]) {
      const below = dichroicShares(law, 490 + off);
      const above = dichroicShares({ ...law, passes: 'above' }, 490 - off);
      expect(above.transmittance).toBeCloseTo(below.transmittance, 14);
    }
  });

  test('no width is a step', () => {
    const step = { ...law, widthNm: 0 };
    expect(dichroicShares(step, 489.999).transmittance).toBe(0.95);
    expect(dichroicShares(step, 490.001).reflectance).toBeCloseTo(0.98, 14);
  });

  test('all light is accounted for and no share is negative', () => {
    const share = fc.double({ min: 0, max: 1, noNaN: true });
    const widths = fc.double({ min: 0, max: 60, noNaN: true });
    fc.assert(
      fc.property(share, share, share, widths, fc.integer({ min: 300, max: 900 }), (absorbs, t, r, widthNm, nm) => {
        const left = 1 - absorbs;
        const { reflectance, transmittance } = dichroicShares(
          { ...law, widthNm, absorbs, transmits: t * left, reflects: r * left },
          nm,
        );
        expect(Math.min(reflectance, transmittance)).toBeGreaterThanOrEqual(0);
        expect(reflectance + transmittance + absorbs).toBeCloseTo(1, 12);
      }),
    );
  });
});
