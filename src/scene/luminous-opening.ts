/** What a recorder's light comes out of: its outline for photometry, and a point in its middle. */

import type { Vector3 } from '../design/description.js';
import type { LuminousOpening } from '../tallies/run-tallies.js';
import type { RecorderPlan } from './compile-recorders.js';
import { patchCentre, patchPoint } from './face-patch.js';
import { add, dot, scale } from './vector.js';

/** null for a round side: its directions are told from the local normal, which makes no far field. */
export function luminousOpening({
  face,
  outline,
  sphere,
  wrapped,
  extent,
  normal,
}: RecorderPlan): LuminousOpening | null {
  if (wrapped) return null;
  const [width, length] = extent.map(([low, high]) => high - low);
  if (sphere !== null) {
    const diameter = 2 * sphere.radius;
    return { shape: 'sphere', sizeMm: [diameter, diameter, diameter] };
  }
  const patch = face?.patch;
  if (patch?.kind === 'zone') {
    const whole = patch.from <= -patch.radius;
    const height = whole ? 2 * patch.radius : (patch.radius - patch.from) * Math.abs(dot(patch.axis, normal));
    return { shape: whole ? 'sphere' : 'dome', sizeMm: [width, length, height] };
  }
  const round = outline?.kind === 'disc' || patch?.kind === 'disc';
  return { shape: round ? 'disc' : 'rectangle', sizeMm: [width, length, 0] };
}

/** A point in the middle of the recorder and the outward normal there; of a whole sphere, a point on it. */
export function middleOf(plan: RecorderPlan): { readonly point: Vector3; readonly normal: Vector3 } {
  const { face, sphere, origin, u, v, normal, extent } = plan;
  if (sphere !== null) {
    const polar = (sphere.polar[0] + sphere.polar[1]) / 2;
    const out = add(scale(normal, Math.cos(polar)), scale(u, Math.sin(polar)));
    return { point: add(origin, scale(out, sphere.radius)), normal: out };
  }
  if (face !== null) {
    const { patch, hollow } = face;
    const flat = patch.kind === 'polygon' || patch.kind === 'disc';
    const middle = flat ? { point: patchCentre(patch), normal: patch.normal } : patchPoint(patch, 0.5, 0.5);
    return hollow ? { ...middle, normal: scale(middle.normal, -1) } : middle;
  }
  const across = scale(u, (extent[0][1] - extent[0][0]) / 2);
  const up = scale(v, (extent[1][1] - extent[1][0]) / 2);
  return { point: add(origin, add(across, up)), normal };
}
