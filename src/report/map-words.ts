/** Maps in words: what they show, their numbers, and noise told from structure. */
import { mapWords as wordsOfKind } from '../terms/map-words.js';
import { cellCentre } from './charts/heat-map.js';
import { shortName } from './name-text.js';
import { significant } from './number-format.js';
import type { ShownMap } from './shown-map.js';

/** Longest name of an axis in a picture. */
export const AXIS_LETTERS = 16;

/** What a map shows, in words, without its place. */
export function mapWords({ record: { what } }: ShownMap): string {
  const words = wordsOfKind(what);
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** Mean, least and most of a map, and its power. */
export function mapNumbers({ record }: ShownMap): { readonly mean: string; readonly others: string } {
  return {
    mean: significant(record.mean, 4),
    others: `${record.unit} mean, ${significant(record.minimum, 4)} least, ${significant(record.maximum, 4)} most, ${significant(record.power, 4)}\u00a0W in all`,
  };
}

/** The noise told from the structure, in words. */
export function noiseWords({ record, lit, joined }: ShownMap, histories: number, pumpWatts: number): string {
  const photons = (histories * record.power) / Math.max(pumpWatts, Number.MIN_VALUE) / Math.max(1, lit);
  const join = joined ? ' Shown in coarser cells than the run has.' : '';
  if (!(photons > 0)) return `No light was seen here.${join}`;
  const noise = 1 / Math.sqrt(photons);
  const behind = `About ${significant(photons, 2)} photons stand behind a cell on average: ${significant(100 * noise, 2)} % of such a cell is counting noise.`;
  if (record.variation === null) return behind + join;
  const real = `Unevenness with the noise taken out: ${significant(100 * record.variation, 2)} %`;
  const verdict =
    record.variation > 2 * noise
      ? 'what you see is structure.'
      : record.variation > noise / 2
        ? 'structure and speckle are alike in size; look at the larger shapes.'
        : 'the speckle you see is noise; more histories would smooth it.';
  return `${behind} ${real}; ${verdict}${join}`;
}

export const place = (mm: number): string => significant(mm, 3).replace('-', '−');

export function axesOf({ record: { axes } }: ShownMap): readonly string[] {
  return [0, 1, 2].map((axis) => axes[axis] ?? '');
}

/** In mm, or degrees on a sphere. */
export function extents({ record: { extentMm, extentDeg } }: ShownMap): readonly (readonly [number, number])[] {
  return [0, 1, 2].map((axis) => (extentDeg ?? extentMm)[axis] ?? [0, 0]);
}

export const axisUnit = ({ record: { extentDeg } }: ShownMap): ' mm' | '°' => (extentDeg === undefined ? ' mm' : '°');

export function middleCell({ cells }: ShownMap): readonly [number, number, number] {
  return [cells[0] >> 1, cells[1] >> 1, 0];
}

/** Name and place of a cut along an axis, as in 'z = −0.25 mm'. */
export function placeWords(map: ShownMap, along: number, cell: number): string {
  const name = shortName(axesOf(map)[along], AXIS_LETTERS);
  return `${name} = ${place(cellCentre(extents(map)[along], map.cells[along], cell))} mm`;
}
