/** A small map of the exit, or of the first face that has one, for the terminal. */
import type { MapArray, RunArrays } from '../../record/run-arrays.js';
import type { MapRecord, RunRecord } from '../../record/run-record.js';
import type { ColourDepth } from '../colour-depth.js';
import { significant } from '../number-format.js';
import { safeText } from '../safe-text.js';
import type { TerminalStyle } from '../terminal-style.js';
import { joinCells } from './join-cells.js';
import { paintCells } from './paint-cells.js';

/** With heading, axis and caption 14 lines, 60 columns. */
const MOST_COLUMNS = 50;
const MOST_ROWS = 18;
const FEWEST = 2;
const MARGIN = 10;
/** Photons behind a patch: with fewer, its speckle would pass for structure. Their noise is 5 %. */
const PHOTONS_A_PATCH = 400;

const WORDS: Readonly<Record<string, string>> = { exit: 'light out of', 'pumped-face': 'pump light onto' };

/** Lines of the map; none where no face was lit. */
export function faceMap(record: RunRecord, arrays: RunArrays, style: TerminalStyle, depth: ColourDepth): string[] {
  const faces = record.maps.filter(({ shape, power }) => shape.length === 2 && power > 0);
  const map = faces.find(({ what }) => what === 'exit') ?? faces[0];
  const array = arrays.maps.find(({ id }) => id === map?.id);
  if (map === undefined || array === undefined) return [];
  const heading = style.bold(`Map of the ${WORDS[map.what] ?? 'light at'} ${safeText(map.where, 40)}`);
  const photons = (record.run.histories * map.power) / Math.max(record.figures.pumpPower.value ?? 0, Number.MIN_VALUE);
  if (photons < FEWEST * PHOTONS_A_PATCH) {
    return [heading, style.dim(`  about ${significant(photons, 2)} photons came here: too few for a map`)];
  }
  return [heading, ...field(map, array, photons, style, depth), ...caption(map, style)];
}

function field(map: MapRecord, array: MapArray, photons: number, style: TerminalStyle, depth: ColourDepth): string[] {
  const [u, v] = map.extentMm;
  const { columns, rows } = sizeOf(u[1] - u[0], v[1] - v[0]);
  const joined = Math.max(1, Math.sqrt((columns * rows * PHOTONS_A_PATCH) / photons));
  const { across, up, values } = joinCells(array, {
    across: Math.floor(columns / joined),
    up: Math.floor(rows / joined),
  });
  const top = Math.max(...Array.from(values).filter(Number.isFinite), Number.MIN_VALUE);
  const shares = Array.from({ length: rows }, (_, row) =>
    Array.from({ length: columns }, (_, column) => {
      const at = Math.floor((column * across) / columns) + across * (up - 1 - Math.floor((row * up) / rows));
      return values[at] / top;
    }),
  );
  const lines = paintCells(shares, depth, style.unicode);
  const label = (text: string) => `${text} `.padStart(MARGIN);
  const [low, high] = u.map((end) => `${millimetres(end)} mm`);
  const patch = `${significant((u[1] - u[0]) / across, 2)} × ${significant((v[1] - v[0]) / up, 2)} mm`;
  return [
    ...lines.map((line, i) => {
      const end = i === 0 ? v[1] : i === lines.length - 1 ? v[0] : null;
      return `${end === null ? ' '.repeat(MARGIN) : label(`${millimetres(end)} mm`)}${line}`;
    }),
    `${' '.repeat(MARGIN)}${low}${high.padStart(Math.max(high.length + 1, columns - low.length))}`,
    scaleLine(top, map.unit, style, depth),
    style.dim(
      `  patches of ${patch}, counting noise ${significant(100 * Math.sqrt((across * up) / photons), 2)} % of each`,
    ),
  ];
}

/** From nothing to the brightest patch. */
function scaleLine(top: number, unit: string, style: TerminalStyle, depth: ColourDepth): string {
  const ramp = Array.from({ length: 16 }, (_, i) => (i + 0.5) / 16);
  const [painted] = paintCells([ramp, ramp], depth, style.unicode);
  return `${'0 '.padStart(MARGIN)}${painted} ${significant(top, 3)} ${unit}`;
}

function caption(map: MapRecord, style: TerminalStyle): string[] {
  const numbers = `least ${significant(map.minimum, 3)}, mean ${significant(map.mean, 3)}, most ${significant(map.maximum, 3)} ${map.unit}`;
  return [style.dim(`  cells of the run: ${numbers}`)];
}

/** Half a character is about as wide as high; the longer side fills its room. */
function sizeOf(width: number, height: number): { columns: number; rows: number } {
  const perMm = Math.min(MOST_COLUMNS / width, MOST_ROWS / height);
  const even = (length: number) => Math.max(FEWEST, 2 * Math.round(length / 2));
  return {
    columns: Math.min(MOST_COLUMNS, Math.max(FEWEST, Math.round(width * perMm))),
    rows: Math.min(MOST_ROWS, even(height * perMm)),
  };
}

const millimetres = (value: number): string => significant(value, 3);
