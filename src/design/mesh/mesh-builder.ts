/** Facets of a mesh file on their way into arrays: units, welding and names of groups, the same for every format. */
import { largestCoordinate, type MeshFacets } from '../../numerics/mesh/close-mesh.js';
import { GrowingIntegers } from '../../numerics/mesh/growing-array.js';
import { VertexWelder } from '../../numerics/mesh/vertex-welder.js';

/** Nothing in a light engine is larger than 100 m. */
export const LARGEST_COORDINATE_MM = 1e5;
const LONGEST_NAME = 60;

export class MeshBuilder {
  readonly #welder: VertexWelder;
  readonly #corners: GrowingIntegers;
  readonly #group: GrowingIntegers;
  readonly #groups = new Map<string, number>();
  #current = 0;
  /** Names as written, so that each is tidied but once. */
  readonly #tidied = new Map<string, number>();

  /**
   * @param unit mm per unit of the file
   * @param weld mm; 0 welds equal corners only
   * @param expected a guess at the number of facets
   */
  constructor(
    readonly unit: number,
    weld: number,
    expected: number,
  ) {
    this.#welder = new VertexWelder(weld, Math.ceil(expected / 2));
    this.#corners = new GrowingIntegers(3 * expected);
    this.#group = new GrowingIntegers(expected);
  }

  get facets(): number {
    return this.#group.length;
  }

  /** Number of the point there, in units of the file; −1 when it is no number or too far away. */
  point(x: number, y: number, z: number): number {
    const [px, py, pz] = [x * this.unit, y * this.unit, z * this.unit];
    // What is no number fails every comparison.
    if (!(Math.abs(px) <= LARGEST_COORDINATE_MM)) return -1;
    if (!(Math.abs(py) <= LARGEST_COORDINATE_MM) || !(Math.abs(pz) <= LARGEST_COORDINATE_MM)) return -1;
    return this.#welder.add(px, py, pz);
  }

  /** Largest coordinate, mm. */
  get size(): number {
    return largestCoordinate(this.#welder.points.subarray(0, 3 * this.#welder.count));
  }

  /** Coordinates of all points so far, [point · 3], in mm. Read it anew after `point`. */
  get coordinates(): Float64Array {
    return this.#welder.points;
  }

  /** Facets from here on belong to this group. */
  startGroup(name: string): void {
    let group = this.#tidied.get(name);
    if (group === undefined) {
      const tidy = groupName(name);
      group = this.#groups.get(tidy) ?? this.#groups.size;
      this.#groups.set(tidy, group);
      this.#tidied.set(name, group);
    }
    this.#current = group;
  }

  facet(a: number, b: number, c: number): void {
    if (this.#groups.size === 0) this.startGroup('');
    this.#corners.push(a);
    this.#corners.push(b);
    this.#corners.push(c);
    this.#group.push(this.#current);
  }

  /** Groups without a facet are left out. */
  finish(): MeshFacets {
    const group = this.#group.finish();
    const names = [...this.#groups.keys()];
    const used = new Uint8Array(names.length);
    for (const each of group) used[each] = 1;
    const renumbered = Int32Array.from(names, (_, i) => used.subarray(0, i).reduce((sum, one) => sum + one, 0));
    return {
      points: this.#welder.finish(),
      corners: this.#corners.finish(),
      group: group.map((each) => renumbered[each]),
      groups: names.filter((_, i) => used[i] === 1),
    };
  }
}

/** A name of a file as a name of a face: letters and digits with hyphens between; 'surface' for none. */
export function groupName(written: string): string {
  const plain = written
    .normalize('NFC')
    .replace(/[^\p{L}\p{N}_]+/gu, '-')
    .slice(0, LONGEST_NAME - 6)
    .replace(/^-+|-+$/g, '');
  if (plain === '') return 'surface';
  return /^[\p{L}_]/u.test(plain) && plain !== 'others' ? plain : `group-${plain}`;
}
