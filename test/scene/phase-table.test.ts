import { describe, expect, test } from 'vitest';
import { mieEfficiencies, mieIntensity, mieSeries } from '../../src/optics/mie.js';
import { phaseTable } from '../../src/scene/phase-table.js';
import { PHASE } from '../../src/scene/scene-layout.js';

describe.each([
  [0.01, 1.5],
  [1, 1.2],
  [5.2, 1.55],
  [40, 1.1],
  [200, 1.33],
])('a sphere of size %f and index %f', (size, n) => {
  const series = mieSeries(size, n, 0);
  const table = phaseTable(series);

  test('cosines rise from −1 to 1', () => {
    expect(table).toHaveLength(PHASE.cells + 1);
    expect(table[0]).toBe(-1);
    expect(table[PHASE.cells]).toBe(1);
    for (let i = 0; i < PHASE.cells; i++) expect(table[i + 1]).toBeGreaterThan(table[i]);
  });

  test('drawn from it, the mean cosine is that of the series', () => {
    let mean = 0;
    for (let i = 0; i < PHASE.cells; i++) mean += (table[i] + table[i + 1]) / 2 / PHASE.cells;
    expect(Math.abs(mean - mieEfficiencies(series).anisotropy)).toBeLessThan(1e-4);
  });

  test('each quarter of the draws holds a quarter of the light', () => {
    // Midpoint rule over the angle between the table's own cosines, ten points a lobe.
    const light = [0, 0, 0, 0];
    for (let i = 0; i < PHASE.cells; i++) {
      const [from, to] = [Math.acos(table[i + 1]), Math.acos(table[i])];
      const steps = Math.ceil(((to - from) * 10 * series.order) / Math.PI) + 2;
      for (let step = 0; step < steps; step++) {
        const angle = from + ((to - from) * (step + 0.5)) / steps;
        light[Math.floor((4 * i) / PHASE.cells)] +=
          ((Math.sin(angle) * (to - from)) / steps) * mieIntensity(series, Math.cos(angle));
      }
    }
    const total = light.reduce((a, b) => a + b, 0);
    for (const part of light) expect(Math.abs(part / total - 0.25)).toBeLessThan(2e-4);
  });
});
