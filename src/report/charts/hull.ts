export type Spot = readonly [x: number, y: number];

/** Corners of the convex outline of some spots, in order (monotone chain: Andrew 1979, Inf. Process. Lett. 9 216). */
export function hull(spots: readonly Spot[]): readonly Spot[] {
  const sorted = spots.toSorted((a, b) => a[0] - b[0] || a[1] - b[1]);
  const half = (list: readonly Spot[]): Spot[] => {
    const chain: Spot[] = [];
    for (const spot of list) {
      while (chain.length > 1 && cross(chain[chain.length - 2], chain[chain.length - 1], spot) <= 1e-9) chain.pop();
      chain.push(spot);
    }
    return chain.slice(0, -1);
  };
  return [...half(sorted), ...half(sorted.toReversed())];
}

const cross = (o: Spot, a: Spot, b: Spot): number => (a[0] - o[0]) * (b[1] - o[1]) - (a[1] - o[1]) * (b[0] - o[0]);
