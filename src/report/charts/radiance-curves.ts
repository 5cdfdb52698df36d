import type { RadianceArray } from '../../record/run-arrays.js';
import { markup } from '../markup.js';
import { significant } from '../number-format.js';
import { axisScale, bottomAxis, leftAxis } from './axis.js';
import { type Picture, picture, round } from './picture.js';

const LEFT = 58;
const RIGHT = 352;
const TOP = 12;
const BOTTOM = 192;
const WIDTH = 372;

export const RADIANCE_WORDS =
  'Radiance against the angle from the normal, averaged over azimuth. Line: mean over the face; band: from the dimmest to the brightest of its places, counting noise included. A matt face is a level line.';

/** Radiance against the angle from the normal: mean over all places, and the range of them. @param id unique on the page */
export function radianceCurves(id: string, radiance: RadianceArray, title: string): Picture {
  const [nu, nv, polar, azimuth] = radiance.shape;
  const places = Array.from({ length: nu * nv }, (_, place) =>
    Array.from({ length: polar }, (_, row) => {
      const from = (place * polar + row) * azimuth;
      return radiance.values.subarray(from, from + azimuth).reduce((a, b) => a + b, 0) / azimuth;
    }),
  ).filter((curve) => curve.every(Number.isFinite));
  const over = (f: (values: readonly number[]) => number) =>
    Array.from({ length: polar }, (_, row) => f(places.map((curve) => curve[row])));
  const mean = over((values) => values.reduce((a, b) => a + b, 0) / Math.max(1, values.length));
  const least = over((values) => Math.min(...values));
  const most = over((values) => Math.max(...values));
  // Powers of ten of the axis, so that its numbers stay short.
  const top = Math.max(...most, Number.MIN_VALUE);
  const power = 3 * Math.floor(Math.log10(top) / 3);
  const factor = 10 ** -power;
  const unit = power === 0 ? 'W/(m² sr)' : `10${superscript(power)} W/(m² sr)`;
  const across = { domain: [0, 90], range: [LEFT, RIGHT], label: 'angle from the normal, °', ticks: 9 } as const;
  const up = { domain: [0, top * factor], range: [BOTTOM, TOP], label: `radiance, ${unit}`, ticks: 4 } as const;
  const x = axisScale(across);
  const y = axisScale(up);
  const step = 90 / polar;
  const points = (values: readonly number[]) =>
    values.map((value, row) => `${round(x((row + 0.5) * step))} ${round(y(value * factor))}`);
  return picture(
    {
      id,
      title,
      description: `Radiance in W/(m² sr) against the angle from the normal, 0 to 90 degrees; mean over the face at most ${significant(Math.max(...mean), 3)}, in a single place at most ${significant(top, 3)}.`,
    },
    WIDTH,
    BOTTOM + 36,
    markup`<path class="radiance-range" d="M${points(most).join('L')}L${points(least).toReversed().join('L')}Z"/><path class="intensity" d="M${points(mean).join('L')}"/>${bottomAxis(across, BOTTOM)}${leftAxis(up, LEFT, 12)}`,
    'radiance',
  );
}

const superscript = (power: number): string =>
  String(power).replace(/./g, (sign) => (sign === '-' ? '⁻' : '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(sign)]));
