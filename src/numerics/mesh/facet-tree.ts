/**
 * Boxes within boxes over the facets of a mesh: a binary tree by the binned surface-area heuristic (Wald, Symposium on Interactive Ray
 * Tracing 2007), flat, built once and shared by all threads. Boxes are kept in single precision, rounded outwards.
 */

export interface FacetTree {
  /** [point · 3], mm. */
  readonly facetPoint: Float64Array;
  /** [facet · 3]: points of its corners, counter-clockwise as seen from outside; facets in the order of the leaves. */
  readonly facetCorner: Int32Array;
  /** [node · 12]: low x y z and high x y z of the first child, then of the second. */
  readonly nodeBox: Float32Array;
  /** [node · 2]: number of a child node, or ~(first facet · 8 + number of facets) for a leaf. */
  readonly nodeChild: Int32Array;
}

const BINS = 12;
const LEAF = 4;
/** Deeper than this a node is halved by number, so that a walk needs no more than `WALK_DEPTH` places. */
const DEEPEST = 60;
export const WALK_DEPTH = 128;

/** @returns the tree over the facets, and the order in which it keeps them: `order[i]` was the number of facet i. */
export function buildFacetTree(points: Float64Array, corners: Int32Array): { tree: FacetTree; order: Int32Array } {
  const count = corners.length / 3;
  const order = new Int32Array(count);
  for (let i = 0; i < count; i++) order[i] = i;
  const box = facetBoxes(points, corners);
  const nodeBox = new Float32Array(12 * Math.max(1, count - 1));
  const nodeChild = new Int32Array(2 * Math.max(1, count - 1));
  let nodes = 1;
  const centre = new Float32Array(6);
  const whole = new Float32Array(6);
  const bins = new Bins();

  // Ranges of facets still to be put under a child of a node.
  const tasks: number[] = [];
  const middle = count >> 1;
  measure(order, box, 0, count, whole, centre);
  const first = split(order, box, 0, count, bins, centre) ?? middle;
  tasks.push(0, first, 0, 1, first, count, 1, 1);
  while (tasks.length > 0) {
    const depth = tasks.pop() as number;
    const slot = tasks.pop() as number;
    const end = tasks.pop() as number;
    const start = tasks.pop() as number;
    measure(order, box, start, end, whole, centre);
    nodeBox.set(whole, 6 * slot);
    const size = end - start;
    let at: number | null = null;
    if (size > LEAF) {
      at = depth < DEEPEST ? split(order, box, start, end, bins, centre) : null;
      at ??= (start + end) >> 1;
    }
    if (at === null) {
      nodeChild[slot] = ~(start * 8 + size);
      continue;
    }
    const node = nodes++;
    nodeChild[slot] = node;
    tasks.push(start, at, 2 * node, depth + 1, at, end, 2 * node + 1, depth + 1);
  }
  return {
    tree: {
      facetPoint: points,
      facetCorner: permuteTriples(corners, order),
      nodeBox: nodeBox.slice(0, 12 * nodes),
      nodeChild: nodeChild.slice(0, 2 * nodes),
    },
    order,
  };
}

export function permuteTriples(values: Int32Array, order: Int32Array): Int32Array {
  const moved = new Int32Array(values.length);
  for (let i = 0; i < order.length; i++) {
    moved[3 * i] = values[3 * order[i]];
    moved[3 * i + 1] = values[3 * order[i] + 1];
    moved[3 * i + 2] = values[3 * order[i] + 2];
  }
  return moved;
}

const down = (value: number): number => Math.fround(value - Math.abs(value) * 1.2e-7 - 1e-37);
const up = (value: number): number => Math.fround(value + Math.abs(value) * 1.2e-7 + 1e-37);

function facetBoxes(points: Float64Array, corners: Int32Array): Float32Array {
  const box = new Float32Array(2 * corners.length);
  for (let facet = 0; facet < corners.length / 3; facet++) facetBox(points, corners, facet, box, 6 * facet);
  return box;
}

/** Box round one facet, widened to single precision, into `out` [at .. at + 5]. */
export function facetBox(
  points: Float64Array,
  corners: Int32Array,
  facet: number,
  out: Float32Array,
  at: number,
): void {
  const a = 3 * corners[3 * facet];
  const b = 3 * corners[3 * facet + 1];
  const c = 3 * corners[3 * facet + 2];
  for (let axis = 0; axis < 3; axis++) {
    const p = points[a + axis];
    const q = points[b + axis];
    const r = points[c + axis];
    const low = p < q ? (p < r ? p : r) : q < r ? q : r;
    const high = p > q ? (p > r ? p : r) : q > r ? q : r;
    out[at + axis] = down(low);
    out[at + 3 + axis] = up(high);
  }
}

/** Box round a range of facets and box round their middles (doubled). */
function measure(
  order: Int32Array,
  box: Float32Array,
  start: number,
  end: number,
  whole: Float32Array,
  centre: Float32Array,
): void {
  let x0 = Infinity;
  let y0 = Infinity;
  let z0 = Infinity;
  let x1 = -Infinity;
  let y1 = -Infinity;
  let z1 = -Infinity;
  let cx0 = Infinity;
  let cy0 = Infinity;
  let cz0 = Infinity;
  let cx1 = -Infinity;
  let cy1 = -Infinity;
  let cz1 = -Infinity;
  for (let i = start; i < end; i++) {
    const b = 6 * order[i];
    const lx = box[b];
    const ly = box[b + 1];
    const lz = box[b + 2];
    const hx = box[b + 3];
    const hy = box[b + 4];
    const hz = box[b + 5];
    if (lx < x0) x0 = lx;
    if (ly < y0) y0 = ly;
    if (lz < z0) z0 = lz;
    if (hx > x1) x1 = hx;
    if (hy > y1) y1 = hy;
    if (hz > z1) z1 = hz;
    const mx = lx + hx;
    const my = ly + hy;
    const mz = lz + hz;
    if (mx < cx0) cx0 = mx;
    if (my < cy0) cy0 = my;
    if (mz < cz0) cz0 = mz;
    if (mx > cx1) cx1 = mx;
    if (my > cy1) cy1 = my;
    if (mz > cz1) cz1 = mz;
  }
  whole[0] = x0;
  whole[1] = y0;
  whole[2] = z0;
  whole[3] = x1;
  whole[4] = y1;
  whole[5] = z1;
  centre[0] = cx0;
  centre[1] = cy0;
  centre[2] = cz0;
  centre[3] = cx1;
  centre[4] = cy1;
  centre[5] = cz1;
}

class Bins {
  readonly count = new Int32Array(BINS);
  readonly box = new Float64Array(6 * BINS);
  /** Cost of all bins from this one on. */
  readonly after = new Float64Array(BINS);
}

/** Parts a range in two where a ray is likeliest to be spared one half. @returns where, null when it is better left whole */
function split(
  order: Int32Array,
  box: Float32Array,
  start: number,
  end: number,
  bins: Bins,
  centre: Float32Array,
): number | null {
  let best = Infinity;
  let bestAxis = -1;
  let bestBin = 0;
  const widest = widestAxis(centre);
  for (let axis = 0; axis < 3; axis++) {
    // Large ranges are parted along their longest side: trying all three gains next to nothing there.
    if (end - start > 4096 && axis !== widest) continue;
    const low = centre[axis];
    const extent = centre[3 + axis] - low;
    if (!(extent > 0)) continue;
    const scale = (BINS * (1 - 1e-6)) / extent;
    fillBins(order, box, start, end, bins, axis, low, scale);
    const bin = sweepBins(bins, end - start);
    if (bestCost < best) {
      best = bestCost;
      bestAxis = axis;
      bestBin = bin;
    }
  }
  if (bestAxis < 0) return null;
  const low = centre[bestAxis];
  const scale = (BINS * (1 - 1e-6)) / (centre[3 + bestAxis] - low);
  let i = start;
  let j = end - 1;
  while (i <= j) {
    const b = 6 * order[i];
    if (((box[b + bestAxis] + box[b + 3 + bestAxis] - low) * scale) >> 0 <= bestBin) i++;
    else {
      const swap = order[i];
      order[i] = order[j];
      order[j--] = swap;
    }
  }
  return i > start && i < end ? i : null;
}

function widestAxis(centre: Float32Array): number {
  const [x, y, z] = [centre[3] - centre[0], centre[4] - centre[1], centre[5] - centre[2]];
  return x >= y && x >= z ? 0 : y >= z ? 1 : 2;
}

function fillBins(
  order: Int32Array,
  box: Float32Array,
  start: number,
  end: number,
  bins: Bins,
  axis: number,
  low: number,
  scale: number,
): void {
  const { count, box: bound } = bins;
  count.fill(0);
  for (let k = 0; k < BINS; k++) {
    for (let c = 0; c < 3; c++) {
      bound[6 * k + c] = Infinity;
      bound[6 * k + 3 + c] = -Infinity;
    }
  }
  for (let i = start; i < end; i++) {
    const b = 6 * order[i];
    const k = ((box[b + axis] + box[b + 3 + axis] - low) * scale) >> 0;
    count[k]++;
    const at = 6 * k;
    if (box[b] < bound[at]) bound[at] = box[b];
    if (box[b + 1] < bound[at + 1]) bound[at + 1] = box[b + 1];
    if (box[b + 2] < bound[at + 2]) bound[at + 2] = box[b + 2];
    if (box[b + 3] > bound[at + 3]) bound[at + 3] = box[b + 3];
    if (box[b + 4] > bound[at + 4]) bound[at + 4] = box[b + 4];
    if (box[b + 5] > bound[at + 5]) bound[at + 5] = box[b + 5];
  }
}

let bestCost = 0;
const swept = new Float64Array(6);

/** Leaves the least cost in `bestCost`. @returns the last bin of the first half */
function sweepBins({ count, box, after }: Bins, total: number): number {
  emptyBox();
  let number = 0;
  for (let k = BINS - 1; k > 0; k--) {
    number += count[k];
    after[k] = number * grownBy(box, k);
  }
  emptyBox();
  bestCost = Infinity;
  let bestBin = 0;
  number = 0;
  for (let k = 0; k < BINS - 1; k++) {
    number += count[k];
    const before = number * grownBy(box, k);
    if (number === 0 || number === total) continue;
    const cost = before + after[k + 1];
    if (cost < bestCost) {
      bestCost = cost;
      bestBin = k;
    }
  }
  return bestBin;
}

function emptyBox(): void {
  swept[0] = swept[1] = swept[2] = Infinity;
  swept[3] = swept[4] = swept[5] = -Infinity;
}

/** Half the surface of the swept box with one more bin in it; 0 while it is empty. */
function grownBy(box: Float64Array, k: number): number {
  for (let c = 0; c < 3; c++) {
    if (box[6 * k + c] < swept[c]) swept[c] = box[6 * k + c];
    if (box[6 * k + 3 + c] > swept[3 + c]) swept[3 + c] = box[6 * k + 3 + c];
  }
  const [x, y, z] = [swept[3] - swept[0], swept[4] - swept[1], swept[5] - swept[2]];
  return x >= 0 ? x * y + y * z + z * x : 0;
}

/** Boxes for points that have been moved; the tree stays as it was. */
export function refitBoxes(points: Float64Array, corners: Int32Array, nodeChild: Int32Array): Float32Array {
  const nodes = nodeChild.length / 2;
  const nodeBox = new Float32Array(12 * nodes);
  const one = new Float32Array(6);
  // Children have higher numbers than their parent.
  for (let slot = 2 * nodes - 1; slot >= 0; slot--) {
    const at = 6 * slot;
    for (let c = 0; c < 3; c++) {
      nodeBox[at + c] = Infinity;
      nodeBox[at + 3 + c] = -Infinity;
    }
    const child = nodeChild[slot];
    if (child >= 0) {
      join(nodeBox, at, nodeBox, 12 * child);
      join(nodeBox, at, nodeBox, 12 * child + 6);
      continue;
    }
    const first = ~child >> 3;
    for (let facet = first; facet < first + (~child & 7); facet++) {
      facetBox(points, corners, facet, one, 0);
      join(nodeBox, at, one, 0);
    }
  }
  return nodeBox;
}

function join(to: Float32Array, at: number, from: Float32Array, by: number): void {
  for (let c = 0; c < 3; c++) {
    if (from[by + c] < to[at + c]) to[at + c] = from[by + c];
    if (from[by + 3 + c] > to[at + 3 + c]) to[at + 3 + c] = from[by + 3 + c];
  }
}
