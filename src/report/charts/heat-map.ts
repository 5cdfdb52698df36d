import { markup } from '../markup.js';
import { significant } from '../number-format.js';
import { bottomAxis, leftAxis } from './axis.js';
import { colourBar } from './colour-bar.js';
import { type Picture, type PictureText, picture, round } from './picture.js';
import { profile } from './profile.js';
import { type Plane, planePng } from './raster.js';

export interface HeatMap extends PictureText {
  readonly plane: Plane;
  /** Low and high end across and up, in the unit of the axes: mm, or degrees on a sphere. */
  readonly extentMm: readonly [readonly [number, number], readonly [number, number]];
  /** Length that fills the drawing, mm, so that several maps share a scale. */
  readonly spanMm: number;
  readonly axes: readonly [string, string];
  readonly axisUnit: ' mm' | '°';
  readonly maximum: number;
  readonly mean: number;
  readonly unit: string;
  /** Quantity of the colour scale. */
  readonly quantity: string;
  /** Cell the cross-sections go through, across and up. */
  readonly at: readonly [number, number];
}

const LEFT = 50;
const TOP = 8;
const LONGEST = 292;
const SHORTEST = 56;
const PROFILE = 44;
const WIDTH = LEFT + LONGEST + 12;

/** A map with its axes, its colour scale, and cross-sections through one cell. */
export function heatMap(map: HeatMap): Picture {
  const { plane, extentMm, spanMm, axes, axisUnit, maximum, mean, unit, at } = map;
  const label = (axis: string) => `${axis}, ${axisUnit === '°' ? '°' : 'mm'}`;
  const [width, height] = plotSize(extentMm, spanMm);
  const bottom = TOP + height;
  const barAt = bottom + 58;
  const profilesAt = barAt + 64;
  const [u, v] = at;
  const values = Array.from(plane.values);
  const row = values.slice(v * plane.cellsU, (v + 1) * plane.cellsU);
  const column = Array.from({ length: plane.cellsV }, (_, i) => values[u + i * plane.cellsU]);
  const centre = (axis: 0 | 1, cells: number) => cellCentre(extentMm[axis], cells, at[axis]);
  const crossX = LEFT + ((u + 0.5) / plane.cellsU) * width;
  const crossY = bottom - ((v + 0.5) / plane.cellsV) * height;
  const short = (value: number) => significant(value, 3).replace('-', '−');
  return picture(
    map,
    WIDTH,
    profilesAt + 2 * PROFILE + 34,
    markup`<image href="${planePng(plane, maximum)}" x="${LEFT}" y="${TOP}" width="${round(width)}" height="${round(height)}" preserveAspectRatio="none"/><rect class="frame" x="${LEFT}" y="${TOP}" width="${round(width)}" height="${round(height)}"/><g class="cross"><line class="cross-u" x1="${round(crossX)}" x2="${round(crossX)}" y1="${TOP}" y2="${round(bottom)}"/><line class="cross-v" x1="${LEFT}" x2="${round(LEFT + width)}" y1="${round(crossY)}" y2="${round(crossY)}"/></g>${bottomAxis(
      { domain: extentMm[0], range: [LEFT, LEFT + width], label: label(axes[0]), ticks: Math.max(3, width / 45) },
      bottom,
    )}${leftAxis(
      { domain: extentMm[1], range: [bottom, TOP], label: label(axes[1]), ticks: Math.max(2, height / 36) },
      LEFT,
      12,
    )}${colourBar(`${map.id}-scale`, { x: LEFT, y: barAt, width: LONGEST }, { maximum, mean, label: `${map.quantity}, ${unit}` })}${profile(
      'u',
      { x: LEFT, y: profilesAt, width: LONGEST, height: PROFILE },
      row,
      maximum,
      `over ${axes[0]}; ${axes[1]} = ${short(centre(1, plane.cellsV))}${axisUnit}`,
    )}${profile(
      'v',
      { x: LEFT, y: profilesAt + PROFILE + 26, width: LONGEST, height: PROFILE },
      column,
      maximum,
      `over ${axes[1]}; ${axes[0]} = ${short(centre(0, plane.cellsU))}${axisUnit}`,
    )}`,
    'heat-map',
  );
}

/** Place of a cell's centre, in the unit of the ends. */
export function cellCentre([low, high]: readonly [number, number], cells: number, cell: number): number {
  return low + ((cell + 0.5) / cells) * (high - low);
}

/** True to scale, but never thinner than can be seen. */
export function isStretched([u, v]: HeatMap['extentMm'], spanMm: number): boolean {
  return (LONGEST * Math.min(u[1] - u[0], v[1] - v[0])) / spanMm < SHORTEST;
}

function plotSize([u, v]: HeatMap['extentMm'], spanMm: number): readonly [number, number] {
  const length = ([low, high]: readonly [number, number]) => Math.max(SHORTEST, (LONGEST * (high - low)) / spanMm);
  return [length(u), length(v)];
}
