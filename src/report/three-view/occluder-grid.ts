import type { Occluder } from './occluders.js';
import type { FlatPoint } from './view.js';

const CELLS = 40;

/** Occluders by the squares of the sheet they reach into, so that a line is held against few of them. */
export class OccluderGrid {
  readonly #cells: number[][] = Array.from({ length: CELLS * CELLS }, () => []);
  readonly #low: FlatPoint;
  readonly #step: FlatPoint;
  readonly #asked: Int32Array;
  #question = 0;

  constructor(readonly occluders: readonly Occluder[]) {
    const bound = (axis: 0 | 1, end: 'low' | 'high', pick: (a: number, b: number) => number, start: number) =>
      occluders.reduce((so, occluder) => pick(so, occluder[end][axis]), start);
    const lowest = (axis: 0 | 1) => bound(axis, 'low', Math.min, Number.POSITIVE_INFINITY);
    const width = (axis: 0 | 1) => bound(axis, 'high', Math.max, Number.NEGATIVE_INFINITY) - lowest(axis);
    this.#low = [lowest(0), lowest(1)];
    this.#step = [width(0) / CELLS || 1, width(1) / CELLS || 1];
    this.#asked = new Int32Array(occluders.length);
    occluders.forEach(({ low, high }, i) => {
      this.#each(low, high, (cell) => cell.push(i));
    });
  }

  /** Those that may reach into the box, each once. */
  within(low: FlatPoint, high: FlatPoint): Occluder[] {
    const question = ++this.#question;
    const found: Occluder[] = [];
    if (this.occluders.length === 0) return found;
    this.#each(low, high, (cell) => {
      for (const i of cell) {
        if (this.#asked[i] === question) continue;
        this.#asked[i] = question;
        found.push(this.occluders[i]);
      }
    });
    return found;
  }

  #each(low: FlatPoint, high: FlatPoint, visit: (cell: number[]) => void): void {
    const index = (value: number, axis: 0 | 1) =>
      Math.min(CELLS - 1, Math.max(0, Math.floor((value - this.#low[axis]) / this.#step[axis])));
    const [left, right] = [index(low[0], 0), index(high[0], 0)];
    for (let row = index(low[1], 1); row <= index(high[1], 1); row++) {
      for (let column = left; column <= right; column++) visit(this.#cells[row * CELLS + column]);
    }
  }
}
