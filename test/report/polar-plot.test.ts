import { describe, expect, it } from 'vitest';
import { azimuthMeans, polarPlot, polarWords } from '../../src/report/charts/polar-plot.js';

/** A face of even radiance sends out Φ cos θ / π per steradian (Lambert's law). */
const lambertian = (watts: number) => {
  const [polarCells, azimuthCells] = [45, 8];
  const wattsPerSr = Float64Array.from({ length: polarCells * azimuthCells }, (_, i) => {
    const polar = Math.floor(i / azimuthCells);
    // Alternating azimuths average out.
    return (watts / Math.PI) * Math.cos(((polar + 0.5) * Math.PI) / 2 / polarCells) * (i % 2 === 0 ? 1.5 : 0.5);
  });
  return { id: 'exit', polarCells, azimuthCells, polarToDeg: 90 as const, wattsPerSr, candela: wattsPerSr };
};

const points = (svg: string, className: string): number[][] => {
  const d = new RegExp(`class="${className}" d="([^"]+)"`).exec(svg)?.[1] ?? '';
  return d
    .split(/[ML]/)
    .slice(1)
    .map((pair) => pair.split(' ').map(Number));
};

describe('polarPlot', () => {
  it('averages over azimuth', () => {
    const means = azimuthMeans(lambertian(10));
    expect(means).toHaveLength(45);
    expect(means[0]).toBeCloseTo((10 / Math.PI) * Math.cos(Math.PI / 180), 12);
  });

  it('draws a Lambertian face upon the dashed circle of its own power', () => {
    const { text } = polarPlot('p', lambertian(10), 'directions');
    const circle = points(text, 'lambert');
    const curve = points(text, 'intensity');
    const [cx] = circle[30];
    const top = Math.min(...circle.map(([, y]) => y));
    const foot = Math.max(...circle.map(([, y]) => y));
    const radius = (foot - top) / 2;
    expect(curve).toHaveLength(90);
    // In polar coordinates r = 2a cos θ is a circle of radius a through the origin.
    for (const [x, y] of curve) expect(Math.hypot(x - cx, y - (foot - radius)) / radius).toBeCloseTo(1, 2);
  });
});

describe('light both ways', () => {
  it('draws an even emitter upon the dashed circle all round, and says from where its angles count', () => {
    const [polarCells, azimuthCells] = [90, 8];
    const wattsPerSr = new Float64Array(polarCells * azimuthCells).fill(2);
    const angles = { id: 'ball', polarCells, azimuthCells, polarToDeg: 180 as const, wattsPerSr, candela: wattsPerSr };
    const { text } = polarPlot('p', angles, 'directions');
    const circle = points(text, 'lambert');
    const curve = points(text, 'intensity');
    expect(curve).toHaveLength(180);
    const [cx, cy] = [0, 1].map(
      (axis) => (Math.min(...circle.map((p) => p[axis])) + Math.max(...circle.map((p) => p[axis]))) / 2,
    );
    const radius = Math.max(...circle.map(([x]) => x)) - cx;
    for (const [x, y] of curve) expect(Math.hypot(x - cx, y - cy) / radius).toBeCloseTo(1, 2);
    expect(polarWords(angles)).toMatch(/from the axis/);
    expect(polarWords(lambertian(1))).toMatch(/from the normal/);
  });
});
