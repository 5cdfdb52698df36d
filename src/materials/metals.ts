import { type LayerMaterialData, unknownName } from './material-data.js';
import { opticalConstants } from './optical-constants.js';

export const metalNames = (): readonly string[] => [
  'aluminium',
  'silver',
  'gold',
  'aluminium-template-stripped',
  'silver-template-stripped',
  'silver-fit',
  'gold-template-stripped',
];

const STATUS = 'verified; bare opaque films, and published ones differ by up to 6 points of reflectance for silver';

/** Complex index of an opaque film, 400–700 nm, held beyond. @throws RangeError for an unknown name. */
export function readMetal(name: string): LayerMaterialData {
  if (!metalNames().includes(name)) throw unknownName('metal', name, metalNames());
  return { ...opticalConstants('metals.csv', name), status: STATUS };
}
