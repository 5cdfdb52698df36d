/**
 * A convex solid as the intersection of half-spaces and insides of quadrics, one boundary per face, in design coordinates; or a mesh.
 */
import type { Vector3 } from '../design/description.js';
import type { FacetPatch } from './mesh/facet-patch.js';
import type { PlacedMesh } from './mesh/placed-mesh.js';

export type BoundarySurface =
  /** Inside: normal · p ≤ offset; the normal is a unit vector that looks out. */
  | { readonly kind: 'plane'; readonly normal: Vector3; readonly offset: number }
  | { readonly kind: 'sphere'; readonly centre: Vector3; readonly radius: number }
  | { readonly kind: 'cylinder'; readonly point: Vector3; readonly axis: Vector3; readonly radius: number }
  /** Both nappes: radius = |slope · height above the apex|; end planes keep the solid in one of them. */
  | { readonly kind: 'cone'; readonly apex: Vector3; readonly axis: Vector3; readonly slope: number }
  /** The one surface of a mesh, named by its group; the mesh is the same object for all of them. */
  | { readonly kind: 'mesh'; readonly mesh: PlacedMesh; readonly group: number }
  /**
   * Conicoid with its vertex at `vertex` and the axis looking out there. Inside: ρ² + (1 + conic)·w² < 2·radius·w, with w the depth below
   * the vertex and ρ the distance from the axis, not counting what runs along `ruled`. A hyperboloid (conic < −1) has a second sheet, which
   * a plane must keep out.
   */
  | {
      readonly kind: 'conic';
      readonly vertex: Vector3;
      readonly axis: Vector3;
      readonly radius: number;
      readonly conic: number;
      readonly ruled: Vector3 | null;
    };

/** The bounded patch a face is, for areas, sample points and maps. Normals look out of the solid. */
export type FacePatch =
  | {
      readonly kind: 'polygon';
      readonly corners: readonly Vector3[];
      readonly normal: Vector3;
      readonly u: Vector3;
      readonly v: Vector3;
    }
  | {
      readonly kind: 'disc';
      readonly centre: Vector3;
      readonly radius: number;
      readonly normal: Vector3;
      readonly u: Vector3;
      readonly v: Vector3;
    }
  /** Side of a cylinder or cone frustum: bottom centre, axis from bottom to top, radius at bottom and top. */
  | {
      readonly kind: 'side';
      readonly base: Vector3;
      readonly axis: Vector3;
      readonly bottomRadius: number;
      readonly topRadius: number;
      readonly height: number;
      readonly u: Vector3;
      readonly v: Vector3;
    }
  /** Part of a sphere with (p − centre) · axis ≥ from; `from` = −radius is the whole sphere. */
  | {
      readonly kind: 'zone';
      readonly centre: Vector3;
      readonly radius: number;
      readonly axis: Vector3;
      readonly from: number;
      readonly u: Vector3;
      readonly v: Vector3;
    }
  | FacetPatch
  /**
   * Piece of a conicoid as seen along its axis: the points vertex + a·u + b·v − sag·axis with (a, b) in the outline;
   * sag = ρ²/(radius + √(radius² − (1 + conic)·ρ²)), ρ² = a² + b², without the term of the direction in which it is `ruled`.
   */
  | {
      readonly kind: 'dish';
      readonly vertex: Vector3;
      readonly axis: Vector3;
      readonly radius: number;
      readonly conic: number;
      readonly ruled: 'u' | 'v' | null;
      readonly outline: DishOutline;
      readonly u: Vector3;
      readonly v: Vector3;
    }
  /** A line of straight pieces turned about an axis: height above the base and radius at each of its corners, upwards. */
  | {
      readonly kind: 'profile';
      readonly base: Vector3;
      readonly axis: Vector3;
      readonly stations: readonly (readonly [height: number, radius: number])[];
      readonly u: Vector3;
      readonly v: Vector3;
    }
  /** Patches under one name, such as the lenslets of an array. */
  | {
      readonly kind: 'group';
      readonly members: readonly FacePatch[];
      readonly normal: Vector3;
      readonly u: Vector3;
      readonly v: Vector3;
    };

export type DishOutline =
  | { readonly kind: 'disc'; readonly radius: number }
  /** from ≤ a ≤ to, |b| ≤ halfWidth(a). */
  | {
      readonly kind: 'strip';
      readonly from: number;
      readonly to: number;
      readonly halfWidth: (a: number) => number;
    };

export interface SolidFace {
  readonly name: string;
  readonly surface: BoundarySurface;
  /** null: keeps the solid in bounds, or touches it in a line only, and goes by the name of the face there. */
  readonly patch: FacePatch | null;
  /** Patch of the whole face where this is one of several surfaces that stand for it; on the first of them. */
  readonly whole?: FacePatch;
  /** Where `patch` is null but the surface bounds the solid in an area: the patch of the same surface in another body, for drawings. */
  readonly wall?: FacePatch;
}

export interface ConvexSolid {
  readonly faces: readonly SolidFace[];
}
