/** Which media can meet at faces that carry a stack: tables are made for these, and no others. */
import type { Vector3 } from '../design/description.js';
import type { SceneFace } from './compile-solids.js';
import { patchRange } from './face-patch.js';
import { type PlacedPart, partFaces } from './place-parts.js';

export interface MediaPair {
  readonly outside: string;
  /** Of the part the face belongs to. */
  readonly inside: string;
}

const AXES: readonly Vector3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];
/** Parts as near as this may touch, mm: far more than surfaces are taken as one at. */
const NEAR = 1e-3;

type Extent = readonly (readonly [number, number])[];

/** Never leaves out a pair that meets: what shares a piece of surface with a face overlaps its bounding box along two axes at least. */
export function stackNeighbours(
  faces: readonly SceneFace[],
  parts: readonly PlacedPart[],
  surroundings: string,
): MediaPair[] {
  const extents = parts.map((part) => extentOf(partFaces(part).map(({ face }) => face.patch)));
  const pairs = new Map<string, MediaPair>();
  const add = (outside: string, inside: string) => pairs.set(`${outside}\n${inside}`, { outside, inside });
  for (const { part, patch } of faces) {
    const inside = part.description.medium;
    add(surroundings, inside);
    const extent = extentOf([patch]);
    parts.forEach((other, i) => {
      if (other !== part && meets(extent, extents[i])) add(other.description.medium, inside);
    });
  }
  return [...pairs.values()];
}

function extentOf(patches: readonly SceneFace['patch'][]): Extent {
  return AXES.map((axis) => {
    const ranges = patches.map((patch) => patchRange(patch, axis));
    return [Math.min(...ranges.map(([low]) => low)), Math.max(...ranges.map(([, high]) => high))] as const;
  });
}

function meets(a: Extent, b: Extent): boolean {
  const overlaps = AXES.map((_, i) => Math.min(a[i][1], b[i][1]) - Math.max(a[i][0], b[i][0]));
  return overlaps.every((length) => length > -NEAR) && overlaps.filter((length) => length > 0).length >= 2;
}
