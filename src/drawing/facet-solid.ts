/** A convex solid as a convex polyhedron. */
import type { Vector3 } from '../design/description.js';
import type { FacePatch, SolidFace } from '../scene/convex-solid.js';
import type { NamedSolid } from '../scene/place-parts.js';
import { add, dot, frameAbout, length, normalise, scale, subtract } from '../scene/vector.js';
import { type Facet, facetNormal, type HalfSpace, type SideMark, splitFacet } from './facet.js';
import { wholeDishFacets } from './facet-dish.js';
import { facetPatch } from './facet-patch.js';

export interface FacetedFace {
  /** Within the part: 'top', 'bore.side'. */
  readonly name: string;
  readonly facets: readonly Facet[];
}

export interface FacetedSolid {
  readonly faces: readonly FacetedFace[];
  /** None: it cuts nothing. */
  readonly planes: readonly HalfSpace[];
  readonly low: Vector3;
  readonly high: Vector3;
}

/** Corners this share of the solid's size off a plane lie in it. */
const RELATIVE_TOLERANCE = 1e-9;

/** @param round facets round a full turn, a multiple of 4 */
export function facetSolid({ prefix, solid }: NamedSolid, round: number): FacetedSolid {
  const shown = solid.faces.map((face) => ({ face, patch: shownPatch(face, solid.faces) }));
  const bounds = shown.map(({ face, patch }) => boundsOf(face, patch, round));
  const own = shown.map(({ patch }) => (patch === null ? [] : facetPatch(patch, round)));
  const [low, high] = extremes(own.flat());
  const rebuilt = shown.map(({ patch }, i) =>
    patch !== null && reaches(patch, solid.faces) ? wallFacets(i, patch, bounds, shown, low, high) : own[i],
  );
  const [lowest, highest] = extremes(rebuilt.flat());
  return {
    faces: shown.flatMap(({ face, patch }, i) =>
      patch === null ? [] : [{ name: prefix + face.name, facets: rebuilt[i] }],
    ),
    planes: bounds.flat(),
    low: lowest,
    high: highest,
  };
}

/** What of a face is drawn: the patch of the whole where several surfaces stand for it; of the others of its name nothing. */
function shownPatch({ name, patch, whole, wall }: SolidFace, all: readonly SolidFace[]): FacePatch | null {
  if (whole !== undefined) return whole;
  if (all.some((other) => other.name === name && other.whole !== undefined)) return null;
  return patch ?? wall ?? null;
}

/** A mesh need not be convex and bounds nothing: what it hides is drawn all the same. */
function boundsOf({ surface }: SolidFace, patch: FacePatch | null, round: number): HalfSpace[] {
  if (surface.kind === 'mesh') return [];
  if (surface.kind === 'plane') return [surface];
  if (patch === null) return [];
  const facets = patch.kind === 'dish' ? wholeDishFacets(patch, round) : facetPatch(patch, round);
  return facets.map((facet) => {
    const normal = facetNormal(facet);
    return { normal, offset: dot(normal, facet.corners[0]) };
  });
}

/** Whether a patch may reach beyond its solid, as the walls of lenses and troughs do: then it ends where the other faces are. */
function reaches(patch: FacePatch, faces: readonly SolidFace[]): boolean {
  if (patch.kind !== 'polygon' && patch.kind !== 'side') return false;
  return faces.some(
    ({ patch: other, wall, surface }) =>
      wall !== undefined ||
      (other === null && surface.kind === 'plane' && patch.kind === 'polygon') ||
      (other?.kind === 'dish' && (other.ruled !== null || other.outline.kind === 'strip')),
  );
}

type Shown = readonly { readonly face: SolidFace; readonly patch: FacePatch | null }[];

/** Facets in the planes of a flat face or a cylinder, as far as the other planes of the solid let them reach. */
function wallFacets(
  index: number,
  patch: FacePatch,
  bounds: readonly (readonly HalfSpace[])[],
  shown: Shown,
  low: Vector3,
  high: Vector3,
): Facet[] {
  const size = length(subtract(high, low));
  const middle = scale(add(low, high), 0.5);
  return bounds[index].flatMap((plane) => {
    let rest: Facet | null = square(plane, middle, 2 * size);
    for (let i = 0; i < bounds.length; i++) {
      const mark: SideMark = i === index || shown[i].patch === null ? 'mesh' : 'rim';
      for (const other of bounds[i]) {
        if (other === plane || rest === null) continue;
        const kept: Facet | null = splitFacet(rest, other, RELATIVE_TOLERANCE * size).inside;
        rest = kept && { ...kept, sides: kept.sides.map((side) => (side === 'cut' ? mark : side)) };
      }
    }
    return rest === null ? [] : [{ ...rest, normals: rest.corners.map((corner) => wallNormal(patch, plane, corner)) }];
  });
}

function square({ normal, offset }: HalfSpace, middle: Vector3, half: number): Facet {
  const { u, v } = frameAbout(normal);
  const centre = add(middle, scale(normal, offset - dot(middle, normal)));
  const around = [
    [-half, -half],
    [half, -half],
    [half, half],
    [-half, half],
  ];
  const corners = around.map(([a, b]): Vector3 => add(centre, add(scale(u, a), scale(v, b))));
  return { corners, normals: corners.map(() => normal), sides: corners.map(() => 'rim') };
}

function wallNormal(patch: FacePatch, plane: HalfSpace, corner: Vector3): Vector3 {
  if (patch.kind !== 'side') return plane.normal;
  const from = subtract(corner, patch.base);
  const radial = normalise(subtract(from, scale(patch.axis, dot(from, patch.axis))));
  return normalise(add(scale(radial, patch.height), scale(patch.axis, patch.bottomRadius - patch.topRadius)));
}

function extremes(facets: readonly Facet[]): [low: Vector3, high: Vector3] {
  const corners = facets.flatMap((facet) => facet.corners);
  const extreme = (pick: (...values: number[]) => number, start: number): Vector3 =>
    corners.reduce<Vector3>(
      (so, corner) => [pick(so[0], corner[0]), pick(so[1], corner[1]), pick(so[2], corner[2])],
      [start, start, start],
    );
  return [extreme(Math.min, Number.POSITIVE_INFINITY), extreme(Math.max, Number.NEGATIVE_INFINITY)];
}
