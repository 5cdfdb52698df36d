/** Pumps as written -> pumps of the description. */

import { describeBeam, describeColour } from './describe-beam.js';
import { checkFace, type FaceIndex, reportNone } from './describe-parts.js';
import type { Aim, PumpDescription, Vector3 } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import type { PumpRecord } from './pump-fields.js';
import type { Reading } from './reading.js';

export function describePumps(design: DesignRecord, faces: FaceIndex, reading: Reading): PumpDescription[] {
  if (design.pumps.length === 0) reportNone('pumps', reading);
  return design.pumps.flatMap(({ name, path, value }) => {
    const aim = describeAim(value, path, faces, reading);
    const beam = describeBeam(value, path, reading);
    const colour = beam && describeColour(value, beam, path, reading);
    if (aim === null || beam === null || colour === null) return [];
    const { power, driver, polarised, ring } = value;
    const given = { ...colour, wallPlug: value['wall-plug'], driver, polarised, beam };
    if (ring === null) return [{ name, path, power, ...given, aim }];
    const { count, axis, through } = ring;
    return Array.from({ length: count }, (_, i): PumpDescription => {
      const turned = { axis, through, angle: (2 * Math.PI * i) / count };
      return { name: `${name} ${i + 1}`, path, power: power / count, ...given, aim: { ...aim, turned } };
    });
  });
}

function describeAim(pump: PumpRecord, path: DesignPath, faces: FaceIndex, reading: Reading): Aim | null {
  const { toward, distance, shift, tilt, at, direction, roll } = pump;
  const misplace = (fields: Readonly<Record<string, unknown>>, owner: string) => {
    for (const [field, given] of Object.entries(fields)) {
      if (given === null) continue;
      const problem = `${field} belongs to a pump with \`${owner}\``;
      reading.report({ code: 'unknown-key', path: [...path, field], problem, found: field });
    }
  };
  const need = (field: string, given: unknown, expected: string) => {
    if (given !== null) return;
    reading.report({ code: 'missing', path: [...path, field], problem: 'a required field is missing', expected });
  };
  if (toward !== null && at === null) {
    misplace({ direction, roll }, 'at');
    need('distance', distance, 'how far in front of the face the pump stands, such as 40 mm');
    checkFace(toward, faces, 'no part has this face', reading);
    return {
      kind: 'toward',
      face: toward.name,
      distance: distance ?? Number.NaN,
      shift: shift ?? [0, 0],
      tilt: tilt ?? [0, 0],
    };
  }
  if (at === null || toward !== null) return null;
  misplace({ distance, shift, tilt }, 'toward');
  need('direction', direction, 'where the pump looks, such as [0, 0, -1]');
  checkDirection(direction, [...path, 'direction'], reading);
  return { kind: 'along', at, direction: direction ?? [Number.NaN, 0, 0], roll: roll ?? 0 };
}

export function checkDirection(direction: Vector3 | null, path: DesignPath, reading: Reading): void {
  if (direction === null || direction.some((value) => value !== 0)) return;
  reading.report({
    code: 'range',
    path,
    problem: 'a direction of length zero looks nowhere',
    found: '[0, 0, 0]',
    expected: 'a direction such as [0, 0, -1]',
  });
}
