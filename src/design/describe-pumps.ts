/** Pumps as written -> pumps of the description. */

import { checkFace, type FaceIndex, reportNone } from './describe-parts.js';
import type { Aim, BeamDescription, Outline, PumpDescription, Vector2, Vector3 } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import type { OutlineFields, PumpRecord } from './pump-fields.js';
import type { Reading } from './reading.js';

export function describePumps(design: DesignRecord, faces: FaceIndex, reading: Reading): PumpDescription[] {
  if (design.pumps.length === 0) reportNone('pumps', reading);
  return design.pumps.flatMap(({ name, path, value }) => {
    const aim = describeAim(value, path, faces, reading);
    const beam = describeBeam(value, path, reading);
    if (aim === null || beam === null) return [];
    const { power, wavelength, linewidth, driver, polarised } = value;
    const given = {
      power,
      wavelengthNm: wavelength,
      linewidthNm: linewidth,
      wallPlug: value['wall-plug'],
      driver,
      polarised,
    };
    return [{ name, path, ...given, aim, beam }];
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

export function describeOutline({ rectangle, disc }: Pick<OutlineFields, 'rectangle' | 'disc'>): Outline {
  if (rectangle !== null) return { kind: 'rectangle', size: rectangle };
  return { kind: 'disc', radius: disc ?? Number.NaN };
}

function describeBeam(pump: PumpRecord, path: DesignPath, reading: Reading): BeamDescription | null {
  const { diodes, patch, gaussian, lambertian, lens, divergence } = pump;
  const misplace = (field: string, given: unknown, owner: string) => {
    if (given === null) return;
    const problem = `${field} belongs to ${owner}`;
    reading.report({ code: 'unknown-key', path: [...path, field], problem, found: field });
  };
  if (diodes === null) misplace('lens', lens, 'a bank of diodes');
  if (diodes === null && patch === null) {
    misplace('divergence', divergence, 'diodes or a patch');
    misplace('fast-axis', pump['fast-axis'], 'diodes or a patch');
  }
  if (diodes !== null) {
    if (divergence === null) {
      const expected = 'the far field [fast, slow] such as [30 deg, 8 deg]';
      reading.report({
        code: 'missing',
        path: [...path, 'divergence'],
        problem: 'a required field is missing',
        expected,
      });
    }
    return { kind: 'diodes', ...bank(diodes), divergence: alongAxes(pump), lens: describeLens(lens, path, reading) };
  }
  if (patch !== null) return { kind: 'patch', outline: describeOutline(patch), divergence: alongAxes(pump) };
  if (gaussian !== null) return { kind: 'gaussian', radius: gaussian.radius, halfAngle: gaussian['half-angle'] };
  return lambertian && { kind: 'lambertian', outline: describeOutline(lambertian) };
}

const bank = ({ across, along, pitch }: NonNullable<PumpRecord['diodes']>) => ({ across, along, pitch });

/** From [fast, slow] to [u (across), v (along)]. */
function alongAxes(pump: PumpRecord): Vector2 {
  const [fast, slow] = pump.divergence ?? [0, 0];
  return pump['fast-axis'] === 'across' ? [fast, slow] : [slow, fast];
}

function describeLens(lens: PumpRecord['lens'], path: DesignPath, reading: Reading) {
  if (lens === null) return null;
  if (lens['focal-length'] === 0) {
    const problem = 'a lens of focal length zero cannot be';
    const expected = 'a focal length above or below 0 mm';
    reading.report({ code: 'range', path: [...path, 'lens', 'focal-length'], problem, found: '0 mm', expected });
  }
  return { focalLength: lens['focal-length'], distance: lens.distance };
}
