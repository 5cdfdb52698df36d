import type { ShapeDescription } from '../../design/description.js';
import type { BoundarySurface, ConvexSolid, FacePatch } from '../convex-solid.js';
import { meshSolid, moveMeshSolid } from '../mesh/mesh-solid.js';
import { dot, type Matrix, moveDirection, movePoint, scale } from '../vector.js';
import { concentratorSolid, paraboloidSolid } from './bowl-shapes.js';
import { boxSolid, frustumSolid, prismSolid } from './flat-shapes.js';
import { lensPieces } from './lens-shape.js';
import { capSolid, coneSolid, cylinderSolid, sphereSolid } from './round-shapes.js';
import { tubePiece } from './tube-shape.js';

/** A convex body minus other convex solids. */
export interface ShapePiece {
  readonly body: ConvexSolid;
  readonly minus: readonly ConvexSolid[];
}

/** The pieces whose union a shape is, in its own frame. */
export function makePieces(shape: ShapeDescription): readonly ShapePiece[] {
  switch (shape.kind) {
    case 'lens':
      return lensPieces(shape);
    case 'tube':
      return [tubePiece(makeSolid(shape.outer), makeSolid(shape.bore))];
    default:
      return [{ body: makeSolid(shape), minus: [] }];
  }
}

/** The convex solid of a convex shape in its own frame. */
export function makeSolid(shape: Exclude<ShapeDescription, { readonly kind: 'lens' | 'tube' }>): ConvexSolid {
  switch (shape.kind) {
    case 'box':
      return boxSolid(shape);
    case 'prism':
      return prismSolid(shape);
    case 'cylinder':
      return cylinderSolid(shape);
    case 'cone':
      return coneSolid(shape);
    case 'sphere':
      return sphereSolid(shape);
    case 'cap':
      return capSolid(shape);
    case 'frustum':
      return frustumSolid(shape);
    case 'paraboloid':
      return paraboloidSolid(shape);
    case 'concentrator':
      return concentratorSolid(shape);
    case 'mesh':
      return meshSolid(shape.mesh);
  }
}

/** The same solid after a rigid motion. */
export function moveSolid(solid: ConvexSolid, matrix: Matrix): ConvexSolid {
  if (solid.faces[0].surface.kind === 'mesh') return moveMeshSolid(solid, matrix);
  return {
    faces: solid.faces.map(({ name, surface, patch, whole, wall }) => ({
      name,
      surface: moveSurface(surface, patch, matrix),
      patch: patch && movePatch(patch, matrix),
      ...(whole === undefined ? {} : { whole: movePatch(whole, matrix) }),
      ...(wall === undefined ? {} : { wall: movePatch(wall, matrix) }),
    })),
  };
}

function moveSurface(surface: BoundarySurface, patch: FacePatch | null, matrix: Matrix): BoundarySurface {
  switch (surface.kind) {
    case 'plane': {
      const normal = moveDirection(matrix, surface.normal);
      const on =
        patch?.kind === 'polygon'
          ? patch.corners[0]
          : patch?.kind === 'disc'
            ? patch.centre
            : scale(surface.normal, surface.offset);
      return { kind: 'plane', normal, offset: dot(normal, movePoint(matrix, on)) };
    }
    case 'sphere':
      return { ...surface, centre: movePoint(matrix, surface.centre) };
    case 'cylinder':
      return { ...surface, point: movePoint(matrix, surface.point), axis: moveDirection(matrix, surface.axis) };
    case 'cone':
      return { ...surface, apex: movePoint(matrix, surface.apex), axis: moveDirection(matrix, surface.axis) };
    case 'conic':
      return {
        ...surface,
        vertex: movePoint(matrix, surface.vertex),
        axis: moveDirection(matrix, surface.axis),
        ruled: surface.ruled && moveDirection(matrix, surface.ruled),
      };
    case 'mesh':
      throw new Error('a mesh moves as a whole');
  }
}

function movePatch(patch: FacePatch, matrix: Matrix): FacePatch {
  const frame = { u: moveDirection(matrix, patch.u), v: moveDirection(matrix, patch.v) };
  switch (patch.kind) {
    case 'polygon': {
      const corners = patch.corners.map((corner) => movePoint(matrix, corner));
      return { ...patch, ...frame, corners, normal: moveDirection(matrix, patch.normal) };
    }
    case 'disc':
      return {
        ...patch,
        ...frame,
        centre: movePoint(matrix, patch.centre),
        normal: moveDirection(matrix, patch.normal),
      };
    case 'side':
      return { ...patch, ...frame, base: movePoint(matrix, patch.base), axis: moveDirection(matrix, patch.axis) };
    case 'profile':
      return { ...patch, ...frame, base: movePoint(matrix, patch.base), axis: moveDirection(matrix, patch.axis) };
    case 'dish':
      return { ...patch, ...frame, vertex: movePoint(matrix, patch.vertex), axis: moveDirection(matrix, patch.axis) };
    case 'group': {
      const members = patch.members.map((member) => movePatch(member, matrix));
      return { ...patch, ...frame, members, normal: moveDirection(matrix, patch.normal) };
    }
    case 'zone':
      return { ...patch, ...frame, centre: movePoint(matrix, patch.centre), axis: moveDirection(matrix, patch.axis) };
    case 'facets':
      throw new Error('a mesh moves as a whole');
  }
}
