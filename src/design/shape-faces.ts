/** Names of the faces of shapes and parts, as promised in `ShapeDescription`. */
import type { PieceDescription, ShapeDescription } from './description.js';

export function shapeFaces(shape: ShapeDescription): readonly string[] {
  switch (shape.kind) {
    case 'box':
      return ['left', 'right', 'front', 'back', 'bottom', 'top'];
    case 'prism':
      return [...(shape.sides ?? shape.outline.map((_, i) => `side-${i + 1}`)), 'bottom', 'top'];
    case 'cylinder':
    case 'cone':
      return ['side', 'bottom', 'top'];
    case 'sphere':
      return ['surface'];
    case 'cap':
      return ['dome', 'bottom'];
    case 'mesh':
      return shape.mesh.groups;
  }
}

/** 'top' for a simple part, 'piece.top' in a union, 'bore.side' and 'piece.bore.side' for what is taken away. */
export function pieceFaces({ name, shape, minus }: PieceDescription, outer = ''): readonly string[] {
  const prefix = name === null ? outer : `${outer}${name}.`;
  return [...shapeFaces(shape).map((face) => prefix + face), ...minus.flatMap((hole) => pieceFaces(hole, prefix))];
}
