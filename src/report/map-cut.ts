import { heatMap, isStretched } from './charts/heat-map.js';
import type { Picture } from './charts/picture.js';
import { AXIS_LETTERS, axesOf, axisUnit, extents, mapWords, middleCell, placeWords } from './map-words.js';
import { shortName } from './name-text.js';
import { significant } from './number-format.js';
import { cutOf, peakCell, type ShownMap } from './shown-map.js';

/** A plane through a map: the axes it spans, and the one it stands across. */
export interface MapCut {
  readonly across: readonly [number, number];
  readonly along: number;
  /** Cell the cross-sections go through. */
  readonly cell: readonly [number, number, number];
}

/** The face itself, or the three cuts through the most strongly lit voxel. */
export function cutsOf(map: ShownMap): readonly MapCut[] {
  if (!isVolume(map)) return [{ across: [0, 1], along: 2, cell: middleCell(map) }];
  const cell = peakCell(map);
  return [
    { across: [0, 1], along: 2, cell },
    { across: [0, 2], along: 1, cell },
    { across: [1, 2], along: 0, cell },
  ];
}

export const isVolume = ({ record: { shape } }: ShownMap): boolean => shape.length === 3;

/** @param id unique on the page */
export function cutPicture(map: ShownMap, id: string, { across: [a, b], along, cell }: MapCut): Picture {
  const { record } = map;
  const names = axesOf(map);
  const ends = extents(map);
  const volume = isVolume(map);
  const where = volume ? `, cut at ${placeWords(map, along, cell[along])}` : '';
  return heatMap({
    id,
    title: `${mapWords(map)} ${shortName(record.where)}${where}`,
    description: `A map over ${shortName(names[a])} and ${shortName(names[b])} in ${axisUnit(map) === '°' ? 'degrees' : 'mm'}, dark for 0 and light for ${significant(record.maximum, 4)} ${record.unit}; mean ${significant(record.mean, 4)}, least ${significant(record.minimum, 4)}. Below it the colour scale and a cross-section along either axis.`,
    plane: cutOf(map, [a, b], along, cell[along]),
    extentMm: [ends[a], ends[b]],
    spanMm: spanOf(map),
    axes: [shortName(names[a], AXIS_LETTERS), shortName(names[b], AXIS_LETTERS)],
    axisUnit: axisUnit(map),
    maximum: record.maximum,
    mean: record.mean,
    unit: record.unit,
    quantity: volume ? 'absorbed power density' : 'irradiance',
    at: [cell[a], cell[b]],
  });
}

/** The short side is drawn longer than to scale. */
export function isCutStretched(map: ShownMap, { across: [a, b] }: MapCut): boolean {
  const ends = extents(map);
  return isStretched([ends[a], ends[b]], spanOf(map));
}

function spanOf(map: ShownMap): number {
  return Math.max(...extents(map).map(([low, high]) => high - low));
}
