import type { ShapeDescription } from '../../design/description.js';
import type { BoundarySurface, ConvexSolid, FacePatch } from '../convex-solid.js';
import { meshSolid, moveMeshSolid } from '../mesh/mesh-solid.js';
import { dot, type Matrix, moveDirection, movePoint } from '../vector.js';
import { boxSolid, prismSolid } from './flat-shapes.js';
import { capSolid, coneSolid, cylinderSolid, sphereSolid } from './round-shapes.js';

/** The convex solid of a shape in its own frame. */
export function makeSolid(shape: ShapeDescription): ConvexSolid {
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
    case 'mesh':
      return meshSolid(shape.mesh);
  }
}

/** The same solid after a rigid motion. */
export function moveSolid(solid: ConvexSolid, matrix: Matrix): ConvexSolid {
  if (solid.faces[0].surface.kind === 'mesh') return moveMeshSolid(solid, matrix);
  return {
    faces: solid.faces.map(({ name, surface, patch }) => ({
      name,
      surface: moveSurface(surface, patch, matrix),
      patch: movePatch(patch, matrix),
    })),
  };
}

function moveSurface(surface: BoundarySurface, patch: FacePatch, matrix: Matrix): BoundarySurface {
  switch (surface.kind) {
    case 'plane': {
      const normal = moveDirection(matrix, surface.normal);
      const on = patch.kind === 'polygon' ? patch.corners[0] : patch.kind === 'disc' ? patch.centre : null;
      if (on === null) throw new Error('a flat face has a flat patch');
      return { kind: 'plane', normal, offset: dot(normal, movePoint(matrix, on)) };
    }
    case 'sphere':
      return { ...surface, centre: movePoint(matrix, surface.centre) };
    case 'cylinder':
      return { ...surface, point: movePoint(matrix, surface.point), axis: moveDirection(matrix, surface.axis) };
    case 'cone':
      return { ...surface, apex: movePoint(matrix, surface.apex), axis: moveDirection(matrix, surface.axis) };
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
    case 'zone':
      return { ...patch, ...frame, centre: movePoint(matrix, patch.centre), axis: moveDirection(matrix, patch.axis) };
    case 'facets':
      throw new Error('a mesh moves as a whole');
  }
}
