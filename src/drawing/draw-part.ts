/** A part as the drawing shows it: the triangles and rims of its faces, with their finishes. */
import type { Description, Vector3 } from '../design/description.js';
import type { DrawnFace, DrawnPart } from '../record/drawing.js';
import { patchRange } from '../scene/face-patch.js';
import { givenFinish } from '../scene/given-finish.js';
import { type PlacedPart, partFaces } from '../scene/place-parts.js';
import { length } from '../scene/vector.js';
import type { SkinFace } from './carve-part.js';
import { type Facet, sidesMarked, vectorArea } from './facet.js';
import { joinSegments } from './join-segments.js';

/** Triangles smaller than this, mm², are crumbs of a cut. */
const CRUMB = 1e-12;
/** A polyhedron falls this share of its size short of the round body it stands for, at most. */
const SHORT = 0.005;
const AXES: readonly Vector3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** @param exitFace 'part.face' of the exit, null where it is a plane in the open */
export function drawPart(
  part: PlacedPart,
  faces: readonly SkinFace[],
  description: Description,
  exitFace: string | null,
): DrawnPart {
  const { name, medium } = part.description;
  const filling = description.media.get(medium);
  if (filling === undefined) throw new Error(`medium ${medium} is not in the description`);
  return {
    name,
    medium,
    mediumKind: filling.kind,
    dyed: filling.dyes.length > 0,
    faces: faces.map((face) => {
      const finish = givenFinish(part.description, face.name) ?? 'clear';
      const finishKind = description.finishes.get(finish)?.kind ?? 'clear';
      const full = `${name}.${face.name}`;
      return { name: full, finish, finishKind, isExit: full === exitFace, ...drawFace(face) };
    }),
    bounds: boundsOf(part, faces),
  };
}

function drawFace({ facets, seams }: SkinFace): Pick<DrawnFace, 'triangles' | 'normals' | 'edges'> {
  const triangles: number[] = [];
  const normals: number[] = [];
  for (const facet of facets) {
    for (const [a, b, c] of fan(facet)) {
      triangles.push(...facet.corners[a], ...facet.corners[b], ...facet.corners[c]);
      normals.push(...facet.normals[a], ...facet.normals[b], ...facet.normals[c]);
    }
  }
  const rims = facets.flatMap((facet) => sidesMarked(facet, 'rim'));
  return { triangles, normals, edges: joinSegments([...rims, ...seams]).flat(2) };
}

/** Triangles of a convex facet by the numbers of its corners, crumbs left out. */
function fan({ corners }: Facet): [number, number, number][] {
  return Array.from({ length: corners.length - 2 }, (_, i): [number, number, number] => [0, i + 1, i + 2]).filter(
    ([a, b, c]) => length(vectorArea([corners[a], corners[b], corners[c]])) > CRUMB,
  );
}

/** Box round the part: that of its round bodies, unless holes or other parts have taken an end away. */
function boundsOf(part: PlacedPart, faces: readonly SkinFace[]): DrawnPart['bounds'] {
  const corners = faces.flatMap(({ facets }) => facets.flatMap((facet) => facet.corners));
  const bodies = partFaces(part).filter(({ hollow }) => !hollow);
  const ranges = AXES.map((axis, i): readonly [number, number] => {
    const all = bodies.map(({ patch }) => patchRange(patch, axis));
    const body = [Math.min(...all.map(([low]) => low)), Math.max(...all.map(([, high]) => high))] as const;
    if (corners.length === 0) return body;
    const own = corners.map((corner) => corner[i]);
    const slack = SHORT * (body[1] - body[0]);
    const low = own.reduce((a, b) => Math.min(a, b));
    const high = own.reduce((a, b) => Math.max(a, b));
    return [low - body[0] > slack ? low : body[0], body[1] - high > slack ? high : body[1]];
  });
  return [ranges.map(([low]) => low), ranges.map(([, high]) => high)];
}
