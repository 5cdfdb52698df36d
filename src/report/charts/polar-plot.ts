import { scaleLinear } from 'd3-scale';
import type { AnglesArray } from '../../record/run-arrays.js';
import { markup } from '../markup.js';
import { significant } from '../number-format.js';
import { type Picture, picture, round } from './picture.js';

const WIDTH = 372;
const RADIUS = 158;
const CENTRE = [WIDTH / 2, RADIUS + 24] as const;
const SPOKES = [-90, -60, -30, 0, 30, 60, 90];

const HALF_WORDS =
  'Radiant intensity against the angle from the normal, averaged over azimuth, drawn to both sides. Dashed: the same power after Lambert’s cosine law. Near 0° few photons fall into each step, so the curve is roughest there.';
const WHOLE_WORDS =
  'Radiant intensity against the angle from the axis, averaged over azimuth, drawn to both sides. Dashed: the same power evenly in all directions. Near 0° and 180° few photons fall into each step, so the curve is roughest there.';

/** Share of the power beyond 90° from which both half spaces are drawn. */
const WORTH_DRAWING = 0.01;

/** Light goes further than 90° off the normal. */
function isWhole(angles: AnglesArray): boolean {
  const means = azimuthMeans(angles);
  const ahead = means.map((value, row) => (row * angles.polarToDeg < 90 * angles.polarCells ? value : 0));
  return watts(angles, ahead) < (1 - WORTH_DRAWING) * watts(angles, means);
}

export const polarWords = (angles: AnglesArray): string => (isWhole(angles) ? WHOLE_WORDS : HALF_WORDS);

/** Radiant intensity against the angle from the normal, averaged over azimuth. @param id unique on the page */
export function polarPlot(id: string, angles: AnglesArray, title: string): Picture {
  const whole = isWhole(angles);
  const means = azimuthMeans(angles);
  const intensity = whole ? means : means.slice(0, Math.round((90 * angles.polarCells) / angles.polarToDeg));
  const even = watts(angles, intensity) / (whole ? 4 * Math.PI : Math.PI);
  const highest = Math.max(even, ...intensity);
  const rings = scaleLinear([0, highest > 0 ? highest : 1], [0, RADIUS]).nice(4);
  const step = angles.polarToDeg / angles.polarCells;
  const side = intensity.map((value, i) => [(i + 0.5) * step, value] as const);
  const curve = [...side.toReversed().map(([angle, value]) => [-angle, value] as const), ...side];
  const spokes = whole ? [...SPOKES, 120, 150, 180, -150, -120] : SPOKES;
  const bottom = whole ? CENTRE[1] + RADIUS + 24 : CENTRE[1];
  const at = (degrees: number, value: number) => place(degrees, rings(value));
  const path = curve.map(([angle, value], i) => `${i === 0 ? 'M' : 'L'}${at(angle, value)}`).join('');
  // Radiant intensity of a face of even radiance: a circle through the origin.
  const lambert = Array.from({ length: whole ? 121 : 61 }, (_, i) => (whole ? -180 : -90) + 3 * i)
    .map((angle, i) => `${i === 0 ? 'M' : 'L'}${at(angle, even * (whole ? 1 : Math.cos((angle * Math.PI) / 180)))}`)
    .join('');
  const ringsAt = rings.ticks(4).filter((value) => value > 0);
  return picture(
    {
      id,
      title,
      description: `Radiant intensity in W/sr, averaged over azimuth, as a curve around the ${whole ? 'axis from 0 to 180' : 'normal of the face from 0 to 90'} degrees either way; at most ${significant(Math.max(...intensity), 3)} W/sr. A dashed circle shows the same power spread ${whole ? 'evenly in all directions' : "after Lambert's cosine law"}.`,
    },
    WIDTH,
    bottom + 30,
    markup`<g class="axis">${ringsAt.map((value) => {
      const r = round(rings(value));
      return markup`<path class="ring" d="M${CENTRE[0] - r} ${CENTRE[1]}A${r} ${r} 0 0 1 ${CENTRE[0] + r} ${CENTRE[1]}${whole ? `A${r} ${r} 0 0 1 ${CENTRE[0] - r} ${CENTRE[1]}` : ''}"/><text x="${CENTRE[0] + r}" y="${CENTRE[1] + 14}" text-anchor="middle">${significant(value, 3)}</text>`;
    })}${spokes.map(
      (angle) =>
        markup`<path class="ring" d="M${CENTRE[0]} ${CENTRE[1]}L${place(angle, RADIUS)}"/><text x="${spokeLabel(angle)[0]}" y="${spokeLabel(angle)[1]}" text-anchor="middle">${Math.abs(angle)}°</text>`,
    )}<text x="${CENTRE[0]}" y="${CENTRE[1] + 14}" text-anchor="middle">0</text><text class="axis-title" x="${CENTRE[0]}" y="${bottom + 28}" text-anchor="middle">radiant intensity, W/sr</text></g><path class="lambert" d="${lambert}"/><path class="intensity" d="${path}"/>`,
    'polar',
  );
}

/** W/sr at each polar cell. */
export function azimuthMeans({ polarCells, azimuthCells, wattsPerSr }: AnglesArray): readonly number[] {
  return Array.from({ length: polarCells }, (_, polar) => {
    const ring = wattsPerSr.subarray(polar * azimuthCells, (polar + 1) * azimuthCells);
    return ring.reduce((a, b) => a + b, 0) / azimuthCells;
  });
}

/** Power in all directions, W. */
function watts({ polarCells, polarToDeg }: AnglesArray, intensity: readonly number[]): number {
  const step = (polarToDeg * Math.PI) / 180 / polarCells;
  return intensity.reduce(
    (sum, value, i) => sum + value * 2 * Math.PI * (Math.cos(i * step) - Math.cos((i + 1) * step)),
    0,
  );
}

function place(degrees: number, radius: number): string {
  const angle = (degrees * Math.PI) / 180;
  return `${round(CENTRE[0] + radius * Math.sin(angle))} ${round(CENTRE[1] - radius * Math.cos(angle))}`;
}

function spokeLabel(degrees: number): readonly [number, number] {
  const angle = (degrees * Math.PI) / 180;
  const radius = RADIUS + 13;
  return [round(CENTRE[0] + radius * Math.sin(angle)), round(CENTRE[1] - radius * Math.cos(angle) + 4)];
}
