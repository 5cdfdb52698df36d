/** To a number of decimals, twice the same as once; never −0. */
export function toDecimals(value: number, decimals: number): number {
  const scale = 10 ** decimals;
  return Math.round(value * scale) / scale + 0;
}
