export interface Bounds {
  readonly low: readonly number[];
  readonly high: readonly number[];
}

/** Smallest box around x, y, z, x, y, z, …; null without a point. */
export function boundsOf(lists: readonly (readonly number[])[]): Bounds | null {
  const low = [Infinity, Infinity, Infinity];
  const high = [-Infinity, -Infinity, -Infinity];
  for (const list of lists) {
    for (let i = 0; i < list.length; i++) {
      const value = list[i];
      if (value < low[i % 3]) low[i % 3] = value;
      if (value > high[i % 3]) high[i % 3] = value;
    }
  }
  return low.every(Number.isFinite) && high.every(Number.isFinite) ? { low, high } : null;
}

/** A box larger by a share of its diagonal on every side. */
export function widened({ low, high }: Bounds, share: number): Bounds {
  const more = share * (Math.hypot(...high.map((value, i) => value - low[i])) || 1);
  return { low: low.map((value) => value - more), high: high.map((value) => value + more) };
}
