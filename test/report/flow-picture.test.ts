import { describe, expect, it } from 'vitest';
import { flowPicture, NARROW_FLOW, WIDE_FLOW } from '../../src/report/charts/flow-picture.js';
import { streamsOf } from '../../src/report/charts/flow-rows.js';
import { largestLosses } from '../../src/report/largest-losses.js';
import { GROUPS } from '../../src/report/ledger-words.js';
import { sampleRecord } from '../cli/sample-record.js';

const record = sampleRecord();
const rows = record.ledger.watts;

describe('streams', () => {
  it('carry all of the light, small ones together', () => {
    const all = GROUPS.flatMap((group) => streamsOf(rows, group));
    expect(all.reduce((sum, { fraction }) => sum + fraction, 0)).toBeCloseTo(1, 12);
    expect(streamsOf(rows, 'pump-lost').at(-1)).toMatchObject({ words: '2 smaller ones', standardError: null });
  });

  it('leave negative rows to the table', () => {
    const odd = rows.map((row) => (row.fate === 'stokes-heat' ? { ...row, fraction: -0.01 } : row));
    for (const { fraction } of streamsOf(odd, 'heat')) expect(fraction).toBeGreaterThan(0);
  });
});

describe('flow picture', () => {
  it.each([WIDE_FLOW, NARROW_FLOW])('draws each loss as wide as its share, to a tenth of a pixel', (size) => {
    const { text } = flowPicture(record, 'f', size);
    const drawn = [
      ...text.matchAll(
        /flow-(?:pump-lost|heat|light-lost)"[^>]*data-words="([\d.]+)[^"]*".*?<path d="M([\d.]+) .*?V([\d.]+)H([\d.]+)Q/g,
      ),
    ];
    expect(drawn.length).toBeGreaterThan(5);
    for (const [, percent, left, , inner] of drawn) {
      // The inner edge begins one radius of 9 beyond the right end of the band.
      const width = Number(inner) - 9 - Number(left);
      expect(Math.abs(width - (size.trunk * Number(percent)) / 100)).toBeLessThan(0.1);
    }
  });

  it('has unique ids and a name for every stream', () => {
    const { text } = flowPicture(record, 'f', WIDE_FLOW);
    expect(text).toContain('aria-labelledby="f-title f-description"');
    expect(text.match(/tabindex="0" role="img" data-words="/g)?.length).toBe(text.match(/class="stream /g)?.length);
  });
});

describe('largest losses', () => {
  it('gathers what one finish takes, and leaves Stokes heat out', () => {
    const losses = largestLosses(rows);
    const finish = losses.find(({ words }) => words === 'absorbed by aluminium');
    expect(finish?.fraction).toBeCloseTo(0.0916, 12);
    expect(finish?.rows).toHaveLength(2);
    expect(losses.some(({ words }) => words.includes('Stokes'))).toBe(false);
    expect(losses.map(({ fraction }) => fraction)).toEqual(
      losses.map(({ fraction }) => fraction).toSorted((a, b) => b - a),
    );
  });
});
