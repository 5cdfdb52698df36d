/** Curves of dyes and finishes behind the strips of the spectra. */
import type { RunArrays } from '../../record/run-arrays.js';
import type { RunRecord } from '../../record/run-record.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { round } from './picture.js';

export interface BackgroundCurve {
  readonly kind: 'absorption' | 'emission' | 'finish';
  /** For the legend. */
  readonly words: string;
  /** A finish: 0..1. A dye: in any unit; it is drawn to its peak within the range shown. */
  readonly values: Float64Array;
}

/** More lines than this behind one strip could not be told apart. */
const MOST = 8;
const DASHES = 4;
/** Steps of a drawn line, nm. */
const STEP_NM = 1;
export const LEGEND_LINE = 15;

/** Dyes' absorption and emission; of finishes the transmittance, or the reflectance of those that let nothing through. */
export function backgroundCurves({ curves }: RunRecord, arrays: RunArrays): readonly BackgroundCurve[] {
  const of = (
    kind: BackgroundCurve['kind'],
    wanted: readonly RunRecord['curves'][number][],
    words: (name: string) => string,
  ) =>
    wanted.flatMap(({ id, name, where }): BackgroundCurve[] => {
      const values = arrays.curves.columns.find((column) => column.id === id)?.values;
      if (values === undefined || !values.some((value) => value > 0)) return [];
      return [
        { kind, values, words: words(`${shortName(name, 18)}${where === null ? '' : ` in ${shortName(where, 14)}`}`) },
      ];
    });
  const what = (wanted: RunRecord['curves'][number]['what']) => curves.filter((curve) => curve.what === wanted);
  const passing = new Set(what('finish-transmittance').map(({ name }) => name));
  const opaque = what('finish-reflectance').filter(({ name }) => !passing.has(name));
  return [
    ...of('absorption', what('dye-absorption'), (name) => `absorption of ${name}, to its peak`),
    ...of('emission', what('dye-emission'), (name) => `emission of ${name}, to its peak`),
    ...of('finish', what('finish-transmittance'), (name) => `${name} lets through at 0°, 0 to 100 %`),
    ...of('finish', opaque, (name) => `${name} reflects at 0°, 0 to 100 %`),
  ].slice(0, MOST);
}

/** One path per curve, from height 0 up to −`height`, defined once and used behind each strip. */
export function curveDefinitions(
  id: string,
  curves: readonly BackgroundCurve[],
  nm: Float64Array,
  [low, high]: readonly [number, number],
  at: (nm: number) => number,
  height: number,
): Markup {
  return markup`<defs>${curves.map(({ kind, values }, i) => {
    const points = pointsOf(values, nm, low, high);
    const top = kind === 'finish' ? 1 : Math.max(...points.map(([, y]) => y), Number.MIN_VALUE);
    const path = points.map(([x, y], k) => `${k === 0 ? 'M' : 'L'}${round(at(x))} ${round((-height * y) / top)}`);
    return markup`<path id="${id}-curve-${i}" d="${path.join('')}"/>`;
  })}</defs>`;
}

/** The curves behind a strip that stands on `base`. */
export function curvesBehind(
  id: string,
  curves: readonly BackgroundCurve[],
  base: number,
  shown: (curve: BackgroundCurve) => boolean,
): Markup {
  return markup`${curves.map((curve, i) => (shown(curve) ? markup`<use href="#${id}-curve-${i}" class="${classOf(curves, i)}" transform="translate(0 ${base})"/>` : null))}`;
}

/** A line of the legend for each curve. */
export function curveLegend(curves: readonly BackgroundCurve[], x: number, y: number): Markup {
  return markup`${curves.map(({ words }, i) => {
    const at = y + i * LEGEND_LINE;
    return markup`<line class="${classOf(curves, i)}" x1="${x}" x2="${x + 22}" y1="${at - 4}" y2="${at - 4}"/><text class="caption" x="${x + 28}" y="${at}">${words}</text>`;
  })}`;
}

/** Curves of one kind share a colour and differ in their dashes. */
function classOf(curves: readonly BackgroundCurve[], i: number): string {
  const before = curves.slice(0, i).filter(({ kind }) => kind === curves[i].kind).length;
  const dash = (before + (curves[i].kind === 'emission' ? 2 : 0)) % DASHES;
  return `curve curve-${curves[i].kind} curve-dash-${dash}`;
}

/** Points at about the step, and none in the middle of a level stretch. */
function pointsOf(
  values: Float64Array,
  nm: Float64Array,
  low: number,
  high: number,
): readonly (readonly [number, number])[] {
  const points: (readonly [number, number])[] = [];
  nm.forEach((x, i) => {
    if (x < low || x > high) return;
    const last = points.at(-1);
    if (last !== undefined && x - last[0] < STEP_NM - 1e-9) return;
    const before = points.at(-2);
    if (last !== undefined && before !== undefined && last[1] === values[i] && before[1] === values[i]) points.pop();
    points.push([x, values[i]]);
  });
  return points;
}
