import { mapWords as wordsOfKind } from '../../terms/map-words.js';
import { termOfMap } from '../../terms/picture-terms.js';
import { cellCentre, heatMap, isStretched } from '../charts/heat-map.js';
import { type Markup, markup } from '../markup.js';
import { nameText, shortName } from '../name-text.js';
import { significant } from '../number-format.js';
import { cutOf, packValues, peakCell, type ShownMap } from '../shown-map.js';
import { termMark } from '../term-mark.js';

const AXIS_LETTERS = 16;

/** What a map shows, in words, without its place. */
export function mapWords({ record: { what } }: ShownMap): string {
  const words = wordsOfKind(what);
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** One map of a face with its numbers, or the three cuts through a volume. @param id unique on the page */
export function mapFigure(map: ShownMap, id: string, histories: number, pumpWatts: number): Markup {
  const { record } = map;
  const volume = record.shape.length === 3;
  const title = markup`${mapWords(map)} ${nameText(record.where)}`;
  const data = markup`data-cells="${map.cells.join(' ')}" data-extent="${extents(map).flat().join(' ')}" data-axes="${axesOf(
    map,
  )
    .map((axis) => shortName(axis, AXIS_LETTERS))
    .join(
      '|',
    )}" data-unit="${record.unit}" data-maximum="${record.maximum}" data-top="${map.top}" data-values="${packValues(map)}"`;
  return markup`<figure class="map${volume ? ' volume' : ''}" ${data}><figcaption><h3>${title}${termMark(termOfMap(record.what))}</h3><p class="facts"><b>${significant(record.mean, 4)}</b> ${record.unit} mean, ${significant(record.minimum, 4)} least, ${significant(record.maximum, 4)} most, ${significant(record.power, 4)} W in all</p><p class="facts">${noiseWords(map, histories, pumpWatts)}</p></figcaption>${
    volume ? cuts(map, id) : cut(map, id, [0, 1], 2, middleCell(map))
  }</figure>`;
}

/** The three cuts through the most strongly lit voxel. */
function cuts(map: ShownMap, id: string): Markup {
  const peak = peakCell(map);
  return markup`<div class="cuts">${(
    [
      [0, 1, 2],
      [0, 2, 1],
      [1, 2, 0],
    ] as const
  ).map(([a, b, along]) => cut(map, `${id}-${along}`, [a, b], along, peak))}</div>`;
}

function cut(
  map: ShownMap,
  id: string,
  across: readonly [number, number],
  along: number,
  cell: readonly [number, number, number],
): Markup {
  const { record, cells } = map;
  const names = axesOf(map);
  const ends = extents(map);
  const [a, b] = across;
  const span = Math.max(...ends.map(([low, high]) => high - low));
  const volume = record.shape.length === 3;
  const where = volume
    ? `, cut at ${names[along]} = ${place(cellCentre(ends[along], cells[along], cell[along]))} mm`
    : '';
  const picture = heatMap({
    id,
    title: `${mapWords(map)} ${shortName(record.where)}${where}`,
    description: `A map over ${shortName(names[a])} and ${shortName(names[b])} in mm, dark for 0 and light for ${significant(record.maximum, 4)} ${record.unit}; mean ${significant(record.mean, 4)}, least ${significant(record.minimum, 4)}. Below it the colour scale and a cross-section along either axis.`,
    plane: cutOf(map, across, along, cell[along]),
    extentMm: [ends[a], ends[b]],
    spanMm: span,
    axes: [shortName(names[a], AXIS_LETTERS), shortName(names[b], AXIS_LETTERS)],
    maximum: record.maximum,
    mean: record.mean,
    unit: record.unit,
    quantity: volume ? 'absorbed power density' : 'irradiance',
    at: [cell[a], cell[b]],
  });
  const name = shortName(names[along], AXIS_LETTERS);
  const slider = volume
    ? markup`<label class="needs-script"><span class="slice-text">${name} = ${place(cellCentre(ends[along], cells[along], cell[along]))} mm</span><input type="range" min="0" max="${cells[along] - 1}" value="${cell[along]}" aria-label="place of the cut along ${name}"></label><p class="print-only">cut at ${name} = ${place(cellCentre(ends[along], cells[along], cell[along]))} mm</p>`
    : null;
  const stretched = isStretched([ends[a], ends[b]], span)
    ? markup`<p class="facts">Not to scale: the short side is stretched.</p>`
    : null;
  return markup`<div class="cut" tabindex="0" role="group" aria-label="${mapWords(map)} ${shortName(record.where)}: arrow keys move the cross-sections" data-across="${a} ${b}" data-along="${along}" data-at="${cell.join(' ')}">${slider}${picture}${stretched}<output class="readout needs-script">Move the pointer over the map, or use the arrow keys.</output></div>`;
}

/** The noise told from the structure, in words. */
function noiseWords({ record, lit, joined }: ShownMap, histories: number, pumpWatts: number): string {
  const photons = (histories * record.power) / Math.max(pumpWatts, Number.MIN_VALUE) / Math.max(1, lit);
  const join = joined ? ' Shown in coarser cells than the run has.' : '';
  if (!(photons > 0)) return `No light was seen here.${join}`;
  const noise = 1 / Math.sqrt(photons);
  const behind = `About ${significant(photons, 2)} photons stand behind a cell on average: ${significant(100 * noise, 2)} % of such a cell is counting noise.`;
  if (record.variation === null) return behind + join;
  const real = `Unevenness with the noise taken out: ${significant(100 * record.variation, 2)} %`;
  const verdict =
    record.variation > 2 * noise
      ? 'what you see is structure.'
      : record.variation > noise / 2
        ? 'structure and speckle are alike in size; look at the larger shapes.'
        : 'the speckle you see is noise; more histories would smooth it.';
  return `${behind} ${real}; ${verdict}${join}`;
}

const place = (mm: number): string => significant(mm, 3).replace('-', '−');

function axesOf({ record: { axes } }: ShownMap): readonly string[] {
  return [0, 1, 2].map((axis) => axes[axis] ?? '');
}

function extents({ record: { extentMm } }: ShownMap): readonly (readonly [number, number])[] {
  return [0, 1, 2].map((axis) => extentMm[axis] ?? [0, 0]);
}

function middleCell({ cells }: ShownMap): readonly [number, number, number] {
  return [cells[0] >> 1, cells[1] >> 1, 0];
}
