/** Names of the faces of shapes and parts, as promised in `ShapeDescription`. */
import type { PieceDescription, ShapeDescription } from './description.js';

/** Before the names of the walls of a bore. */
export const INSIDE = 'inside-';

const sidesOf = (shape: ShapeDescription): readonly string[] =>
  shapeFaces(shape).filter((name) => name !== 'bottom' && name !== 'top');

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
    case 'frustum':
      return [...shape.sides, 'bottom', 'top'];
    case 'tube':
      return [...shapeFaces(shape.outer), ...sidesOf(shape.bore).map((side) => INSIDE + side)];
    case 'lens':
      return shape.outline.kind === 'disc'
        ? ['edge', 'front', 'back']
        : ['left', 'right', 'bottom', 'top', 'front', 'back'];
    case 'paraboloid':
      return ['bowl', 'top'];
    case 'concentrator':
      return [...(shape.form === 'round' ? ['wall'] : ['left', 'right', 'front', 'back']), 'bottom', 'top'];
  }
}

/** 'top' for a simple part, 'piece.top' in a union, 'bore.side' and 'piece.bore.side' for what is taken away. */
export function pieceFaces({ name, shape, minus }: PieceDescription, outer = ''): readonly string[] {
  const prefix = name === null ? outer : `${outer}${name}.`;
  return [...shapeFaces(shape).map((face) => prefix + face), ...minus.flatMap((hole) => pieceFaces(hole, prefix))];
}
