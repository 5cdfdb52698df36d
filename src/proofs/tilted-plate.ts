import type { PartDescription, Turn, Vector3 } from '../design/description.js';
import { part } from './proof-cells.js';

/** How a plate stands in a beam. */
export interface Tilt {
  readonly along: Vector3;
  readonly from: Vector3;
  /** Of the middle of its top from `from`, mm. */
  readonly distance: number;
  /** Unit vector at a right angle to the beam; the plane of incidence holds it when `turn` is 0. */
  readonly across: Vector3;
  /** Of the plane of incidence about the beam, rad. */
  readonly turn: number;
  /** Of incidence, rad. */
  readonly angle: number;
}

/** A plate whose top a beam meets at an angle. */
export function tiltedPlate(
  name: string,
  medium: string,
  tilt: Tilt,
  options: { size?: Vector3; faces?: Readonly<Record<string, string>> } = {},
): PartDescription {
  const { along, from, distance } = tilt;
  const { size = [8, 8, 1], faces = {} } = options;
  const normal = plateNormal(tilt);
  const turns: Turn[] = [
    { axis: 'y', angle: Math.acos(normal[2]) },
    { axis: 'z', angle: Math.atan2(normal[1], normal[0]) },
  ];
  const at = from.map((x, i) => x + distance * along[i] - 0.5 * size[2] * normal[i]) as unknown as Vector3;
  return part(name, medium, { kind: 'box', size }, { at, turns, faces });
}

/** Normal of its top, against the beam. */
export function plateNormal({ along, across, turn, angle }: Tilt): Vector3 {
  const side: Vector3 = [
    along[1] * across[2] - along[2] * across[1],
    along[2] * across[0] - along[0] * across[2],
    along[0] * across[1] - along[1] * across[0],
  ];
  return along.map(
    (d, i) => -Math.cos(angle) * d + Math.sin(angle) * (Math.cos(turn) * across[i] + Math.sin(turn) * side[i]),
  ) as unknown as Vector3;
}
