import { INSIDE } from '../../design/shape-faces.js';
import type { ConvexSolid } from '../convex-solid.js';
import type { ShapePiece } from './make-solid.js';

/** A shape with a bore of the same height through it: the ends of the bore lie in those of the shape. */
export function tubePiece(outer: ConvexSolid, bore: ConvexSolid): ShapePiece {
  const faces = bore.faces.map((face) =>
    face.name === 'bottom' || face.name === 'top' ? { ...face, patch: null } : { ...face, name: INSIDE + face.name },
  );
  return { body: outer, minus: [{ faces }] };
}
