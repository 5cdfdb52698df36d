/**
 * Index of a mixture (Lorentz 1880, Lorenz 1880): (n² − 1)/(n² + 2) adds up over the volume each component would fill alone,
 * per volume of the mixture. Where mixing shrinks the volume, `shares` sum to more than 1.
 */
export function mixedIndex(indices: readonly number[], shares: readonly number[]): number {
  const refraction = indices.reduce((sum, n, i) => sum + (shares[i] * (n * n - 1)) / (n * n + 2), 0);
  return Math.sqrt((1 + 2 * refraction) / (1 - refraction));
}
