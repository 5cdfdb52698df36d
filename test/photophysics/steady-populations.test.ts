import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { steadyPopulations, tripletRatio } from '../../src/photophysics/steady-populations.js';
import { rungeKutta } from '../helpers/runge-kutta.js';

describe('populations under steady light', () => {
  test('the integrator gives exp(−t): closed form', () => {
    expect(rungeKutta(([y]) => [-y], [1], 3, 300)[0]).toBeCloseTo(Math.exp(-3), 9);
  });

  // Against direct integration of the rate equations from the dark to 60 of the longest times.
  test.each([
    [0.01, 4, null],
    [1, 4, null],
    [25, 4, null],
    [0.01, 4, { yield: 0.03, lifetimeNs: 320 }],
    [0.5, 4, { yield: 0.03, lifetimeNs: 320 }],
    [3, 3.76, { yield: 0.2, lifetimeNs: 40 }],
  ] as const)(
    'x = %d, τ = %d ns, triplet %o: the rate equations integrated come to the same',
    (x, lifetimeNs, triplet) => {
      const rate = x / lifetimeNs;
      const crossing = triplet === null ? 0 : triplet.yield / lifetimeNs;
      const back = triplet === null ? 1 : 1 / triplet.lifetimeNs;
      const f = ([ground, excited, dark]: readonly number[]) => [
        -rate * ground + (1 / lifetimeNs - crossing) * excited + back * dark,
        rate * ground - excited / lifetimeNs,
        crossing * excited - back * dark,
      ];
      const longest = Math.max(lifetimeNs, triplet?.lifetimeNs ?? 0);
      const steps = Math.ceil(40 * longest * (rate + 1 / lifetimeNs) * 4);
      const [ground, excited, dark] = rungeKutta(f, [1, 0, 0], 40 * longest, steps);
      const steady = steadyPopulations(x, tripletRatio({ lifetimeNs, triplet }));
      expect(steady.ground).toBeCloseTo(ground, 9);
      expect(steady.excited).toBeCloseTo(excited, 9);
      expect(steady.triplet).toBeCloseTo(dark, 9);
    },
  );

  test('they add up to one and light never fills the ground state', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1e9, noNaN: true }),
        fc.double({ min: 0, max: 1e4, noNaN: true }),
        (x, ratio) => {
          const { ground, excited, triplet } = steadyPopulations(x, ratio);
          expect(ground + excited + triplet).toBeCloseTo(1, 9);
          expect(Math.min(ground, excited, triplet)).toBeGreaterThanOrEqual(0);
        },
      ),
    );
  });

  test('without end of light: 1/(1 + β) excited, the limit', () => {
    expect(steadyPopulations(Number.POSITIVE_INFINITY, 3)).toEqual({ ground: 0, excited: 0.25, triplet: 0.75 });
    expect(steadyPopulations(1e15, 3).excited).toBeCloseTo(0.25, 12);
  });
});
