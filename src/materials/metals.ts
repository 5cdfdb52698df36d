import { linearCurve } from '../numerics/interpolate.js';
import { type MetalData, unknownName } from './material-data.js';
import { numberIn, readTable } from './read-table.js';

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
export function readMetal(name: string): MetalData {
  if (!metalNames().includes(name)) throw unknownName('metal', name, metalNames());
  const { rows, notes } = readTable('metals.csv');
  const own = rows.filter(({ material }) => material === name);
  const nm = own.map((row) => numberIn(row, 'wavelength_nm'));
  const curve = (column: 'n' | 'k') =>
    linearCurve(
      nm,
      own.map((row) => numberIn(row, column)),
      { below: 'hold', above: 'hold' },
    );
  const source = notes.find((note) => note.startsWith(`${name}:`));
  if (source === undefined) throw new Error(`metals.csv names no source for ${name}`);
  return { name, n: curve('n'), k: curve('k'), source: source.slice(name.length + 1).trim(), status: STATUS };
}
