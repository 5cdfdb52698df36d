/** Every shipped design draws: whole numbers only, nothing outside what is stated, not too much of it. */
import { describe, expect, it } from 'vitest';
import { drawDescription } from '../../src/drawing/draw-description.js';
import { shipped, shippedNames } from '../geometries/shipped.js';

describe('shipped designs', () => {
  it.each(shippedNames())('%s draws', (name) => {
    const drawing = drawDescription(shipped(name));
    expect(drawing.pumps.length).toBeGreaterThan(0);
    const exits = [...drawing.parts.flatMap(({ faces }) => faces), ...drawing.planes].filter(({ isExit }) => isExit);
    expect(exits.length).toBe(1);
    for (const { faces, bounds } of drawing.parts) {
      const corners = faces.flatMap(({ triangles }) => triangles);
      expect(corners.length).toBeGreaterThan(0);
      expect(faces.every(({ triangles, normals }) => triangles.length === normals.length)).toBe(true);
      const outside = corners.filter((c, i) => c < bounds[0][i % 3] - 1e-4 || c > bounds[1][i % 3] + 1e-4);
      expect(outside).toEqual([]);
    }
    expect(JSON.stringify(drawing).length).toBeLessThan(600_000);
  });
});
