/**
 * The wall of a compound parabolic concentrator in the plane of its axis (Welford & Winston, High Collection Nonimaging Optics, 1989,
 * ch. 4): a parabola whose axis is tilted by the half angle of acceptance and whose focus is the far edge of the small end.
 */
import type { ConcentratorDescription } from './description.js';

export interface ConcentratorWall {
  readonly focalLength: number;
  /** x from the axis of the concentrator, z from its small end. */
  readonly vertex: readonly [x: number, z: number];
  /** Looks out at the vertex. */
  readonly axis: readonly [x: number, z: number];
  /** Places of the small and of the large end along the tangent of the vertex. */
  readonly from: number;
  readonly to: number;
  /** Point at a share of the way between the ends, 0 to 1, along that tangent. */
  readonly at: (share: number) => { readonly x: number; readonly z: number };
  readonly atTangent: (a: number) => { readonly x: number; readonly z: number };
}

/** Height at which the walls stand upright: no higher wall collects more. */
export function fullHeight(smallEnd: number, halfAngle: number): number {
  return (smallEnd + smallEnd / Math.sin(halfAngle)) / Math.tan(halfAngle);
}

export function concentratorWall({
  smallEnd,
  halfAngle,
  height,
}: Pick<ConcentratorDescription, 'smallEnd' | 'halfAngle' | 'height'>): ConcentratorWall {
  const [s, c] = [Math.sin(halfAngle), Math.cos(halfAngle)];
  const f = smallEnd * (1 + s);
  const vertex = [-smallEnd + f * s, -f * c] as const;
  const atTangent = (a: number) => ({
    x: vertex[0] + a * c - (a * a * s) / (4 * f),
    z: vertex[1] + a * s + (a * a * c) / (4 * f),
  });
  const from = 2 * smallEnd * c;
  // z(a) = height.
  const to = ((-s + Math.sqrt(s * s + (c * (height - vertex[1])) / f)) * 2 * f) / c;
  const at = (share: number) =>
    share === 0
      ? { x: smallEnd, z: 0 }
      : { ...atTangent(from + (to - from) * share), ...(share === 1 ? { z: height } : {}) };
  return { focalLength: f, vertex, axis: [s, -c], from, to, at, atTangent };
}
