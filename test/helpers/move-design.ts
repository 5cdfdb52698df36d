/** Rigid motions of a whole design, worked out by hand: no matrix of the code under test. */
import type { Description, Turn, Vector3 } from '../../src/design/description.js';

export interface Motion {
  /** Turns about the fixed axes of the design, in order, rad. */
  readonly turns: readonly Turn[];
  /** Then this shift, mm. */
  readonly shift: Vector3;
}

function turned([x, y, z]: Vector3, turns: readonly Turn[]): Vector3 {
  for (const { axis, angle } of turns) {
    const c = Math.cos(angle);
    const s = Math.sin(angle);
    if (axis === 'x') [y, z] = [c * y - s * z, s * y + c * z];
    else if (axis === 'y') [x, z] = [c * x + s * z, -s * x + c * z];
    else [x, y] = [c * x - s * y, s * x + c * y];
  }
  return [x, y, z];
}

/** The same design somewhere else. Pumps given by place and direction, and free planes, must be round: their roll is not carried along. */
export function moveDesign(design: Description, { turns, shift }: Motion): Description {
  const direction = (d: Vector3): Vector3 => turned(d, turns);
  const point = (p: Vector3): Vector3 => {
    const [x, y, z] = turned(p, turns);
    return [x + shift[0], y + shift[1], z + shift[2]];
  };
  return {
    ...design,
    parts: design.parts.map((part) => ({
      ...part,
      placement: {
        ...part.placement,
        at: point(part.placement.at),
        turns: [...part.placement.turns, ...turns],
      },
    })),
    pumps: design.pumps.map((pump) =>
      pump.aim.kind === 'along'
        ? { ...pump, aim: { ...pump.aim, at: point(pump.aim.at), direction: direction(pump.aim.direction) } }
        : pump,
    ),
    detectors: design.detectors.map((detector) =>
      detector.target.kind === 'plane'
        ? {
            ...detector,
            target: { ...detector.target, at: point(detector.target.at), normal: direction(detector.target.normal) },
          }
        : detector,
    ),
  };
}
