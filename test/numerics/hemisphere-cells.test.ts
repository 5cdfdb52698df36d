import { describe, expect, test } from 'vitest';
import { cellShares, hemisphereCells, type ScatterRows, scatterShares } from '../../src/numerics/hemisphere-cells.js';

const table = (
  scatterDeg: readonly number[],
  azimuthDeg: readonly number[],
  f: (polar: number, turn: number) => number,
) => {
  const plane = scatterDeg.map((polar) => azimuthDeg.map((turn) => f((polar * Math.PI) / 180, (turn * Math.PI) / 180)));
  const rows: ScatterRows = { incidenceDeg: [0], scatterDeg, azimuthDeg, reflected: [plane], transmitted: [plane] };
  return rows;
};
const degrees = Array.from({ length: 91 }, (_, i) => i);

describe('integral of value times cosine over the hemisphere, closed forms', () => {
  test('constant 1/π gives 1 whatever the rows', () => {
    expect(scatterShares(table([0, 90], [0], () => 1 / Math.PI)).reflected[0]).toBeCloseTo(1, 12);
    expect(scatterShares(table([0, 13, 14, 90], [0, 77], () => 1 / Math.PI)).transmitted[0]).toBeCloseTo(1, 12);
  });

  test('cosⁿ θ gives 2π/(n + 2)', () => {
    for (const n of [1, 2, 20]) {
      const { reflected } = scatterShares(table(degrees, [0], (polar) => Math.cos(polar) ** n));
      expect(reflected[0] / ((2 * Math.PI) / (n + 2))).toBeCloseTo(1, 2);
    }
  });

  test('nothing lies beyond the last scatter angle: sin² of it', () => {
    expect(scatterShares(table([0, 30], [0], () => 1 / Math.PI)).reflected[0]).toBeCloseTo(0.25, 12);
  });

  test('one side of the plane of incidence mirrors the other: 1 + cos φ keeps its mean', () => {
    const turns = Array.from({ length: 61 }, (_, i) => 3 * i);
    const rows = table([0, 90], turns, (_, turn) => (1 + Math.cos(turn)) / Math.PI);
    expect(scatterShares(rows).reflected[0]).toBeCloseTo(1, 4);
  });
});

test('cells are as fine as the rows and never coarser than a degree', () => {
  const { polar, azimuth } = hemisphereCells({ scatterDeg: [0, 0.1, 0.2, 5, 90], azimuthDeg: [0, 180] });
  expect(polar.slice(0, 3).map((angle) => (angle * 180) / Math.PI)).toEqual(
    [0, 0.1, 0.2].map((x) => expect.closeTo(x, 12)),
  );
  const steps = polar.slice(1).map((angle, i) => angle - polar[i]);
  expect(Math.max(...steps)).toBeLessThanOrEqual((Math.PI / 180) * (1 + 1e-9));
  expect(azimuth).toHaveLength(61);
});

test('a peak of a table stays where it is', () => {
  const rows = table([0, 29, 30, 31, 90], [0], (polar) => (Math.abs(polar - Math.PI / 6) < 1e-9 ? 1 : 0));
  const cells = hemisphereCells(rows);
  const shares = cellShares(rows, rows.reflected[0], cells);
  const lit = cells.polar.filter((_, i) => shares[i] > 0).map((angle) => Math.round((angle * 180) / Math.PI));
  expect(lit).toEqual([29, 30]);
});
