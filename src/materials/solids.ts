import { readDispersion } from './dispersion.js';
import { type MaterialData, unknownName } from './material-data.js';

const DISPERSION: Readonly<Record<string, string | undefined>> = {
  'borosilicate-crown': 'borosilicate-crown',
  'fused-silica': 'fused-silica',
  pmma: 'pmma',
  polycarbonate: 'polycarbonate',
  sapphire: 'sapphire-ordinary',
  'magnesium-fluoride': 'magnesium-fluoride-ordinary',
};

export const solidNames = (): readonly string[] => Object.keys(DISPERSION);

/** @throws RangeError for an unknown name. */
export function readSolid(name: string): MaterialData {
  const row = Object.hasOwn(DISPERSION, name) ? DISPERSION[name] : undefined;
  if (row === undefined) throw unknownName('solid', name, solidNames());
  const { index, rangeNm, source, status } = readDispersion(row);
  return {
    name,
    kind: 'solid',
    index,
    // The reference tables hold no absorption of solids; a design may state its own.
    absorption: () => 0,
    thermal: null,
    rangeNm,
    source,
    status: `index: ${status}; absorption: no data, taken as lossless`,
  };
}
