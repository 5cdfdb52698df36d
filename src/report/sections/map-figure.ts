import { termOfMap } from '../../terms/picture-terms.js';
import { cutPicture, cutsOf, isCutStretched, isVolume, type MapCut } from '../map-cut.js';
import { AXIS_LETTERS, axesOf, axisUnit, extents, mapNumbers, mapWords, noiseWords, placeWords } from '../map-words.js';
import { type Markup, markup } from '../markup.js';
import { nameText, shortName } from '../name-text.js';
import { packValues, type ShownMap } from '../shown-map.js';
import { termMark } from '../term-mark.js';

/** One map of a face with its numbers, or the three cuts through a volume. @param id unique on the page */
export function mapFigure(map: ShownMap, id: string, histories: number, pumpWatts: number): Markup {
  const { record } = map;
  const volume = isVolume(map);
  const title = markup`${mapWords(map)} ${nameText(record.where)}`;
  const data = markup`data-cells="${map.cells.join(' ')}" data-extent="${extents(map).flat().join(' ')}" data-axes="${axesOf(
    map,
  )
    .map((axis) => shortName(axis, AXIS_LETTERS))
    .join(
      '|',
    )}" data-axis-unit="${axisUnit(map)}" data-unit="${record.unit}" data-maximum="${record.maximum}" data-top="${map.top}" data-values="${packValues(map)}"`;
  const { mean, others } = mapNumbers(map);
  const cuts = cutsOf(map).map((one) => cut(map, volume ? `${id}-${one.along}` : id, one));
  return markup`<figure class="map${volume ? ' volume' : ''}" ${data}><figcaption><h3>${title}${termMark(termOfMap(record.what))}</h3><p class="facts"><b>${mean}</b>\u00a0${others}</p><p class="facts">${noiseWords(map, histories, pumpWatts)}</p></figcaption>${
    volume ? markup`<div class="cuts">${cuts}</div>` : cuts
  }</figure>`;
}

function cut(map: ShownMap, id: string, one: MapCut): Markup {
  const { across, along, cell } = one;
  const words = placeWords(map, along, cell[along]);
  const slider = isVolume(map)
    ? markup`<label class="needs-script"><span class="slice-text">${words}</span><input type="range" min="0" max="${map.cells[along] - 1}" value="${cell[along]}" aria-label="place of the cut along ${shortName(axesOf(map)[along], AXIS_LETTERS)}"></label><p class="print-only">cut at ${words}</p>`
    : null;
  const stretched = isCutStretched(map, one)
    ? markup`<p class="facts">Not to scale: the short side is stretched.</p>`
    : null;
  return markup`<div class="cut" tabindex="0" role="group" aria-label="${mapWords(map)} ${shortName(map.record.where)}: arrow keys move the cross-sections" data-across="${across.join(' ')}" data-along="${along}" data-at="${cell.join(' ')}">${slider}${cutPicture(map, id, one)}${stretched}<output class="readout needs-script">Move the pointer over the map, or use the arrow keys.</output></div>`;
}
