/** What thin films are made of: films measured as such, metals, and the solids of the library, taken as lossless. */
import { type LayerMaterialData, unknownName } from './material-data.js';
import { metalNames, readMetal } from './metals.js';
import { opticalConstants } from './optical-constants.js';
import { readSolid, solidNames } from './solids.js';

const FILMS = [
  'titanium-dioxide-film-ald',
  'titanium-dioxide-film-200nm',
  'tantalum-pentoxide-film',
  'silicon-dioxide-film',
  'magnesium-fluoride-film',
];
const STATUS = 'verified; the index of a film depends on how it was deposited';

export const layerMaterialNames = (): readonly string[] => [...FILMS, ...metalNames(), ...solidNames()];

/** Complex index of a layer, held beyond its range. @throws RangeError for an unknown name. */
export function readLayerMaterial(name: string): LayerMaterialData {
  if (FILMS.includes(name)) return { ...opticalConstants('films.csv', name), status: STATUS };
  if (metalNames().includes(name)) return readMetal(name);
  if (!solidNames().includes(name)) throw unknownName('layer material', name, layerMaterialNames());
  const { index, rangeNm, source, status } = readSolid(name);
  return { name, n: index, k: () => 0, rangeNm, source, status };
}
