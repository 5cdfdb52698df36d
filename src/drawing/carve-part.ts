/** The skin of a part: holes taken out of its pieces, and of its pieces what lies inside another taken away. */
import type { PlacedPart } from '../scene/place-parts.js';
import { type Facet, flipFacet, type Segment, settleFacet, sidesMarked } from './facet.js';
import { type FacetedFace, type FacetedSolid, facetSolid } from './facet-solid.js';
import { type Contact, partFacet, segmentOutside } from './part-facet.js';

export interface SkinFace {
  readonly name: string;
  /** They look out of the material. */
  readonly facets: readonly Facet[];
  /** Rims that cuts have left in the face, beside those of its facets. */
  readonly seams: readonly Segment[];
}

/** A piece as polyhedra. */
export interface CarvedPiece {
  readonly body: FacetedSolid;
  readonly holes: readonly FacetedSolid[];
}

/** @param round facets round a full turn */
export function facetPieces({ pieces }: PlacedPart, round: number): CarvedPiece[] {
  return pieces.map(({ body, minus }) => ({
    body: facetSolid(body, round),
    holes: minus.map((hole) => facetSolid(hole, round)),
  }));
}

/**
 * The faces of a part, in the order of its pieces; one that is wholly cut away has no facets.
 * @param tolerance mm within which a facet lies in a plane
 */
export function carvePart(pieces: readonly CarvedPiece[], tolerance: number): SkinFace[] {
  const near = neighbours(pieces, tolerance);
  const faces = new Map<string, { name: string; facets: Facet[]; seams: Segment[] }>();
  pieces.forEach((piece, i) => {
    for (const face of carvePiece(piece, tolerance)) {
      const { name, facets, seams } = near(i).reduce((so, j) => outsidePiece(so, pieces[j], j < i, tolerance), face);
      const known = faces.get(name) ?? { name, facets: [], seams: [] };
      faces.set(name, known);
      for (const facet of facets) known.facets.push(facet);
      for (const seam of seams) known.seams.push(seam);
    }
  });
  return [...faces.values()];
}

/** Of each piece the others whose boxes touch its own, in order. */
function neighbours(pieces: readonly CarvedPiece[], tolerance: number): (i: number) => number[] {
  return (i) => {
    const { low, high } = pieces[i].body;
    return pieces.flatMap(({ body }, j) => {
      const apart = ([0, 1, 2] as const).some(
        (axis) => body.low[axis] > high[axis] + tolerance || body.high[axis] < low[axis] - tolerance,
      );
      return i === j || apart ? [] : [j];
    });
  };
}

/** Of a part that a later one overlaps: what the later one leaves of it. */
export function outsidePart(face: SkinFace, later: readonly CarvedPiece[], tolerance: number): SkinFace {
  return later.reduce((so, piece) => outsidePiece(so, piece, true, tolerance, 'out'), face);
}

function carvePiece({ body, holes }: CarvedPiece, tolerance: number): SkinFace[] {
  const skin = body.faces.map((face) => holes.reduce((so, hole) => drill(so, hole, tolerance), bare(face)));
  const walls = holes.flatMap((hole, i) =>
    hole.faces.map((face) => {
      const others = holes.filter((_, j) => j !== i);
      return others.reduce(
        // Where two holes share a wall it is open on both sides, or drawn once.
        (so, other) => drill(so, other, tolerance, { same: holes.indexOf(other) < i ? 'in' : 'out', opposed: 'in' }),
        within(face, body, tolerance),
      );
    }),
  );
  return [...skin, ...walls.map((wall) => ({ ...wall, facets: wall.facets.map(flipFacet) }))];
}

const bare = ({ name, facets }: FacetedFace): SkinFace => ({ name, facets, seams: [] });

/** A face of a body that is flush with the end of a hole is open there; one that only touches the hole stays. */
const DRILLED: Contact = { same: 'in', opposed: 'out' };

function drill(face: SkinFace, hole: FacetedSolid, tolerance: number, contact = DRILLED): SkinFace {
  const facets: Facet[] = [];
  const seams = face.seams.flatMap((seam) => segmentOutside(seam, hole, tolerance));
  for (const facet of face.facets) {
    const { inside, outside } = partFacet(facet, hole, contact, tolerance);
    facets.push(...outside);
    if (inside !== null) seams.push(...sidesMarked(inside, 'cut'));
  }
  return { name: face.name, facets, seams };
}

/** The walls of a hole as far as they lie within the body; where they lie in its skin there is nothing to see. */
function within({ name, facets }: FacetedFace, body: FacetedSolid, tolerance: number): SkinFace {
  if (body.planes.length === 0) return { name, facets: facets.map(settleFacet), seams: [] };
  const kept = facets.flatMap((facet) => {
    const { inside } = partFacet(facet, body, { same: 'out', opposed: 'out' }, tolerance);
    return inside === null ? [] : [settleFacet(inside)];
  });
  return { name, facets: kept, seams: [] };
}

/**
 * A face without what lies inside the material of another piece.
 * @param yields where both have the same face, the other one is drawn
 * @param opposed whether a face stays that the other piece touches from outside
 */
function outsidePiece(
  face: SkinFace,
  { body, holes }: CarvedPiece,
  yields: boolean,
  tolerance: number,
  opposed: 'in' | 'out' = 'in',
): SkinFace {
  const facets: Facet[] = [];
  const seams = face.seams.flatMap((seam) => segmentOutside(seam, body, tolerance));
  for (const facet of face.facets) {
    const { inside, outside } = partFacet(facet, body, { same: yields ? 'in' : 'out', opposed }, tolerance);
    facets.push(...outside);
    if (inside === null) continue;
    let buried = [inside];
    for (const hole of holes) {
      buried = buried.flatMap((one) => {
        // Against the wall of a hole the material lies on the other side.
        const own = partFacet(
          one,
          hole,
          { same: opposed === 'out' ? 'in' : 'out', opposed: yields ? 'out' : 'in' },
          tolerance,
        );
        if (own.inside !== null) facets.push(settleFacet(own.inside));
        return [...own.outside];
      });
    }
    for (const one of buried) seams.push(...sidesMarked(one, 'cut'));
  }
  return { name: face.name, facets, seams };
}
