import { area, curveLinear } from 'd3-shape';
import { colourMatching } from '../../materials/observer.js';
import { screenHex } from '../light-colour.js';
import { type Markup, markup } from '../markup.js';
import { significant } from '../number-format.js';
import { axisScale, bottomAxis } from './axis.js';
import { type BackgroundCurve, curveDefinitions, curveLegend, curvesBehind, LEGEND_LINE } from './background-curves.js';
import { type Picture, picture, round } from './picture.js';

export interface SpectrumStrip {
  readonly title: string;
  readonly light: 'pump' | 'emitted';
  /** Photons per pump photon. */
  readonly photonFraction: number;
  /** Photons per pump photon per nm, one per wavelength. */
  readonly values: Float64Array;
  /** Another spectrum whose shape, brought to the same area, is drawn as a line over this one; null for none. */
  readonly shape: Float64Array | null;
}

const WIDTH = 372;
const LEFT = 8;
const RIGHT = 364;
/** Room for the axis of the finishes. */
const AXIS = 38;
const STRIP = 52;
const PITCH = 84;
/** Emitted light is drawn in bins of about this many to the whole axis. */
const BINS = 110;

/**
 * Spectra one under another over the same wavelengths, each to its own height, with the curves of dyes and finishes behind.
 * @param id unique on the page
 * @param curves over the same wavelengths
 */
export function spectraStrips(
  id: string,
  wavelengthsNm: Float64Array,
  strips: readonly SpectrumStrip[],
  curves: readonly BackgroundCurve[] = [],
): Picture {
  const domain = litRange(wavelengthsNm, strips);
  const finishes = curves.some(({ kind }) => kind === 'finish');
  const right = finishes ? RIGHT - AXIS : RIGHT;
  const axis = { domain, range: [LEFT, right] as const, label: 'wavelength, nm', ticks: 7 };
  const at = axisScale(axis);
  const top = curves.length === 0 ? 0 : curves.length * LEGEND_LINE + 8;
  const bottom = top + strips.length * PITCH + 14;
  return picture(
    {
      id,
      title: 'Spectra',
      description: `Photons per pump photon and nm against wavelength from ${significant(domain[0], 3)} to ${significant(domain[1], 3)} nm: ${strips.map(({ title, photonFraction }) => `${title}, ${significant(photonFraction, 4)} photons per pump photon`).join('; ')}.${curves.length === 0 ? '' : ` Lines behind: ${curves.map(({ words }) => words).join('; ')}.`}`,
    },
    WIDTH,
    bottom + 32,
    markup`${curves.length === 0 ? null : markup`${curveDefinitions(id, curves, wavelengthsNm, domain, at, STRIP)}${curveLegend(curves, LEFT, 12)}`}${strips.map(
      (strip, i) => {
        const base = top + (i + 1) * PITCH;
        return markup`${oneStrip(strip, wavelengthsNm, domain, at, base, right)}${curvesBehind(id, curves, base, ({ kind }) => isBehind(kind, strip))}${finishes ? shareAxis(right, base) : null}`;
      },
    )}${rainbow(`${id}-rainbow`, domain, bottom - 9, right)}${bottomAxis(axis, bottom)}`,
    'spectra',
  );
}

/** Emission tells nothing behind pump light, and is drawn at equal area where a shape is. */
function isBehind(kind: BackgroundCurve['kind'], { light, shape }: SpectrumStrip): boolean {
  return kind !== 'emission' || (light === 'emitted' && shape === null);
}

/** 0 to 100 % beside a strip, for the finishes. */
function shareAxis(x: number, base: number): Markup {
  const top = base - STRIP;
  return markup`<g class="axis"><line x1="${x + 3}" x2="${x + 3}" y1="${top}" y2="${base}"/><line x1="${x + 3}" x2="${x + 6}" y1="${top}" y2="${top}"/><line x1="${x + 3}" x2="${x + 6}" y1="${base}" y2="${base}"/><text x="${x + 9}" y="${top + 4}">100 %</text><text x="${x + 9}" y="${base}">0</text></g>`;
}

function oneStrip(
  { title, light, photonFraction, values, shape }: SpectrumStrip,
  nm: Float64Array,
  domain: readonly [number, number],
  at: (nm: number) => number,
  base: number,
  right: number,
): Markup {
  const points = bins(nm, values, domain, light);
  const highest = Math.max(...points.map(([, y]) => y), Number.MIN_VALUE);
  const outline = shape === null ? [] : scaledTo(bins(nm, shape, domain, light), points);
  const top = Math.max(highest, ...outline.map(([, y]) => y));
  const draw = area<readonly [number, number]>()
    .x(([x]) => round(at(x)))
    .y0(base)
    .y1(([, y]) => round(base - (STRIP * y) / top))
    .curve(curveLinear);
  return markup`<text class="flow-words" x="${LEFT}" y="${base - STRIP - 18}">${title}</text><text class="caption" x="${LEFT}" y="${base - STRIP - 5}">${significant(photonFraction, 4)} per pump photon; peak ${significant(highest, 2)} per nm</text><path class="spectrum ${light}" d="${draw(points) ?? ''}"/>${
    outline.length === 0 ? null : markup`<path class="shape" d="${draw.lineY1()(outline) ?? ''}"/>`
  }<line class="base" x1="${LEFT}" x2="${right}" y1="${base}" y2="${base}"/>`;
}

/** Where any of the spectra has light, with a margin, nm. */
function litRange(nm: Float64Array, strips: readonly SpectrumStrip[]): readonly [number, number] {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const { values, photonFraction } of strips) {
    // Tails of a few photons would squeeze the rest.
    const least = 1e-3 * Math.max(photonFraction / 100, ...values);
    values.forEach((value, i) => {
      if (value <= least) return;
      low = Math.min(low, nm[i]);
      high = Math.max(high, nm[i]);
    });
  }
  if (!(high > low)) return [nm[0] ?? 400, nm[nm.length - 1] ?? 700];
  return [low - 8, high + 8];
}

/** Means over bins, so that counting noise does not hide the shape; pump lines are kept as fine as they were recorded. */
function bins(
  nm: Float64Array,
  values: Float64Array,
  [low, high]: readonly [number, number],
  light: 'pump' | 'emitted',
): readonly (readonly [number, number])[] {
  const inside = Array.from(nm, (_, i) => i).filter((i) => nm[i] >= low && nm[i] <= high);
  const size = light === 'pump' ? 1 : Math.max(1, Math.round(inside.length / BINS));
  const points: (readonly [number, number])[] = [];
  for (let i = 0; i < inside.length; i += size) {
    const group = inside.slice(i, i + size);
    const mean = (of: Float64Array) => group.reduce((sum, at) => sum + of[at], 0) / group.length;
    points.push([mean(nm), mean(values)]);
  }
  return points;
}

function scaledTo(shape: readonly (readonly [number, number])[], like: readonly (readonly [number, number])[]) {
  const total = (points: readonly (readonly [number, number])[]) => points.reduce((sum, [, y]) => sum + y, 0);
  const factor = total(shape) > 0 ? total(like) / total(shape) : 0;
  return shape.map(([x, y]) => [x, y * factor] as const);
}

/** A ribbon that tells the colour of each wavelength. */
function rainbow(id: string, [low, high]: readonly [number, number], y: number, right: number): Markup {
  const stops = Array.from({ length: 33 }, (_, i) => i / 32);
  return markup`<defs><linearGradient id="${id}">${stops.map(
    (share) => markup`<stop offset="${round(share)}" stop-color="${lineColour(low + share * (high - low))}"/>`,
  )}</linearGradient></defs><rect x="${LEFT}" y="${y}" width="${right - LEFT}" height="6" fill="url(#${id})"/>`;
}

function lineColour(nm: number): string {
  const [x, y, z] = colourMatching(nm);
  const sum = x + y + z;
  return sum > 0 ? screenHex(x / sum, y / sum) : '#777777';
}
