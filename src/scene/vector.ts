/** Small vector helpers for building a scene (never in the hot loop). Placement uses gl-matrix in double precision. */
import { glMatrix, mat4, vec3 } from 'gl-matrix';
import type { Turn, Vector3 } from '../design/description.js';

// gl-matrix computes in single precision unless told otherwise, once per thread.
glMatrix.setMatrixArrayType(Array);

export type Matrix = Readonly<mat4>;

export const add = (a: Vector3, b: Vector3): Vector3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const subtract = (a: Vector3, b: Vector3): Vector3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const scale = (a: Vector3, s: number): Vector3 => [a[0] * s, a[1] * s, a[2] * s];
export const dot = (a: Vector3, b: Vector3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const length = (a: Vector3): number => Math.sqrt(dot(a, a));
export const normalise = (a: Vector3): Vector3 => scale(a, 1 / length(a));
export const cross = (a: Vector3, b: Vector3): Vector3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** Two unit vectors that complete `w` to a right-handed frame u × v = w. */
export function frameAbout(w: Vector3): { u: Vector3; v: Vector3 } {
  const helper: Vector3 = Math.abs(w[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
  const u = normalise(cross(helper, w));
  return { u, v: cross(w, u) };
}

const AXES = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] } as const;

/** Turns in list order about the fixed axes through the origin, then a shift to `at`. */
export function rigidMatrix(at: Vector3, turns: readonly Turn[]): Matrix {
  const matrix = mat4.create();
  mat4.fromTranslation(matrix, vec3.fromValues(...at));
  for (const turn of turns.toReversed()) mat4.rotate(matrix, matrix, turn.angle, AXES[turn.axis]);
  return matrix;
}

export function multiply(a: Matrix, b: Matrix): Matrix {
  return mat4.multiply(mat4.create(), a as mat4, b as mat4);
}

export function movePoint(matrix: Matrix, p: Vector3): Vector3 {
  const [x, y, z] = vec3.transformMat4(vec3.create(), vec3.fromValues(...p), matrix as mat4);
  return [x, y, z];
}

export function moveDirection(matrix: Matrix, d: Vector3): Vector3 {
  return snapDirection(subtract(movePoint(matrix, d), movePoint(matrix, [0, 0, 0])));
}

/** Rounding of a quarter turn leaves 6e-17 where a 0 belongs; such planes would fall out of their axis family. */
export function snapDirection(d: Vector3): Vector3 {
  const unit = normalise(d);
  const snap = (c: number) => (Math.abs(c) < 1e-13 ? 0 : Math.abs(Math.abs(c) - 1) < 1e-13 ? Math.sign(c) : c);
  return normalise([snap(unit[0]), snap(unit[1]), snap(unit[2])]);
}
