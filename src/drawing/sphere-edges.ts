import type { DetectorTarget, Vector3 } from '../design/description.js';
import type { Coordinates } from '../record/drawing.js';
import { add, frameAbout, normalise, scale, snapDirection } from '../scene/vector.js';

const STEPS = 48;

/** Rims of a sphere or a part of one, its equator if it has one, and four meridians: 6 numbers a segment. */
export function sphereEdges({ centre, radius, axis, polar }: Extract<DetectorTarget, { kind: 'sphere' }>): Coordinates {
  const w = snapDirection(normalise(axis));
  const { u, v } = frameAbout(w);
  const at = (theta: number, phi: number): Vector3 => {
    const across = add(scale(u, Math.cos(phi)), scale(v, Math.sin(phi)));
    return add(centre, scale(add(scale(across, Math.sin(theta)), scale(w, Math.cos(theta))), radius));
  };
  const line = (point: (share: number) => Vector3, steps: number) =>
    Array.from({ length: steps }, (_, i) => [...point(i / steps), ...point((i + 1) / steps)]).flat();
  const [from, to] = polar;
  const rings = [from, to, ...(from < Math.PI / 2 && to > Math.PI / 2 ? [Math.PI / 2] : [])];
  return [
    ...rings
      .filter((theta) => Math.sin(theta) > 1e-9)
      .flatMap((theta) => line((share) => at(theta, 2 * Math.PI * share), STEPS)),
    ...[0, 1, 2, 3].flatMap((k) =>
      line(
        (share) => at(from + (to - from) * share, (k * Math.PI) / 2),
        Math.ceil((STEPS * (to - from)) / (2 * Math.PI)),
      ),
    ),
  ];
}
