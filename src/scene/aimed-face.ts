/** The face that the axis of a beam meets first. */
import type { Vector3 } from '../design/description.js';
import type { BeamFrame } from './compile-pumps.js';
import type { SceneFace } from './compile-solids.js';
import type { FacePatch } from './convex-solid.js';
import { dishMeetings, roots } from './dish.js';
import { facetsMeetings } from './mesh/facet-patch.js';
import { revolvedMeetings } from './revolved.js';
import { add, cross, dot, normalise, scale, subtract } from './vector.js';

/** Nearer than this the beam starts on the face and leaves it behind, mm. */
const START = 1e-6;

/** null when the axis meets no face from outside. */
export function aimedFace({ origin, w }: BeamFrame, faces: readonly SceneFace[]): SceneFace | null {
  let nearest = Number.POSITIVE_INFINITY;
  let found: SceneFace | null = null;
  for (const face of faces) {
    for (const { distance, normal } of meetings(face.patch, origin, w)) {
      const against = dot(normal, w) * (face.hollow ? -1 : 1) < 0;
      if (against && distance > START && distance < nearest) {
        nearest = distance;
        found = face;
      }
    }
  }
  return found;
}

export interface Meeting {
  readonly distance: number;
  readonly normal: Vector3;
}

/** Where a ray meets a patch, before or behind its start; normals look out of the patch's solid. */
export function meetings(patch: FacePatch, origin: Vector3, direction: Vector3): Meeting[] {
  switch (patch.kind) {
    case 'polygon':
    case 'disc': {
      const on = patch.kind === 'disc' ? patch.centre : patch.corners[0];
      const distance = dot(subtract(on, origin), patch.normal) / dot(direction, patch.normal);
      const point = add(origin, scale(direction, distance));
      return Number.isFinite(distance) && onFlat(patch, point) ? [{ distance, normal: patch.normal }] : [];
    }
    case 'side':
    case 'profile':
      return revolvedMeetings(patch, origin, direction);
    case 'dish':
      return dishMeetings(patch, origin, direction);
    case 'group':
      return patch.members.flatMap((member) => meetings(member, origin, direction));
    case 'zone': {
      const from = subtract(origin, patch.centre);
      const c = dot(from, from) - patch.radius ** 2;
      return roots(dot(direction, direction), dot(from, direction), c).flatMap((distance) => {
        const p = add(from, scale(direction, distance));
        return dot(p, patch.axis) < patch.from ? [] : [{ distance, normal: normalise(p) }];
      });
    }
    case 'facets':
      return facetsMeetings(patch, origin, direction);
  }
}

function onFlat(patch: Extract<FacePatch, { kind: 'polygon' | 'disc' }>, point: Vector3): boolean {
  if (patch.kind === 'disc') {
    const d = subtract(point, patch.centre);
    return dot(d, d) <= patch.radius ** 2;
  }
  const signs = patch.corners.map((corner, i) => {
    const next = patch.corners[(i + 1) % patch.corners.length];
    return dot(cross(subtract(next, corner), subtract(point, corner)), patch.normal);
  });
  return signs.every((s) => s >= 0) || signs.every((s) => s <= 0);
}
