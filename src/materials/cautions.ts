/** Cautions for what a design uses; figures from data/safety.csv and the library. No substitute for a safety data sheet. */
import { numberIn, readTable } from './read-table.js';
import { readSolvent, solventNames } from './solvents.js';

export interface Hazards {
  /** Optical power of all pumps, W. */
  readonly pumpWatts: number;
  /** Library names of the liquids; any other name gets the general caution. */
  readonly solvents: readonly string[];
  readonly dyes: readonly string[];
}

const DEFER = 'follow your local codes and licensed practice';

/** Liquids with a flash point up to this count as flammable (UN Globally Harmonized System, chapter 2.6; from memory). */
const FLAMMABLE_UP_TO_C = 60;

/**
 * Short sentences, the gravest first, each of which defers to local codes and licensed practice.
 * @throws RangeError for a power that is negative or not finite
 */
export function cautionsFor({ pumpWatts, solvents, dyes }: Hazards): readonly string[] {
  if (!(pumpWatts >= 0 && Number.isFinite(pumpWatts))) throw new RangeError(`no pump power: ${pumpWatts} W`);
  const liquids = [...new Set(solvents)];
  return [
    ...laserCaution(pumpWatts),
    ...liquids.flatMap(liquidCautions),
    ...(liquids.length > 0 && pumpWatts > 0 ? [HOT_LIQUID] : []),
    ...dyeCautions([...new Set(dyes)]),
  ];
}

/** By the limits of continuous visible light; a pulsed or invisible beam may fall into a higher class. */
function laserCaution(watts: number): string[] {
  if (watts === 0) return [];
  const milliwatts = watts * 1000;
  const power = `${Number(watts.toPrecision(3))} W`;
  const limit = (item: string) => numberIn(safetyRow('laser', item), 'value');
  const above3B = limit('class 3B CW limit');
  if (milliwatts > above3B) {
    return [
      `Laser pumps of ${power} are class 4 (IEC 60825-1: above ${above3B} mW): direct and scattered beams injure eye and skin ` +
        `and start fires; enclose and interlock them, wear eyewear for the wavelength, and ${DEFER}.`,
    ];
  }
  const laserClass = milliwatts > limit('class 3R visible CW limit') ? '3B' : '3R or lower';
  return [
    `Laser pumps of ${power} may be class ${laserClass} (IEC 60825-1): keep the direct beam and its mirror images away from ` +
      `eyes, and ${DEFER}.`,
  ];
}

function liquidCautions(name: string): string[] {
  if (name === 'water') return [];
  const flashPoint = solventNames().includes(name) ? (readSolvent(name).thermal?.flashPointC ?? null) : null;
  if (flashPoint === null) {
    const what = name === 'custom' ? 'a liquid of your own' : name;
    return [`No safety figures are held for ${what}: read its safety data sheet, and ${DEFER}.`];
  }
  const fire =
    flashPoint <= FLAMMABLE_UP_TO_C
      ? `${capital(name)} is flammable (flash point ${flashPoint} °C): seal the cell, leave no free liquid surface near the beam, ` +
        `keep sparks away and an extinguisher at hand, and ${DEFER}.`
      : `${capital(name)} burns once it is hotter than its flash point of ${flashPoint} °C, which a pumped spot can reach: ` +
        `seal the cell, and ${DEFER}.`;
  return name === 'methanol'
    ? [fire, `Methanol is poisonous if swallowed, breathed or left on skin, and can blind: ventilate, and ${DEFER}.`]
    : [fire];
}

const HOT_LIQUID =
  'Liquid heated in a closed cell builds up pressure, and near boiling its bubbles scatter the pump out: give the cell a relief, ' +
  `keep the hottest spot 15 K below boiling (rule of thumb), and ${DEFER}.`;

function dyeCautions(dyes: readonly string[]): string[] {
  const rhodamines = dyes.filter((dye) => dye.startsWith('rhodamine'));
  const others = dyes.filter((dye) => !dye.startsWith('rhodamine'));
  return [
    ...(rhodamines.length === 0
      ? []
      : [
          `${capital(rhodamines.join(', '))}: toxic and staining; keep off skin, do not breathe the dust, and ${DEFER}.`,
        ]),
    ...(others.length === 0
      ? []
      : [`${capital(others.join(', '))}: read the safety data sheet before handling powder or waste, and ${DEFER}.`]),
  ];
}

function safetyRow(topic: string, item: string) {
  const row = readTable('safety.csv').rows.find((entry) => entry.topic === topic && entry.item === item);
  if (row === undefined) throw new Error(`safety.csv has no ${item} of ${topic}`);
  return row;
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
