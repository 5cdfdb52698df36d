import type { MapRecord, RunRecord } from '../../record/run-record.js';
import { mapWords } from '../../terms/map-words.js';
import { significant } from '../number-format.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, type TerminalStyle } from '../terminal-style.js';
import { fitLeft } from './columns.js';
import { withUnit } from './headline.js';

const NAME_WIDTH = 36;
const NUMBER_WIDTHS = [11, 11, 7, 8] as const;

/** The third question: how even is it, on the pumped faces, inside the liquid and on the exit. */
export function evenness(record: RunRecord, style: TerminalStyle): string[] {
  const rows = record.maps.filter((map) => map.power > 0).map((map) => mapRow(map, style));
  const iso = isoLine(record, style);
  if (rows.length === 0) return iso;
  const heading = `${'Evenness'.padEnd(NAME_WIDTH)}${numbers(['variation', 'min./mean', 'mean', 'peak'])}`;
  return [
    style.bold(heading),
    ...rows,
    ...iso,
    style.dim('  variation: standard deviation over mean, photon noise taken out'),
  ];
}

function mapRow(map: MapRecord, style: TerminalStyle): string {
  const name = fitToStyle(`${mapWords(map.what)} ${safeText(map.where)}`, style);
  const columns = [
    variationText(map),
    map.minOverMean === null ? '' : significant(map.minOverMean, 2),
    significant(map.mean, 3),
    // The largest voxel is mostly the luckiest one; Survival has the honest peak.
    map.unit === 'W/cm³' ? '' : significant(map.maximum, 3),
  ];
  return `  ${fitLeft(name, NAME_WIDTH - 2, style.unicode ? '…' : '~')}${numbers(columns)} ${map.unit}`;
}

/** Evenness that cannot be told from noise is given as what it is below, at two standard errors. */
function variationText({ variation, variationError }: MapRecord): string {
  if (variation === null) return '';
  if (variationError === null || variation >= 2 * variationError) return `${significant(100 * variation, 2)} %`;
  return `< ${significant(100 * (variation + 2 * variationError), 2)} %`;
}

function numbers(columns: readonly string[]): string {
  return columns.map((text, index) => (text === '' ? '' : ` ${text}`).padStart(NUMBER_WIDTHS[index] ?? 0)).join('');
}

function isoLine(record: RunRecord, style: TerminalStyle): string[] {
  const flatness = withUnit(record.figures.exitFlatness, '', style);
  const uniformity = withUnit(record.figures.exitBeamUniformity, '', style);
  const facts = [
    flatness === null ? null : `flatness ${flatness}`,
    uniformity === null ? null : `beam uniformity ${uniformity}`,
  ].filter((text) => text !== null);
  return facts.length === 0 ? [] : [`  exit after ISO 13694: ${facts.join(', ')}`];
}
