/**
 * The pictures of a run made by hand, by structure and with whole numbers: a change of drawing shows here on purpose, a
 * change in the last digit does not. Take over a wanted change with `npx vitest run test/report -u` and look at it.
 */
import { describe, expect, it } from 'vitest';
import { chromaticityDiagram } from '../../src/report/charts/chromaticity-diagram.js';
import { flowPicture, NARROW_FLOW } from '../../src/report/charts/flow-picture.js';
import { polarPlot } from '../../src/report/charts/polar-plot.js';
import { spectraStrips } from '../../src/report/charts/spectra-strips.js';
import { mapFigure } from '../../src/report/sections/map-figure.js';
import { shownMaps } from '../../src/report/shown-map.js';
import { sampleRun } from '../run-folder/sample-run.js';

const { record, arrays } = sampleRun();

/** One tag or text a line, numbers rounded, packed data and colour lists left out. */
function outline(svg: string): string {
  return svg
    .replace(/data:image\/png;base64,[^"]+/g, 'PNG')
    .replace(/data-values="[^"]+"/g, 'data-values="PACKED"')
    .replace(/<stop[^>]*><\/stop>|<stop[^>]*\/>/g, '')
    .replace(/(?<![\w#])-?\d+\.\d+/g, (number) => String(Math.round(Number(number))))
    .replace(/></g, '>\n<');
}

const first = shownMaps(record, arrays)[0];
const volume = shownMaps(record, arrays)[3];
const nm = Float64Array.from({ length: 60 }, (_, i) => 440 + 3 * i);
const strip = (title: string, light: 'pump' | 'emitted', at: number) => ({
  title,
  light,
  photonFraction: 0.5,
  values: nm.map((value) => Math.exp(-(((value - at) / 20) ** 2))),
  shape: null,
});

describe('pictures keep their structure', () => {
  it.each([
    ['flow', () => flowPicture(record, 'flow', NARROW_FLOW).text],
    ['face-map', () => mapFigure(first, 'map', 200_000, 60).text],
    ['volume-map', () => mapFigure(volume, 'map', 200_000, 60).text],
    ['spectra', () => spectraStrips('spectra', nm, [strip('in', 'pump', 450), strip('out', 'emitted', 540)]).text],
    ['chromaticity', () => chromaticityDiagram('xy', [0.37, 0.62], [0.01, 0.01], 'x 0.37, y 0.62').text],
    ['polar', () => polarPlot('polar', arrays.angles[0], 'directions').text],
  ] as const)('%s', async (name, draw) => {
    await expect(`${outline(draw())}\n`).toMatchFileSnapshot(`outline/${name}.txt`);
  });
});
