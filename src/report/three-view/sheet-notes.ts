/** The lists below the views: parts, pumps, finishes, faces by number. */
import type { Drawing, DrawnPart, DrawnPump } from '../../record/drawing.js';
import { round } from '../charts/picture.js';
import { type Markup, markup } from '../markup.js';
import { significant } from '../number-format.js';
import { lengthText } from './dimensions.js';
import type { FaceLabels } from './face-labels.js';
import { MARGIN, SHEET_WIDTH } from './sheet-layout.js';
import { fitText, textWidth } from './text-width.js';

const COLUMNS = 3;
const GUTTER = 26;
const WIDTH = (SHEET_WIDTH - 2 * MARGIN - (COLUMNS - 1) * GUTTER) / COLUMNS;
const LINE = 15;

interface Line {
  readonly text: string;
  readonly kind: 'heading' | 'first' | 'more';
}

/** @param undrawn sizes that found no room beside the views */
export function sheetNotes(
  drawing: Drawing,
  { listed, hidden }: Pick<FaceLabels, 'listed' | 'hidden'>,
  far: ReadonlySet<DrawnPump>,
  undrawn: number,
  top: number,
): { drawn: Markup; bottom: number } {
  const blocks = [
    block(
      'Parts: bounding boxes along x × y × z, mm',
      drawing.parts.map(partLine),
      undrawn > 0 ? `${undrawn} sizes found no room beside the views; they are in this list.` : null,
    ),
    block(
      'Pumps: optical power and wavelength',
      drawing.pumps.map((pump, i) => pumpLine(pump, i, far)),
    ),
    block('Finishes', finishLines(drawing)),
    block('Exit', exitNames(drawing)),
    block(
      'Faces by number',
      listed.map(({ name, number }) => `${number ?? 'not marked, too crowded'}  ${name}`),
    ),
    block('Faces that no view shows', hidden.length === 0 ? [] : [hidden.map(short).join(', ')]),
  ];
  const columns = fillColumns(blocks);
  const drawn = columns.map((column, c) =>
    column.map(({ text, kind }, i) => {
      const x = MARGIN + c * (WIDTH + GUTTER) + (kind === 'more' ? 14 : 0);
      return markup`<text class="${kind === 'heading' ? 'heading' : 'note'}" x="${round(x)}" y="${round(top + (i + 1) * LINE)}">${text}</text>`;
    }),
  );
  return {
    drawn: markup`<g class="notes">${drawn}</g>`,
    bottom: top + Math.max(...columns.map((c) => c.length)) * LINE + 10,
  };
}

/** Blocks one after the other, whole where they can be. */
function fillColumns(blocks: readonly (readonly Line[])[]): Line[][] {
  const longest = Math.ceil(blocks.reduce((sum, one) => sum + one.length, 0) / COLUMNS) + 1;
  const columns: Line[][] = [[]];
  for (const one of blocks) {
    const whole = one.length <= longest;
    one.forEach((line, i) => {
      const column = columns[columns.length - 1];
      const full = whole && i === 0 ? column.length + one.length > longest : column.length >= longest;
      const last = i === 0 && column.length + 2 > longest;
      if ((full || last) && !(whole && i > 0) && column.length > 0 && columns.length < COLUMNS) columns.push([]);
      columns[columns.length - 1].push(line);
    });
  }
  return columns;
}

function block(heading: string, entries: readonly string[], remark: string | null = null): Line[] {
  if (entries.length === 0) return [];
  const said = remark === null ? [] : wrap(remark, 'more');
  return [{ text: heading, kind: 'heading' }, ...entries.flatMap((entry) => wrap(entry, 'first')), ...said];
}

/** Broken at spaces; a word longer than the column is cut. */
function wrap(text: string, kind: 'first' | 'more'): Line[] {
  const lines: Line[] = [];
  let line = '';
  const put = () => {
    if (line !== '') lines.push({ text: fitText(line, WIDTH - 14), kind: lines.length === 0 ? kind : 'more' });
  };
  for (const word of text.split(' ').slice(0, 2000)) {
    if (line !== '' && textWidth(`${line} ${word}`) > WIDTH - 14) {
      put();
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  put();
  return lines;
}

function partLine({ name, medium, mediumKind, dyed, bounds: [low, high] }: DrawnPart): string {
  const sizes = high.map((c, i) => lengthText(c - low[i])).join(' × ');
  return `${short(name)}: ${sizes}; ${short(medium)} (${mediumKind}${dyed ? ', dyed' : ''})`;
}

function pumpLine(pump: DrawnPump, i: number, far: ReadonlySet<DrawnPump>): string {
  const point = (values: readonly number[]) => `(${values.map((c) => minus(Number(c.toFixed(3)))).join(', ')})`;
  const where = far.has(pump) ? ' (beyond the views)' : '';
  return `P${i + 1} ${short(pump.name)}: ${significant(pump.watts, 4)} W, ${significant(pump.wavelengthNm, 6)} nm; at ${point(pump.at)} mm, looks along ${point(pump.direction)}${where}`;
}

function finishLines({ parts }: Drawing): string[] {
  const faces = parts.flatMap((part) => part.faces.filter(({ triangles }) => triangles.length > 0));
  const groups = new Map<string, string[]>();
  for (const { name, finish, finishKind } of faces) {
    if (finish === 'clear') continue;
    const words = finish === finishKind ? short(finish) : `${short(finish)} (${finishKind})`;
    groups.set(words, [...(groups.get(words) ?? []), short(name)]);
  }
  const lines = [...groups].map(([words, names]) => `${words}: ${names.join(', ')}`);
  const clear = faces.filter(({ finish }) => finish === 'clear').length;
  return clear === 0 ? lines : [...lines, `clear: ${groups.size === 0 ? 'all faces' : 'all others'}`];
}

function exitNames({ parts, planes }: Drawing): string[] {
  return [...parts.flatMap((part) => part.faces), ...planes]
    .filter(({ isExit }) => isExit)
    .map(({ name }) => short(name));
}

const short = (name: string): string => fitText(name, WIDTH - 60);
const minus = (value: number): string => String(value + 0).replace('-', '−');
