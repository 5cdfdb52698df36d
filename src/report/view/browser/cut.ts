import { type Color, Group, Plane, Vector3 } from 'three';
import type { OpenFace } from '../unpack-drawing.js';
import { empty } from './dispose.js';
import { fatLines } from './fat-lines.js';

export interface CutAt {
  readonly axis: 0 | 1 | 2;
  readonly place: number;
  /** Keep what lies above the place instead of what lies below. */
  readonly above: boolean;
}

/** A plane that cuts parts and paths, and the outline it cuts out of the faces. */
export class Cut {
  readonly group = new Group();
  /** Shared by all materials that are cut: empty while there is no cut. */
  readonly planes: Plane[] = [];

  set(at: CutAt | null, faces: readonly OpenFace[], colour: Color): void {
    empty(this.group);
    this.planes.length = 0;
    if (at === null) return;
    const sign = at.above ? 1 : -1;
    const normal = new Vector3().setComponent(at.axis, sign);
    this.planes.push(new Plane(normal, -sign * at.place));
    const outline = Float32Array.from(faces.flatMap((face) => cutFace(face, at)));
    if (outline.length > 0) this.group.add(fatLines(outline, { width: 2.2, colour }));
  }

  hides(point: Vector3): boolean {
    return this.planes.some((plane) => plane.distanceToPoint(point) < 0);
  }
}

/** Segments in which a plane meets the triangles of a face. */
function cutFace({ positions, corners }: OpenFace, { axis, place }: CutAt): number[] {
  const segments: number[] = [];
  for (let t = 0; t < corners.length; t += 3) {
    const ends: number[] = [];
    for (let side = 0; side < 3; side++) {
      const a = 3 * corners[t + side];
      const b = 3 * corners[t + ((side + 1) % 3)];
      const [from, to] = [positions[a + axis] - place, positions[b + axis] - place];
      if (from < 0 === to < 0) continue;
      const share = from / (from - to);
      for (let i = 0; i < 3; i++) ends.push(positions[a + i] + share * (positions[b + i] - positions[a + i]));
    }
    if (ends.length === 6) segments.push(...ends);
  }
  return segments;
}
