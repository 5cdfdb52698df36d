import { scaleLinear } from 'd3-scale';
import { type Markup, markup } from '../markup.js';
import { round } from './picture.js';

export interface Axis {
  /** Low and high end in the unit of the axis. */
  readonly domain: readonly [number, number];
  /** Where they lie in the drawing. */
  readonly range: readonly [number, number];
  readonly label: string;
  /** About how many ticks. */
  readonly ticks: number;
}

export function axisScale({ domain, range }: Axis): (value: number) => number {
  return scaleLinear(domain, range);
}

/** Values at which the ticks of an axis stand. */
export const axisTicks = ({ domain, range, ticks }: Axis): number[] => scaleLinear(domain, range).ticks(ticks);

/** Ticks, numbers and title below a plot whose lower edge is at `y`. */
export function bottomAxis(axis: Axis, y: number): Markup {
  const at = axisScale(axis);
  const [from, to] = axis.range;
  return markup`<g class="axis"><line x1="${round(from)}" x2="${round(to)}" y1="${round(y)}" y2="${round(y)}"/>${ticksOf(
    axis,
  ).map(
    ({ value, text }) =>
      markup`<line x1="${round(at(value))}" x2="${round(at(value))}" y1="${round(y)}" y2="${round(y + 4)}"/>${bottomNumber(text, at(value), to, y + 15)}`,
  )}<text class="axis-title" x="${round((from + to) / 2)}" y="${round(y + 29)}" text-anchor="middle">${axis.label}</text></g>`;
}

/** Centred below its tick, but a long one at the end of the axis is pulled in, for there the drawing ends. */
function bottomNumber(text: string, x: number, end: number, y: number): Markup {
  const pulled = text.length > 2 && end - x < 3 * text.length;
  return markup`<text x="${round(pulled ? end + 7 : x)}" y="${round(y)}" text-anchor="${pulled ? 'end' : 'middle'}">${text}</text>`;
}

/** Ticks and numbers left of a plot whose left edge is at `x`; the title stands upright beside them. */
export function leftAxis(axis: Axis, x: number, titleAt: number): Markup {
  const at = axisScale(axis);
  const [from, to] = axis.range;
  const middle = round((from + to) / 2);
  return markup`<g class="axis"><line x1="${round(x)}" x2="${round(x)}" y1="${round(from)}" y2="${round(to)}"/>${ticksOf(
    axis,
  ).map(
    ({ value, text }) =>
      markup`<line x1="${round(x - 4)}" x2="${round(x)}" y1="${round(at(value))}" y2="${round(at(value))}"/><text x="${round(x - 6)}" y="${round(at(value) + 4)}" text-anchor="end">${text}</text>`,
  )}<text class="axis-title" transform="translate(${round(titleAt)} ${middle}) rotate(-90)" text-anchor="middle">${axis.label}</text></g>`;
}

function ticksOf({ domain, range, ticks }: Axis): { value: number; text: string }[] {
  const scale = scaleLinear(domain, range);
  const format = scale.tickFormat(ticks);
  return scale.ticks(ticks).map((value) => ({ value, text: tidy(value, format(value)) }));
}

/** Very large and very small ticks as powers of ten, else they run into each other. */
function tidy(value: number, text: string): string {
  const size = Math.abs(value);
  return size !== 0 && (size >= 1e6 || size < 1e-4)
    ? value.toExponential(0).replace('-', '−')
    : text.replaceAll(',', '\u00a0');
}
