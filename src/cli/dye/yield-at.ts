/** Decades to either side, and points a decade, at which the yield is looked up. */
const DECADES = 3;
const PER_DECADE = 4;

/**
 * Quantum yield against strength, linear in its logarithm between points read anew, so that whatever lowers the yield of a strong dye is in it.
 * @param read the yield at so many times the strength at hand; null where it cannot be read
 */
export function yieldAt(read: (times: number) => number | null, otherwise: number): (times: number) => number {
  const values = Array.from(
    { length: 2 * DECADES * PER_DECADE + 1 },
    (_, i) => read(10 ** (i / PER_DECADE - DECADES)) ?? otherwise,
  );
  return (times) => {
    const at = Math.min(values.length - 1, Math.max(0, (Math.log10(times) + DECADES) * PER_DECADE));
    const below = Math.min(values.length - 2, Math.floor(at));
    return values[below] + (at - below) * (values[below + 1] - values[below]);
  };
}
