/**
 * exp(x²) erfc(x) for x ≥ 0, to 1e-13: the Maclaurin series of erf below 2, Laplace's continued fraction above
 * (Abramowitz & Stegun 7.1.6 and 7.1.14; from memory). @throws RangeError for x below 0 or not a number
 */
export function scaledErfc(x: number): number {
  if (!(x >= 0)) throw new RangeError(`scaled erfc is worked out for x ≥ 0, not ${x}`);
  if (x < 2) {
    // erf x = 2/√π exp(−x²) Σ 2ⁿ x²ⁿ⁺¹ / (1·3·5 … (2n+1)): all terms positive, so exp(x²) comes out exactly.
    let term = x;
    let sum = x;
    for (let n = 1; term > 1e-18 * sum; n++) {
      term *= (2 * x * x) / (2 * n + 1);
      sum += term;
    }
    return Math.exp(x * x) - (2 / Math.sqrt(Math.PI)) * sum;
  }
  let tail = x;
  for (let n = 120; n > 0; n--) tail = x + n / 2 / tail;
  return 1 / (Math.sqrt(Math.PI) * tail);
}
