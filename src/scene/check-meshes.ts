/** Faces of meshes that lie exactly on a face of another part: rounding decides which is crossed first. */
import type { Vector3 } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { SceneFace } from './compile-solids.js';
import { patchCentre, patchNormal } from './face-patch.js';
import { dot, subtract } from './vector.js';

/** Nearer than this two flat faces are on one plane for whoever made them, mm. */
const APART = 1e-4;
const PARALLEL = 1e-6;

interface View {
  readonly face: SceneFace;
  /** 'part.face' or 'part' of what lies beyond it. */
  readonly touches: readonly string[];
}

export function coincidentFaults(views: readonly View[]): Fault[] {
  return views.flatMap(({ face, touches }): Fault[] => {
    const { patch, part } = face;
    if (patch.kind !== 'facets' || !patch.flat) return [];
    const names = touches.map((name) => name.split('.')[0]);
    const partner = views.find(
      ({ face: other }) =>
        other.part !== part && names.includes(other.part.description.name) && onOnePlane(face, other),
    );
    if (partner === undefined) return [];
    return [
      {
        code: 'caution',
        severity: 'warning',
        path: part.description.path,
        problem: 'a face of a mesh lies exactly on a face of another part, so some light sees a gap between them',
        found: `${face.reference} on ${partner.face.reference}`,
        suggestion: 'let the parts overlap; the later one wins',
      },
    ];
  });
}

function onOnePlane(a: SceneFace, b: SceneFace): boolean {
  const flat = b.patch.kind === 'polygon' || b.patch.kind === 'disc' || (b.patch.kind === 'facets' && b.patch.flat);
  if (!flat) return false;
  const normal: Vector3 = patchNormal(a.patch);
  if (Math.abs(dot(normal, patchNormal(b.patch))) < 1 - PARALLEL) return false;
  return Math.abs(dot(normal, subtract(patchCentre(a.patch), patchCentre(b.patch)))) < APART;
}
