/** Scatterers as written -> curves, radii and volume fractions. */
import { readSolid, solidNames } from '../materials/library.js';
import type { Curve } from '../units/curve.js';
import type { ScattererDescription } from './description.js';
import type { DesignPath } from './fault.js';
import type { Named } from './form-record.js';
import { checkReference } from './names.js';
import { checkAscending, pointCurve } from './point-curve.js';
import type { Reading } from './reading.js';
import type { BeadsRecord, ScattererRecord } from './scatterer-fields.js';

/** Closest packing of equal spheres: π/√18 (Kepler's conjecture, Hales, Ann. Math. 162 1065 (2005)). */
const CLOSEST_PACKING = Math.PI / Math.sqrt(18);

/** The scatterer, or null after reporting why not. `hostDensity` is the library's, kg/m³, null where it has none. */
export function describeScatterer(
  { name, path, value }: Named<ScattererRecord>,
  hostDensity: number | null,
  reading: Reading,
): ScattererDescription | null {
  const { 'henyey-greenstein': law, beads } = value;
  if (law !== null) {
    const at = [...path, 'henyey-greenstein'];
    checkAscending(law.coefficient, [...at, 'coefficient'], reading);
    checkAscending(law.anisotropy, [...at, 'anisotropy'], reading);
    const coefficient = pointCurve(law.coefficient, 'hold');
    return { name, path, kind: 'henyey-greenstein', coefficient, anisotropy: pointCurve(law.anisotropy, 'hold') };
  }
  if (beads === null) return null;
  const at = [...path, 'beads'];
  const curves = beadCurves(beads, at, reading);
  const radius = beads.radius ?? (beads.diameter ?? Number.NaN) / 2;
  const volumeFraction = fractionOf(beads, radius, hostDensity, at, reading);
  if (volumeFraction > CLOSEST_PACKING) {
    reading.report({
      code: 'range',
      path: at,
      problem: 'so many beads do not fit into the medium',
      found: `${percent(volumeFraction)} of its volume`,
      expected: `at most ${percent(CLOSEST_PACKING)}, the closest packing of equal spheres`,
    });
  }
  return curves && { name, path, kind: 'beads', radius, volumeFraction, ...curves };
}

function beadCurves(
  { solid, index, k }: BeadsRecord,
  path: DesignPath,
  reading: Reading,
): { index: Curve; extinction: Curve } | null {
  if (k !== null) checkAscending(k, [...path, 'k'], reading);
  const extinction = k === null ? () => 0 : pointCurve(k, 'hold');
  if (index !== null) {
    checkAscending(index, [...path, 'index'], reading);
    return { index: pointCurve(index, 'hold'), extinction };
  }
  if (solid === null) return null;
  const known = checkReference(solid, solidNames(), 'no solid of the library has this name', reading);
  return known ? { index: readSolid(solid.name).index, extinction } : null;
}

/** Volume of the beads over that of the medium; NaN after reporting what is missing. */
function fractionOf(
  fields: BeadsRecord,
  radius: number,
  hostDensity: number | null,
  path: DesignPath,
  reading: Reading,
): number {
  const { 'number-density': number, 'volume-fraction': volume, 'mass-fraction': mass } = fields;
  const { density, 'host-density': ownHostDensity } = fields;
  if (mass === null) {
    for (const field of ['density', 'host-density'] as const) {
      if (fields[field] === null) continue;
      const problem = `${field} belongs to mass-fraction`;
      reading.report({ code: 'unknown-key', path: [...path, field], problem, found: field });
    }
    return volume ?? ((number ?? Number.NaN) * 4 * Math.PI * radius ** 3) / 3;
  }
  const around = ownHostDensity ?? hostDensity;
  if (density === null || around === null) {
    const field = density === null ? 'density' : 'host-density';
    const what = density === null ? 'the density of the beads' : 'the density of the medium, which the library has not';
    reading.report({
      code: 'missing',
      path,
      problem: `a share by mass needs ${what}`,
      expected: `\`${field}\` such as 1.2 g/mL, or volume-fraction`,
    });
    return Number.NaN;
  }
  const beads = mass / density;
  return beads / (beads + (1 - mass) / around);
}

const percent = (share: number): string => `${Number((100 * share).toPrecision(3))} %`;
