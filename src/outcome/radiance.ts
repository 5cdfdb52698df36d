/** Recorded light by place and direction -> radiance. */
import type { RadianceArray } from '../record/run-arrays.js';
import type { RadianceRecord } from '../record/run-record.js';
import type { RecordedRadiance } from '../tallies/run-tallies.js';
import { projectedSolidAngle } from './effective-etendue.js';

const MM2_PER_M2 = 1e6;

/** W/(m² sr) of each cell: power over area and projected solid angle. */
export function radianceArray(recorded: RecordedRadiance, wattsPerEv: number): RadianceArray {
  const { id, shape, extent, extentDeg, axes, energy, measure } = recorded;
  const [, , polar, azimuth] = shape;
  const step = Math.PI / 2 / polar;
  const [even, odd] = energy;
  const values = even.map((ev, cell) => {
    const row = Math.floor(cell / azimuth) % polar;
    const area = measure[Math.floor(cell / (polar * azimuth))];
    if (!(area > 0)) return Number.NaN;
    const size = area * projectedSolidAngle(row * step, (row + 1) * step, azimuth);
    return ((ev + odd[cell]) * wattsPerEv * MM2_PER_M2) / size;
  });
  return { id, shape, extentMm: extent, ...(extentDeg === undefined ? {} : { extentDeg }), axes, values };
}

/** File names are left empty. */
export function radianceRecord(recorded: RecordedRadiance, wattsPerEv: number): RadianceRecord {
  const { values, ...array } = radianceArray(recorded, wattsPerEv);
  const { where, energy, measure } = recorded;
  const sum = (numbers: Float64Array) => numbers.reduce((a, b) => a + b, 0);
  const watts = (sum(energy[0]) + sum(energy[1])) * wattsPerEv;
  return {
    ...array,
    where,
    unit: 'W/(m² sr)',
    files: [],
    mean: (watts * MM2_PER_M2) / (Math.PI * sum(measure)),
    maximum: values.reduce((most, value) => (value > most ? value : most), 0),
  };
}
