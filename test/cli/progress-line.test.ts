import { describe, expect, it } from 'vitest';
import { ProgressLine, progressText, shareDone } from '../../src/cli/progress-line.js';

const unbounded = { precision: null, seconds: null };
const at = (histories: number, seconds: number, precision: number | null = null) => ({
  histories,
  ofHistories: 1000,
  seconds,
  precision,
});

describe('progress', () => {
  it('follows the bound that is met first', () => {
    expect(shareDone(at(100, 5), unbounded)).toBeCloseTo(0.1, 12);
    expect(shareDone(at(100, 5), { precision: null, seconds: 10 })).toBeCloseTo(0.5, 12);
    // The error of a mean falls as one over the root of the number: half of it takes four times the histories.
    expect(shareDone(at(100, 5, 0.02), { precision: 0.01, seconds: null })).toBeCloseTo(0.25, 12);
    expect(shareDone(at(2000, 5), unbounded)).toBe(1);
  });

  it('tells rate, precision reached and time left', () => {
    expect(progressText(at(250, 0.5, 0.0321), unbounded)).toBe(
      '25 %, 250 histories, 500/s, exit known to 3.2 %, 1.5 s left',
    );
    expect(progressText(at(0, 0), unbounded)).toBe('0 %, 0 histories');
  });

  it('writes one line a quarter where lines cannot be rewritten', () => {
    let text = '';
    const line = new ProgressLine((part) => (text += part), unbounded, false, 80);
    for (let histories = 0; histories <= 1000; histories += 50) line.show(at(histories, histories / 100));
    line.clear();
    expect(text.split('\n').map((one) => one.split(',')[0])).toEqual(['25 %', '50 %', '75 %', '100 %', '']);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: there must be none
    expect(text).not.toMatch(/[\r\u001b]/);
  });

  it('rewrites one line on a terminal, no wider than it, and leaves nothing behind', () => {
    const writes: string[] = [];
    const line = new ProgressLine((part) => writes.push(part), unbounded, true, 20);
    line.show(at(250, 0.5, 0.0321));
    line.show(at(260, 0.5, 0.0321));
    line.clear();
    expect(writes).toEqual(['\r\u001b[2K25 %, 250 histories', '\r\u001b[2K']);
  });
});
