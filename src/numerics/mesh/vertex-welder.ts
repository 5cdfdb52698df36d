/** Makes one point of all corners that lie on the same spot, or within a distance of each other. */
import { GrowingDoubles, GrowingIntegers } from './growing-array.js';

export class VertexWelder {
  readonly #points: GrowingDoubles;
  /** Next point in the same bucket of the hash, −1 none. */
  readonly #next: GrowingIntegers;
  #buckets: Int32Array;
  readonly #cell: number;
  readonly #bits = new Float64Array(3);
  readonly #words = new Int32Array(this.#bits.buffer);

  /**
   * @param tolerance corners nearer than this are one point, which stays where the first of them was; 0: only equal ones.
   * @param expected a guess at the number of points
   */
  constructor(
    readonly tolerance: number,
    expected: number,
  ) {
    this.#points = new GrowingDoubles(3 * expected);
    this.#next = new GrowingIntegers(expected);
    this.#buckets = new Int32Array(2 ** Math.ceil(Math.log2(Math.max(16, 2 * expected)))).fill(-1);
    // A corner's neighbours within the tolerance lie in at most 8 cells of twice its size.
    this.#cell = 2 * tolerance;
  }

  get count(): number {
    return this.#next.length;
  }

  /** Coordinates so far, with room behind; grows, so read it anew after `add`. */
  get points(): Float64Array {
    return this.#points.values;
  }

  /** Number of the point at a corner. */
  add(x: number, y: number, z: number): number {
    // −0 is 0.
    const [px, py, pz] = [x + 0, y + 0, z + 0];
    const known = this.tolerance > 0 ? this.#near(px, py, pz) : this.#equal(px, py, pz);
    if (known >= 0) return known;
    if (this.count >= this.#buckets.length) this.#rehash();
    const point = this.count;
    this.#points.push(px);
    this.#points.push(py);
    this.#points.push(pz);
    const bucket = this.#bucketOf(px, py, pz);
    this.#next.push(this.#buckets[bucket]);
    this.#buckets[bucket] = point;
    return point;
  }

  /** Coordinates of all points, [point · 3]. */
  finish(): Float64Array {
    return this.#points.finish();
  }

  #equal(x: number, y: number, z: number): number {
    const points = this.#points.values;
    let point = this.#buckets[this.#bucketOf(x, y, z)];
    for (; point >= 0; point = this.#next.values[point]) {
      if (points[3 * point] === x && points[3 * point + 1] === y && points[3 * point + 2] === z) return point;
    }
    return -1;
  }

  #near(x: number, y: number, z: number): number {
    const points = this.#points.values;
    const reach = this.tolerance;
    let nearest = -1;
    let least = reach * reach;
    for (let corner = 0; corner < 8; corner++) {
      const cx = Math.floor((x + (corner & 1 ? reach : -reach)) / this.#cell);
      const cy = Math.floor((y + (corner & 2 ? reach : -reach)) / this.#cell);
      const cz = Math.floor((z + (corner & 4 ? reach : -reach)) / this.#cell);
      let point = this.#buckets[mix(cx | 0, cy | 0, cz | 0) & (this.#buckets.length - 1)];
      for (; point >= 0; point = this.#next.values[point]) {
        const [ex, ey, ez] = [points[3 * point] - x, points[3 * point + 1] - y, points[3 * point + 2] - z];
        const square = ex * ex + ey * ey + ez * ez;
        if (square < least || (square === least && nearest < 0)) {
          least = square;
          nearest = point;
        }
      }
    }
    return nearest;
  }

  #bucketOf(x: number, y: number, z: number): number {
    const mask = this.#buckets.length - 1;
    if (this.tolerance > 0) {
      const cell = (value: number) => Math.floor(value / this.#cell) | 0;
      return mix(cell(x), cell(y), cell(z)) & mask;
    }
    this.#bits[0] = x;
    this.#bits[1] = y;
    this.#bits[2] = z;
    const words = this.#words;
    return (
      mix(words[0] ^ Math.imul(words[1], 31), words[2] ^ Math.imul(words[3], 31), words[4] ^ Math.imul(words[5], 31)) &
      mask
    );
  }

  #rehash(): void {
    this.#buckets = new Int32Array(4 * this.#buckets.length).fill(-1);
    const points = this.#points.values;
    for (let point = 0; point < this.count; point++) {
      const bucket = this.#bucketOf(points[3 * point], points[3 * point + 1], points[3 * point + 2]);
      this.#next.values[point] = this.#buckets[bucket];
      this.#buckets[bucket] = point;
    }
  }
}

function mix(a: number, b: number, c: number): number {
  let hash = Math.imul(a, 0x9e3779b1) ^ Math.imul(b, 0x85ebca6b) ^ Math.imul(c, 0xc2b2ae35);
  hash = Math.imul(hash ^ (hash >>> 15), 0x2c1b3c6d);
  return hash ^ (hash >>> 13);
}
