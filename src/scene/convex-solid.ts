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
  | { readonly kind: 'mesh'; readonly mesh: PlacedMesh; readonly group: number };

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
  | FacetPatch;

export interface SolidFace {
  readonly name: string;
  readonly surface: BoundarySurface;
  readonly patch: FacePatch;
}

export interface ConvexSolid {
  readonly faces: readonly SolidFace[];
}
