/** Where the pump watts go, drawn to scale: light falls from above, and every loss turns off to the side. */
import type { RunRecord } from '../../record/run-record.js';
import { GROUP_WORDS, type Group, groupOf, totalOf } from '../ledger-words.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { formatWithError, significant } from '../number-format.js';
import { viewName } from '../view/view-name.js';
import { type Stream, streamsOf } from './flow-rows.js';
import { type Picture, picture, round } from './picture.js';

export interface FlowSize {
  readonly width: number;
  /** Width of the stream that carries all pump light. */
  readonly trunk: number;
  /** Least height of a row with its label. */
  readonly pitch: number;
  /** Characters of a label. */
  readonly letters: number;
}

export const WIDE_FLOW: FlowSize = { width: 860, trunk: 280, pitch: 24, letters: 56 };
export const NARROW_FLOW: FlowSize = { width: 370, trunk: 84, pitch: 36, letters: 36 };

const TOP = 34;
const RADIUS = 9;
/** Rows of small streams together that the view is told of. */
const MOST_ROWS = 200;
const HEADING = 30;
/** Room for the head of the output's arrow. */
const ARROW = 50;
const LOSSES = ['pump-lost', 'heat', 'light-lost'] as const satisfies readonly Group[];

interface Band {
  readonly group: Group;
  readonly stream: Stream;
  /** In the trunk. */
  readonly left: number;
  readonly right: number;
  /** Upper edge where it has turned off; for the output, where the drawing ends. */
  readonly y: number;
}

interface Heading {
  readonly group: Group;
  readonly fraction: number;
  readonly y: number;
}

/** @param id unique on the page */
export function flowPicture({ ledger, figures }: RunRecord, id: string, size: FlowSize): Picture {
  const watts = figures.pumpPower.value ?? 0;
  const { bands, headings, dyeAt, bottom } = layOut(ledger.watts, size);
  const turned = bands.filter(({ group }) => group !== 'output');
  const output = bands.filter(({ group }) => group === 'output');
  const pumpRight = Math.max(1, ...bands.filter(({ group }) => group !== 'pump-lost').map(({ right }) => right));
  const taken = 1 - totalOf(ledger.watts.filter((row) => groupOf(row) === 'pump-lost'));
  const height = bottom;
  return picture(
    {
      id,
      role: 'group',
      title: 'Where the pump light goes',
      description: `A stream as wide as ${significant(watts, 4)} W of pump light falls from above. Each loss turns off to the right, as wide as its share; what reaches the bottom is the output. The tables below hold the same numbers.`,
    },
    size.width,
    height,
    markup`<text class="flow-strong" x="0" y="20">${significant(watts, 4)} W of pump light</text><rect class="flow-pump-lost" x="0" y="${TOP}" width="${round(pumpRight)}" height="${round(dyeAt - TOP)}"/>${turned.map(
      (band) => loss(band, size, watts, band.group === 'pump-lost' ? TOP : dyeAt),
    )}${headings.map(({ group, fraction, y }) => markup`<text class="flow-heading" x="${headingAt(size)}" y="${round(y)}">${percent(fraction)} ${GROUP_WORDS[group]}</text>`)}<line class="flow-dye" x1="0" x2="${headingAt(size) - 6}" y1="${round(dyeAt)}" y2="${round(dyeAt)}"/><text class="flow-heading" x="${headingAt(size)}" y="${round(dyeAt + 5)}">${significant(taken * watts, 4)} W into the dye</text>${output.map(
      (band) => arrow(band, dyeAt, size, watts),
    )}`,
    size.pitch > 30 ? 'flow flow-small' : 'flow',
  );
}

const labelAt = ({ trunk }: FlowSize): number => trunk + 34;
const headingAt = ({ trunk }: FlowSize): number => trunk + 18;

function layOut(rows: RunRecord['ledger']['watts'], size: FlowSize) {
  const streams = [...LOSSES, 'output' as const].map((group) => ({ group, list: streamsOf(rows, group) }));
  const total = streams.reduce((sum, { list }) => sum + list.reduce((all, { fraction }) => all + fraction, 0), 0);
  const scale = total > 0 ? size.trunk / total : 0;
  const bands: Band[] = [];
  const headings: Heading[] = [];
  let right = size.trunk;
  let y = TOP + 12;
  let dyeAt = TOP;
  for (const { group, list } of streams) {
    if (group === 'heat') {
      dyeAt = y + 6;
      y += 18;
    }
    if (list.length === 0) continue;
    if (group !== 'output') {
      headings.push({ group, fraction: totalOf(list), y: y + 16 });
      y += HEADING;
    }
    for (const stream of list) {
      const thick = stream.fraction * scale;
      const row = Math.max(thick + 4, size.pitch);
      bands.push({ group, stream, left: right - thick, right, y: group === 'output' ? y : y + (row - thick) / 2 });
      right -= thick;
      y += group === 'output' ? ARROW : row;
    }
    y += 10;
  }
  return { bands, headings, dyeAt, bottom: y };
}

function loss({ group, stream, left, right, y }: Band, size: FlowSize, watts: number, from: number): Markup {
  const thick = right - left;
  const end = labelAt(size) - 8;
  const turn = round(Math.max(from, y - RADIUS));
  const path = `M${round(left)} ${round(from)}V${turn}Q${round(left)} ${round(y + thick)} ${round(left + RADIUS + thick)} ${round(y + thick)}H${end}V${round(y)}H${round(right + RADIUS)}Q${round(right)} ${round(y)} ${round(right)} ${turn}V${round(from)}Z`;
  return part(
    group,
    stream,
    watts,
    markup`<path d="${path}"/>${label(stream, labelAt(size), y + thick / 2, size, watts)}`,
  );
}

function arrow({ stream, left, right, y }: Band, from: number, size: FlowSize, watts: number): Markup {
  const middle = (left + right) / 2;
  const tip = Math.min(22, 6 + (right - left) / 3);
  const path = `M${round(left)} ${round(from)}V${round(y + 24)}L${round(middle)} ${round(y + 24 + tip)}L${round(right)} ${round(y + 24)}V${round(from)}Z`;
  const text = markup`<text class="flow-strong" x="${labelAt(size)}" y="${round(y + 14)}">${percent(stream.fraction)} output: ${significant(stream.fraction * watts, 4)} W</text><text class="flow-words" x="${labelAt(size)}" y="${round(y + 31)}">${shortName(stream.words, size.letters)}</text>`;
  return part('output', stream, watts, markup`<path d="${path}"/>${text}`);
}

function part(group: Group, stream: Stream, watts: number, contents: Markup): Markup {
  const words = `${spelt(stream, watts)}: ${shortName(stream.words, 120)}`;
  return markup`<g class="stream flow-${group}" tabindex="0" role="img" data-words="${words}" data-rows="${rowsText(stream)}"><title>${words}</title>${contents}</g>`;
}

/** Rows of a stream for the page's script: [fate, light, where]. */
function rowsText({ rows }: Stream): string {
  return JSON.stringify(
    rows.slice(0, MOST_ROWS).map(({ fate, light, where }) => [fate, light, where === null ? null : viewName(where)]),
  );
}

function label({ words, fraction }: Stream, x: number, middle: number, size: FlowSize, watts: number): Markup {
  const number = percent(fraction);
  if (size.pitch < 30) {
    return markup`<text class="flow-words" x="${x}" y="${round(middle + 5)}"><tspan class="flow-number">${number}</tspan><tspan x="${x + 72}">${wattText(fraction * watts)}</tspan><tspan x="${x + 150}">${shortName(words, size.letters)}</tspan></text>`;
  }
  return markup`<text class="flow-words" x="${x}" y="${round(middle - 2)}"><tspan class="flow-number">${number}</tspan><tspan dx="8">${wattText(fraction * watts)}</tspan><tspan x="${x}" dy="15">${shortName(words, size.letters)}</tspan></text>`;
}

function spelt({ fraction, standardError }: Stream, watts: number): string {
  const error = (factor: number) => (standardError === null ? null : standardError * factor);
  return `${formatWithError(100 * fraction, error(100), '%', '±')}, ${formatWithError(fraction * watts, error(watts), 'W', '±')}`;
}

// Long tails of noughts would run into the next column; the tables below hold the number itself.
const percent = (fraction: number): string =>
  Math.abs(fraction) < 1e-4 ? '< 0.01\u00a0%' : `${significant(100 * fraction, 3)}\u00a0%`;

const wattText = (watts: number): string => (Math.abs(watts) < 1e-3 ? '< 1 mW' : `${significant(watts, 3)} W`);
