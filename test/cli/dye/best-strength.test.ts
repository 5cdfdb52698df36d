import { describe, expect, test } from 'vitest';
import { bestStrength } from '../../../src/cli/dye/best-strength.js';

const point = (strength: number, exit: number, exitError = 0.001) => ({ strength, exit, exitError });

describe('best strength of a scan', () => {
  test('top of a parabola in the logarithm, exactly', () => {
    const exit = (strength: number) => 0.5 - 0.1 * (Math.log(strength) - Math.log(0.3)) ** 2;
    const points = [0.01, 0.05, 0.2, 0.5, 2].map((strength) => point(strength, exit(strength), 1e-6));
    expect(bestStrength(points).at).toBeCloseTo(0.3, 9);
    expect(bestStrength(points)).toMatchObject({ from: 0.2, to: 0.2, edge: false });
  });

  test('neighbours within two errors of the difference are not told apart', () => {
    const points = [point(1, 0.2), point(2, 0.3), point(4, 0.3025), point(8, 0.3005), point(16, 0.29)];
    expect(bestStrength(points)).toMatchObject({ from: 2, to: 8, edge: false });
  });

  test('a best point at the end is said to be one', () => {
    expect(bestStrength([point(1, 0.1), point(2, 0.2)])).toMatchObject({ at: 2, edge: true });
    expect(bestStrength([point(1, 0.1)])).toMatchObject({ at: 1, edge: true });
  });
});
