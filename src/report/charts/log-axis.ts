import { scaleLog } from 'd3-scale';
import { type Markup, markup } from '../markup.js';
import { round } from './picture.js';

/** An axis of powers of ten. */
export interface LogAxis {
  /** Low and high end, above 0. */
  readonly domain: readonly [number, number];
  readonly range: readonly [number, number];
  readonly label: string;
}

export function logScale({ domain, range }: LogAxis): (value: number) => number {
  return scaleLog(domain, range);
}

/** Ticks at 1, 2 and 5 of each decade, numbers at those that find room, and the title, below a plot whose lower edge is at `y`. */
export function bottomLogAxis(axis: LogAxis, y: number): Markup {
  const at = logScale(axis);
  const [from, to] = axis.range;
  const ticks = ticksOf(axis.domain);
  return markup`<g class="axis"><line x1="${round(from)}" x2="${round(to)}" y1="${round(y)}" y2="${round(y)}"/>${ticks.map(
    ({ value, text }) =>
      markup`<line x1="${round(at(value))}" x2="${round(at(value))}" y1="${round(y)}" y2="${round(y + 4)}"/><text x="${round(at(value))}" y="${round(y + 15)}" text-anchor="middle">${text}</text>`,
  )}<text class="axis-title" x="${round((from + to) / 2)}" y="${round(y + 30)}" text-anchor="middle">${axis.label}</text></g>`;
}

function ticksOf([low, high]: readonly [number, number]): { value: number; text: string }[] {
  const ticks: { value: number; text: string }[] = [];
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power++) {
    for (const digit of [1, 2, 5]) {
      const value = Number(`${digit}e${power}`);
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9)) ticks.push({ value, text: numberText(value) });
    }
  }
  return ticks;
}

const numberText = (value: number): string =>
  value >= 1e4 || value < 1e-3 ? value.toExponential(0).replace('e+', 'e').replace('-', '−') : String(value);
