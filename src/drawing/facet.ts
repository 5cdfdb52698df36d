/** Flat convex pieces of a face, with the smooth normals of the face at their corners. */
import type { Vector3 } from '../design/description.js';
import { add, cross, dot, length, normalise, scale, subtract } from '../scene/vector.js';

/** What a side of a facet is on the drawing. */
export type SideMark =
  /** Only the mesh: not drawn. */
  | 'mesh'
  /** Rim or crease of its face. */
  | 'rim'
  /** Made by the cut under way. */
  | 'cut';

export interface Facet {
  /** Counterclockwise as seen from outside the material. */
  readonly corners: readonly Vector3[];
  readonly normals: readonly Vector3[];
  /** Of the side from each corner to the next. */
  readonly sides: readonly SideMark[];
}

export type Segment = readonly [Vector3, Vector3];

/** Vector area of a convex polygon, mm²: its length is the area, its direction the normal. */
export function vectorArea(corners: readonly Vector3[]): Vector3 {
  let sum: Vector3 = [0, 0, 0];
  for (let i = 1; i + 1 < corners.length; i++) {
    sum = add(sum, cross(subtract(corners[i], corners[0]), subtract(corners[i + 1], corners[0])));
  }
  return scale(sum, 0.5);
}

export function facetNormal({ corners }: Facet): Vector3 {
  return normalise(vectorArea(corners));
}

/** Seen from the other side: the wall of a hole instead of the skin of what was taken away. */
export function flipFacet({ corners, normals, sides }: Facet): Facet {
  const last = sides.length - 1;
  return {
    corners: corners.toReversed(),
    normals: normals.map((normal) => scale(normal, -1)).reverse(),
    sides: sides.map((_, i) => sides[(2 * last - i) % sides.length]),
  };
}

/** Marks of a cut that is done become rims. */
export function settleFacet(facet: Facet): Facet {
  return { ...facet, sides: facet.sides.map((side) => (side === 'cut' ? 'rim' : side)) };
}

/** Sides with a mark, as segments. */
export function sidesMarked({ corners, sides }: Facet, mark: SideMark): Segment[] {
  return corners.flatMap((corner, i): Segment[] =>
    sides[i] === mark ? [[corner, corners[(i + 1) % corners.length]]] : [],
  );
}

/** Inside: normal · p ≤ offset. */
export interface HalfSpace {
  readonly normal: Vector3;
  readonly offset: number;
}

/** The parts of a facet on either side of a plane that crosses it; null where nothing lies. */
export function splitFacet(
  facet: Facet,
  { normal, offset }: HalfSpace,
  tolerance: number,
): { inside: Facet | null; outside: Facet | null } {
  const distances = facet.corners.map((corner) => dot(corner, normal) - offset);
  if (distances.every((d) => d <= tolerance)) return { inside: facet, outside: null };
  if (distances.every((d) => d >= -tolerance)) return { inside: null, outside: facet };
  return {
    inside: keepSide(
      facet,
      distances.map((d) => -d),
      tolerance,
      'cut',
    ),
    outside: keepSide(facet, distances, tolerance, 'mesh'),
  };
}

/** What lies where the distance is positive; its new side gets `mark`. */
function keepSide(facet: Facet, distances: readonly number[], tolerance: number, mark: SideMark): Facet | null {
  const corners: Vector3[] = [];
  const normals: Vector3[] = [];
  const sides: SideMark[] = [];
  const put = (corner: Vector3, normal: Vector3, side: SideMark) => {
    corners.push(corner);
    normals.push(normal);
    sides.push(side);
  };
  facet.corners.forEach((corner, i) => {
    const next = (i + 1) % facet.corners.length;
    const [here, there] = [distances[i], distances[next]];
    if (here >= -tolerance) {
      // A corner on the plane, after which the outline runs off it, begins the new side.
      put(corner, facet.normals[i], here <= tolerance && there < -tolerance ? mark : facet.sides[i]);
      if (here > tolerance && there < -tolerance) put(...between(facet, i, next, here / (here - there)), mark);
    } else if (there > tolerance) {
      put(...between(facet, i, next, here / (here - there)), facet.sides[i]);
    }
  });
  return corners.length < 3 ? null : { corners, normals, sides };
}

function between(facet: Facet, i: number, next: number, share: number): [Vector3, Vector3] {
  const mix = (a: Vector3, b: Vector3): Vector3 => add(scale(a, 1 - share), scale(b, share));
  const normal = mix(facet.normals[i], facet.normals[next]);
  return [mix(facet.corners[i], facet.corners[next]), length(normal) > 1e-9 ? normalise(normal) : facet.normals[i]];
}
