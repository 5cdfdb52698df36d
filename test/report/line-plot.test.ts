import { describe, expect, test } from 'vitest';
import { linePlot } from '../../src/report/charts/line-plot.js';
import { bottomLogAxis, logScale } from '../../src/report/charts/log-axis.js';

const WORDS = { id: 'p', title: 'T', description: 'D', across: 'x', up: 'y' };

describe('line plot', () => {
  test('equal ratios are equal lengths on a logarithmic axis, with ticks at 1, 2, 5', () => {
    const axis = { domain: [0.01, 10] as const, range: [0, 300] as const, label: 'mm' };
    const at = logScale(axis);
    expect(at(0.1) - at(0.01)).toBeCloseTo(100, 9);
    expect(at(10) - at(1)).toBeCloseTo(100, 9);
    const texts = [...bottomLogAxis(axis, 0).text.matchAll(/text-anchor="middle">([^<]+)</g)].map(([, text]) => text);
    expect(texts).toEqual(['0.01', '0.02', '0.05', '0.1', '0.2', '0.5', '1', '2', '5', '10', 'mm']);
  });

  test('points with errors get dots and bars to scale; texts are escaped', () => {
    const points = [
      [1, 20],
      [10, 40],
    ] as const;
    const { text } = linePlot(WORDS, [1, 10], 'linear', 100, [
      { words: '<b>', colour: 'output', points, errors: [10, null] },
    ]);
    expect(text).toContain('&lt;b&gt;');
    const [, bottom, top] = /class="plot-error"[^>]*y1="([\d.]+)" y2="([\d.]+)"/.exec(text) ?? [];
    // 230 units stand for 100: ±10 are 46 units.
    expect(Number(bottom) - Number(top)).toBeCloseTo(46, 6);
    expect(text.match(/plot-dot/g)).toHaveLength(2);
    expect(text.match(/plot-error/g)).toHaveLength(1);
  });

  test('marks outside are left out, curves beyond the top are held at it', () => {
    const { text } = linePlot(
      WORDS,
      [1, 10],
      'log',
      100,
      [{ words: 'a', colour: 'pump', points: [[1, 500]] }],
      [
        { x: 2, words: 'seen' },
        { x: 20, words: 'unseen' },
      ],
    );
    expect(text).toContain('seen<');
    expect(text).not.toContain('unseen');
  });
});
