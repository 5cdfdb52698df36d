import { describe, expect, it } from 'vitest';
import * as cli from '../../src/cli/number-format.js';
import * as report from '../../src/report/number-format.js';

describe('numbers of the page', () => {
  it.each([
    [31.759672, 0.097386, 'W'],
    [1.2e-9, 3e-11, 'W'],
    [0, 0.0006, 'W'],
    [120, null, 'W'],
    [5, 0, ''],
    [Number.NaN, 1, ''],
  ] as const)('%s ± %s %s reads the same as on the terminal', (value, error, unit) => {
    expect(report.formatWithError(value, error, unit, '±')).toBe(cli.formatWithError(value, error, unit, '±'));
  });
});
