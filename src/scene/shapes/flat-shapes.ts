/** Boxes and prisms in their own frames. */
import type { ShapeDescription, Vector2, Vector3 } from '../../design/description.js';
import type { ConvexSolid, SolidFace } from '../convex-solid.js';
import { cross, dot, normalise, snapDirection, subtract } from '../vector.js';

type Box = Extract<ShapeDescription, { kind: 'box' }>;
type Frustum = Extract<ShapeDescription, { kind: 'frustum' }>;
type Prism = Extract<ShapeDescription, { kind: 'prism' }>;

export function boxSolid({ size: [sx, sy, sz] }: Box): ConvexSolid {
  const [x, y] = [sx / 2, sy / 2];
  const outline: Vector2[] = [
    [-x, -y],
    [x, -y],
    [x, y],
    [-x, y],
  ];
  return prismSolid({ kind: 'prism', outline, height: sz, sides: ['front', 'right', 'back', 'left'] });
}

/** Outline counter-clockwise as seen from +z. */
export function prismSolid({ outline, height, sides }: Prism): ConvexSolid {
  const low = -height / 2;
  const high = height / 2;
  const faces: SolidFace[] = outline.map((from, i) => {
    const to = outline[(i + 1) % outline.length];
    const edge = Math.hypot(to[0] - from[0], to[1] - from[1]);
    const along: Vector3 = [(to[0] - from[0]) / edge, (to[1] - from[1]) / edge, 0];
    const normal: Vector3 = [along[1], -along[0], 0];
    const corners: Vector3[] = [
      [...from, low],
      [...to, low],
      [...to, high],
      [...from, high],
    ];
    return flatFace(sides?.[i] ?? `side-${i + 1}`, normal, corners, forwardAxis(along), [0, 0, 1]);
  });
  const x: Vector3 = [1, 0, 0];
  const y: Vector3 = [0, 1, 0];
  faces.push(
    flatFace('bottom', [0, 0, -1], outline.map(([a, b]): Vector3 => [a, b, low]).reverse(), x, y),
    flatFace(
      'top',
      [0, 0, 1],
      outline.map(([a, b]): Vector3 => [a, b, high]),
      x,
      y,
    ),
  );
  return { faces };
}

/** Outlines counter-clockwise as seen from +z, edge i of one parallel to edge i of the other. */
export function frustumSolid({ bottom, top, height, sides }: Frustum): ConvexSolid {
  const [low, high] = [-height / 2, height / 2];
  const faces: SolidFace[] = bottom.map((from, i) => {
    const to = bottom[(i + 1) % bottom.length];
    const corners: Vector3[] = [
      [...from, low],
      [...to, low],
      [...top[(i + 1) % top.length], high],
      [...top[i], high],
    ];
    const along = normalise(subtract(corners[1], corners[0]));
    const normal = snapDirection(cross(along, subtract(corners[3], corners[0])));
    const u = forwardAxis(along);
    const up = cross(normal, along);
    return flatFace(sides[i], normal, corners, u, snapDirection(up));
  });
  const flat = (name: string, z: number, outline: readonly Vector2[], normal: Vector3) =>
    flatFace(
      name,
      normal,
      outline.map(([a, b]): Vector3 => [a, b, z]),
      [1, 0, 0],
      [0, 1, 0],
    );
  return { faces: [...faces, flat('bottom', low, bottom.toReversed(), [0, 0, -1]), flat('top', high, top, [0, 0, 1])] };
}

/** The u axis of an upright face looks along +x where it can, else along +y, so that a box's maps read the usual way. */
function forwardAxis(along: Vector3): Vector3 {
  const backward = Math.abs(along[0]) > 1e-9 ? along[0] < 0 : along[1] < 0;
  return backward ? [-along[0] + 0, -along[1] + 0, 0] : along;
}

export function flatFace(name: string, normal: Vector3, corners: Vector3[], u: Vector3, v: Vector3): SolidFace {
  return {
    name,
    surface: { kind: 'plane', normal, offset: dot(normal, corners[0]) },
    patch: { kind: 'polygon', corners, normal, u, v },
  };
}
