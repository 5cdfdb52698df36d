import { describe, expect, it } from 'vitest';
import { histogramBars } from '../../src/report/charts/histogram-bars.js';

const words = { title: 'Absorptions', across: 'absorptions', of: 'histories' };
const rects = (svg: string, name: string) =>
  [
    ...svg.matchAll(
      new RegExp(`<rect class="${name}" x="([\\d.]+)" y="([\\d.]+)" width="([\\d.]+)" height="([\\d.]+)"`, 'g'),
    ),
  ].map(([, ...numbers]) => numbers.map(Number));
const draw = (shares: readonly number[], unit = '', width = 1) =>
  histogramBars('h', { id: 'h', unit, from: 0, width, shares }, words).text;

describe('histogramBars', () => {
  it('draws each share to scale, whole counts astride of their number', () => {
    const svg = draw([0.2, 0.4, 0.1, 0.3]);
    const bars = rects(svg, 'bar-share');
    expect(bars).toHaveLength(3);
    const heights = bars.map(([, , , height]) => height);
    expect(heights[1] / heights[0]).toBeCloseTo(2, 2);
    expect(heights[2] / heights[0]).toBeCloseTo(0.5, 2);
    const tick = /<text x="([\d.]+)"[^>]*>1<\/text>/.exec(svg)?.[1];
    expect(bars[1][0] + bars[1][2] / 2).toBeCloseTo(Number(tick), 0);
  });

  it('names what lies above the last bar, and how much it is', () => {
    const svg = draw([0.2, 0.4, 0.1, 0.3]);
    expect(svg).toContain('above 2: 30 %');
    expect(rects(svg, 'bar-above')[0][3]).toBeCloseTo(rects(svg, 'bar-share')[1][3] * 0.75, 1);
    expect(draw([0.5, 0.5, 0])).toContain('above 1: none');
  });

  it('joins narrow cells whole, and loses no share', () => {
    const svg = draw([...new Array(99).fill(0.01), 0.01], 'mm', 2);
    const bars = rects(svg, 'bar-share');
    expect(bars).toHaveLength(49);
    expect(new Set(bars.map(([, , , height]) => height)).size).toBe(1);
    // 49 bars of two cells of 2 mm; the odd cell and the one for all above are left.
    expect(svg).toContain('above 196 mm: 2 %');
  });

  it('draws a run in which one history ended without an absorption', () => {
    expect(draw([1, 0, 0])).not.toMatch(/NaN|Infinity/);
    expect(draw([0, 0, 0])).not.toMatch(/NaN|Infinity/);
  });
});
