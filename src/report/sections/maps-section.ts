import type { RunRecord } from '../../record/run-record.js';
import { figureText, noteText } from '../figure-text.js';
import { type Markup, markup } from '../markup.js';
import type { ShownMap } from '../shown-map.js';
import { termMark } from '../term-mark.js';
import { mapFigure } from './map-figure.js';

/** The maps: exit, pumped faces and detectors, then the cuts through the liquid. */
export function mapsSection(record: RunRecord, maps: readonly ShownMap[]): Markup {
  const { figures, run } = record;
  const left = record.maps.length - maps.length;
  const flatness = figureText(record, 'exitFlatness');
  const uniformity = figureText(record, 'exitBeamUniformity');
  const iso =
    flatness === null || uniformity === null
      ? null
      : markup`<p>The exit after ISO 13694${termMark('iso-13694')}: flatness ${flatness}, beam uniformity ${uniformity}${noteText(figures.exitFlatness)}.</p>`;
  return markup`<section id="even"><h2>How even</h2><p class="lead">Every colour scale starts at 0, so that a face which looks flat is flat. The mark above a scale is the mean. Below each scale two cross-sections run through the cross-hair, from 0 to the top of the scale. Axes are in mm, in the plane of the face or along the axes of the design; on a sphere in degrees about its axis.</p>${iso}${
    left > 0 ? markup`<p class="note">${left} more maps are in the folder of the run.</p>` : null
  }<div class="maps">${maps.map((map, i) => mapFigure(map, `map-${i}`, run.histories, figures.pumpPower.value ?? 0))}</div>${
    maps.length === 0 ? markup`<p>This run has no maps.</p>` : null
  }</section>`;
}
