import { describe, expect, it } from 'vitest';
import { traceBounds } from '../../src/cli/trace-bounds.js';

const design = (histories: number | null, precision: number | null) => ({
  histories,
  precision,
  seed: null,
  voxels: null,
  polarisation: null,
});

describe('traceBounds', () => {
  it('falls back on a number of histories', () => {
    expect(traceBounds({}, design(null, null))).toEqual({ histories: 200_000, precision: null, seconds: null });
  });
  it("takes the design's own wishes when the command line has none", () => {
    expect(traceBounds({}, design(5000, 0.01))).toEqual({ histories: 5000, precision: 0.01, seconds: null });
    expect(traceBounds({}, design(null, 0.01))).toEqual({ histories: 1e9, precision: 0.01, seconds: null });
  });
  it('lets the command line override all of them', () => {
    expect(traceBounds({ for: 3 }, design(5000, 0.01))).toEqual({ histories: 1e9, precision: null, seconds: 3 });
    expect(traceBounds({ precision: 0.002 }, design(5000, null))).toEqual({
      histories: 1e9,
      precision: 0.002,
      seconds: null,
    });
    expect(traceBounds({ histories: 7, for: 3 }, design(null, null))).toEqual({
      histories: 7,
      precision: null,
      seconds: 3,
    });
  });
});
