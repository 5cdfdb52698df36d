/**
 * Piecewise linear function through (xs[i], ys[i]), xs ascending.
 * @param outside what stands beyond the ends: the end value (`hold`) or 0.
 */
export function linearCurve(
  xs: ArrayLike<number>,
  ys: ArrayLike<number>,
  outside: { readonly below: 'hold' | 'zero'; readonly above: 'hold' | 'zero' },
): (x: number) => number {
  const last = xs.length - 1;
  if (last < 0 || ys.length !== xs.length)
    throw new RangeError('a curve needs as many values as positions, at least one');
  for (let i = 1; i <= last; i++) {
    if (!(xs[i] > xs[i - 1])) throw new RangeError(`positions must ascend; ${xs[i]} follows ${xs[i - 1]}`);
  }
  return (x) => {
    if (x < xs[0]) return outside.below === 'hold' ? ys[0] : 0;
    if (x > xs[last]) return outside.above === 'hold' ? ys[last] : 0;
    let low = 0;
    let high = last;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (xs[middle] <= x) low = middle;
      else high = middle;
    }
    if (high === low) return ys[low];
    const share = (x - xs[low]) / (xs[high] - xs[low]);
    return ys[low] * (1 - share) + ys[high] * share;
  };
}
