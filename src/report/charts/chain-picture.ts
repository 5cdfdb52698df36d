import { type Chain, type ChainStep, WALL_WORDS } from '../chain-steps.js';
import { type Markup, markup } from '../markup.js';
import { significant } from '../number-format.js';
import { bottomAxis } from './axis.js';
import { type Picture, picture, round } from './picture.js';

const WIDTH = 520;
const LEFT = 8;
const RIGHT = 506;
const PITCH = 40;
const BAR = 12;

/** From wall power to lumens: a bar of watts after each step, to scale, with the factor that led there. @param id unique on the page */
export function chainPicture(id: string, chain: Chain): Picture {
  const { wallWatts, pumpWatts, steps } = chain;
  const most = wallWatts ?? pumpWatts;
  const start = `${significant(most, 4)} W ${wallWatts === null ? WALL_WORDS.pump : WALL_WORDS.wall}`;
  const bottom = (steps.length + 1) * PITCH + 4;
  const lengthOf = (watts: number) => (most > 0 ? (watts / most) * (RIGHT - LEFT) : 0);
  const kind = wallWatts === null ? 'pump' : 'electrical';
  return picture(
    {
      id,
      title: 'From the wall socket to lumens',
      description: `${start}; ${steps.map(({ name, factor, result }) => `times ${significant(factor, 4)}, ${name}: ${result}`).join('; ')}.`,
    },
    WIDTH,
    bottom + 34,
    markup`${row(0, kind, lengthOf(most), '', '', start)}${steps.map((step, i) => stepRow(step, i + 1, step.watts === null ? null : lengthOf(step.watts)))}${bottomAxis({ domain: [0, most], range: [LEFT, RIGHT], label: 'power after each step, W', ticks: 6 }, bottom)}`,
    'chain-picture',
  );
}

function stepRow({ name, factor, kind, result }: ChainStep, at: number, length: number | null): Markup {
  return row(at, kind, length, `× ${significant(factor, 4)}`, name, result);
}

/** @param length of the bar; null for none */
function row(
  at: number,
  kind: ChainStep['kind'],
  length: number | null,
  factor: string,
  name: string,
  result: string,
): Markup {
  const y = at * PITCH + 16;
  return markup`<text x="${LEFT}" y="${y}"><tspan class="chain-factor">${factor}</tspan><tspan x="${LEFT + (factor === '' ? 0 : 62)}">${name}</tspan></text><text class="chain-factor" x="${RIGHT}" y="${y}" text-anchor="end">${result}</text>${
    length === null
      ? null
      : markup`<rect class="chain-${kind}" x="${LEFT}" y="${y + 6}" width="${round(Math.max(0.5, length))}" height="${BAR}"/>`
  }`;
}
