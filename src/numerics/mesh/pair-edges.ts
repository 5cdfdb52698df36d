/** Which facets share an edge. In a closed mesh every edge belongs to exactly two, which run along it in opposite ways. */

/** Half-edge e = 3 · facet + k runs from corner k of the facet to the next one. */
export interface EdgePairs {
  /** [half-edge]: the one on the other side of the edge, −1 where there is not exactly one that runs the other way. */
  readonly opposite: Int32Array;
  /** One half-edge of each edge that only one facet has. */
  readonly open: readonly number[];
  readonly openCount: number;
  /** One half-edge of each edge that more than two facets share. */
  readonly crowded: readonly number[];
  readonly crowdedCount: number;
  /** One half-edge of each edge along which both facets run the same way: one of them looks in, the other out. */
  readonly twisted: readonly number[];
  readonly twistedCount: number;
}

/** Faulty edges listed by place; the rest is counted. */
const LISTED = 1000;

export const nextHalfEdge = (e: number): number => (e % 3 === 2 ? e - 2 : e + 1);

/** @param corners [facet · 3] numbers of points */
export function pairEdges(corners: Int32Array): EdgePairs {
  const count = corners.length;
  const mask = 2 ** Math.ceil(Math.log2(Math.max(16, 1.5 * count))) - 1;
  // The first half-edge of each edge, and from each the next one of the same edge.
  const table = new Int32Array(mask + 1).fill(-1);
  const link = new Int32Array(count).fill(-1);
  for (let e = 0; e < count; e++) {
    const a = corners[e];
    const b = corners[nextHalfEdge(e)];
    const low = a < b ? a : b;
    const high = a < b ? b : a;
    let hash = Math.imul(low, 0x9e3779b1) ^ Math.imul(high, 0x85ebca6b);
    hash ^= hash >>> 15;
    let cell = hash & mask;
    for (; table[cell] >= 0; cell = (cell + 1) & mask) {
      const p = corners[table[cell]];
      const q = corners[nextHalfEdge(table[cell])];
      if ((p === low && q === high) || (p === high && q === low)) break;
    }
    link[e] = table[cell];
    table[cell] = e;
  }
  const opposite = new Int32Array(count).fill(-1);
  const open: number[] = [];
  const crowded: number[] = [];
  const twisted: number[] = [];
  const counts = [0, 0, 0];
  const note = (kind: number, list: number[], e: number) => {
    counts[kind]++;
    if (list.length < LISTED) list.push(e);
  };
  for (let cell = 0; cell <= mask; cell++) {
    const e = table[cell];
    if (e < 0) continue;
    const f = link[e];
    if (f < 0) note(0, open, e);
    else if (link[f] >= 0) note(1, crowded, e);
    else if (corners[e] === corners[f]) note(2, twisted, e);
    else {
      opposite[e] = f;
      opposite[f] = e;
    }
  }
  return {
    opposite,
    open,
    openCount: counts[0],
    crowded,
    crowdedCount: counts[1],
    twisted,
    twistedCount: counts[2],
  };
}
