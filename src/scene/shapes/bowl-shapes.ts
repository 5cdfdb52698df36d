/** Paraboloids and compound parabolic concentrators in their own frames: axis z, the narrow end at the bottom. */

import { concentratorWall } from '../../design/concentrator-wall.js';
import type { ConcentratorDescription, ShapeDescription, Vector2, Vector3 } from '../../design/description.js';
import type { ConvexSolid, FacePatch, SolidFace } from '../convex-solid.js';
import { flatFace } from './flat-shapes.js';
import { coneSide, disc } from './round-shapes.js';

const X: Vector3 = [1, 0, 0];
const Y: Vector3 = [0, 1, 0];
const Z: Vector3 = [0, 0, 1];
const DOWN: Vector3 = [0, 0, -1];

export function paraboloidSolid({
  focalLength,
  height,
}: Extract<ShapeDescription, { kind: 'paraboloid' }>): ConvexSolid {
  const rim = Math.sqrt(4 * focalLength * height);
  const form = { vertex: [0, 0, -height / 2] as Vector3, axis: DOWN, radius: 2 * focalLength, conic: -1, ruled: null };
  const bowl: SolidFace = {
    name: 'bowl',
    surface: { kind: 'conic', ...form },
    patch: { kind: 'dish', ...form, outline: { kind: 'disc', radius: rim }, u: X, v: Y },
  };
  return { faces: [bowl, disc('top', height / 2, rim)] };
}

export function concentratorSolid(shape: ConcentratorDescription): ConvexSolid {
  return shape.form === 'round' ? roundConcentrator(shape) : walledConcentrator(shape);
}

/** The line of chords of the wall, turned about the axis: it is hollow towards the axis, so the cones' insides meet in it. */
function roundConcentrator(shape: ConcentratorDescription): ConvexSolid {
  const { height, slices, smallEnd } = shape;
  const wall = concentratorWall(shape);
  const stations = Array.from({ length: slices + 1 }, (_, i) => wall.at(i / slices));
  const whole: FacePatch = {
    kind: 'profile',
    base: [0, 0, -height / 2],
    axis: Z,
    stations: stations.map(({ z, x }) => [z, x] as const),
    u: X,
    v: Y,
  };
  const faces = stations.slice(1).map((above, i): SolidFace => {
    const below = stations[i];
    const slice = { bottomRadius: below.x, topRadius: above.x, height: above.z - below.z };
    return {
      ...coneSide(slice, (below.z + above.z - height) / 2),
      name: 'wall',
      ...(i === 0 ? { whole } : {}),
    };
  });
  return { faces: [...faces, disc('bottom', -height / 2, smallEnd), disc('top', height / 2, wall.at(1).x)] };
}

/** Exact parabolic walls: two of a trough, two crossed pairs of a square concentrator. */
function walledConcentrator(shape: ConcentratorDescription): ConvexSolid {
  const { form, height, smallEnd } = shape;
  const wall = concentratorWall(shape);
  const half = shape.length === null ? null : shape.length / 2;
  const curved = (name: string, out: Vector3, across: Vector3): SolidFace => {
    const raise = (x: number, z: number): Vector3 => [x * out[0], x * out[1], z];
    const [vx, vz] = wall.vertex;
    const [ax, az] = wall.axis;
    const base = {
      vertex: raise(vx, vz - height / 2),
      axis: raise(ax, az),
      radius: 2 * wall.focalLength,
      conic: -1,
    };
    return {
      name,
      surface: { kind: 'conic', ...base, ruled: across },
      patch: {
        kind: 'dish',
        ...base,
        ruled: 'v',
        outline: {
          kind: 'strip',
          from: wall.from,
          to: wall.to,
          halfWidth: (a) => half ?? wall.atTangent(a).x,
        },
        u: raise(-az, ax),
        v: across,
      },
    };
  };
  const ends = (x: number, y: number): Vector2[] => [
    [-x, -y],
    [x, -y],
    [x, y],
    [-x, y],
  ];
  const top = wall.at(1).x;
  const flat = (name: string, z: number, x: number) =>
    flatFace(
      name,
      [0, 0, Math.sign(z)],
      ends(x, half ?? x).map(([a, b]): Vector3 => [a, b, z]),
      X,
      Y,
    );
  const sides = [curved('left', [-1, 0, 0], Y), curved('right', X, Y)];
  const others =
    form === 'square'
      ? [curved('front', [0, -1, 0], X), curved('back', Y, X)]
      : [trapeze('front', -1, half ?? 0), trapeze('back', 1, half ?? 0)];
  return { faces: [...sides, ...others, flat('bottom', -height / 2, smallEnd), flat('top', height / 2, top)] };

  /** The flat end of a trough, between its two walls. */
  function trapeze(name: string, sign: 1 | -1, y: number): SolidFace {
    const steps = 32;
    const right = Array.from({ length: steps + 1 }, (_, i) => wall.at(i / steps));
    const corners = [...right.map(({ x, z }) => [x, z]), ...right.toReversed().map(({ x, z }) => [-x, z])];
    return flatFace(
      name,
      [0, sign, 0],
      corners.map(([x, z]): Vector3 => [x, sign * y, z - height / 2]),
      X,
      Z,
    );
  }
}
