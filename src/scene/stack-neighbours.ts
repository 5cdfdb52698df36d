/** Which media can meet at faces that carry a stack: tables are made for these, and no others. */
import type { Vector3 } from '../design/description.js';
import type { SceneFace } from './compile-solids.js';
import { patchNormal, patchRange } from './face-patch.js';
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
  const extents = parts.map((part) => extentOf(partFaces(part).map(({ patch }) => patch)));
  const pairs = new Map<string, MediaPair>();
  const add = (outside: string, inside: string) => pairs.set(`${outside}\n${inside}`, { outside, inside });
  for (const face of faces) {
    const { part, patch } = face;
    const inside = part.description.medium;
    const extent = extentOf([patch]);
    if (!parts.some((other, i) => other !== part && isBox(other, extents[i]) && covers(extents[i], face, extent))) {
      add(surroundings, inside);
    }
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

/** A solid box along the axes: it fills its own bounding box. */
function isBox({ description: { pieces } }: PlacedPart, extent: Extent): boolean {
  const [piece] = pieces;
  if (pieces.length !== 1 || piece.minus.length > 0 || piece.shape.kind !== 'box') return false;
  const volume = piece.shape.size.reduce((product, length) => product * length, 1);
  const bounding = extent.reduce((product, [low, high]) => product * (high - low), 1);
  return bounding < volume * (1 + 1e-12);
}

/** Whether a box lies on all of the outside of a flat face along the axes. To rounding: surfaces that near are one. */
function covers(box: Extent, { patch, hollow }: SceneFace, face: Extent): boolean {
  const slack = 1e-12 * Math.max(...box.map(([low, high]) => high - low));
  const flat = face.findIndex(([low, high]) => high - low <= slack);
  if (flat < 0) return false;
  const outward = patchNormal(patch)[flat] * (hollow ? -1 : 1);
  return box.every(([low, high], i) => {
    if (i !== flat) return low <= face[i][0] + slack && high >= face[i][1] - slack;
    const at = face[i][0];
    return outward > 0 ? low <= at + slack && high > at + slack : high >= at - slack && low < at - slack;
  });
}
