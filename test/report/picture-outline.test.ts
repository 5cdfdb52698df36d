/**
 * The pictures of a run made by hand, by structure and with whole numbers: a change of drawing shows here on purpose, a
 * change in the last digit does not. Take over a wanted change with `npx vitest run test/report -u` and look at it.
 */
import { describe, expect, it } from 'vitest';
import { chainOf } from '../../src/report/chain-steps.js';
import { chainPicture } from '../../src/report/charts/chain-picture.js';
import { chromaticityDiagram } from '../../src/report/charts/chromaticity-diagram.js';
import { flowPicture, NARROW_FLOW } from '../../src/report/charts/flow-picture.js';
import { histogramBars } from '../../src/report/charts/histogram-bars.js';
import { polarPlot } from '../../src/report/charts/polar-plot.js';
import { spectraStrips } from '../../src/report/charts/spectra-strips.js';
import { mapFigure } from '../../src/report/sections/map-figure.js';
import { shownMaps } from '../../src/report/shown-map.js';
import { sampleRun } from '../run-folder/sample-run.js';
import { outline } from './outline.js';

const { record, arrays } = sampleRun();

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
    [
      'spectra-with-curves',
      () =>
        spectraStrips(
          'spectra',
          nm,
          [strip('in', 'pump', 450), strip('out', 'emitted', 540)],
          [
            {
              kind: 'absorption',
              words: 'absorption of dye',
              values: nm.map((x) => 3 * Math.exp(-(((x - 490) / 25) ** 2))),
            },
            { kind: 'emission', words: 'emission of dye', values: nm.map((x) => Math.exp(-(((x - 530) / 25) ** 2))) },
            { kind: 'finish', words: 'pass', values: nm.map((x) => (x < 500 ? 0.95 : 0.02)) },
          ],
        ).text,
    ],
    [
      'histogram',
      () => histogramBars('h', record.histograms[0], { title: 'Absorptions', across: 'number', of: 'histories' }).text,
    ],
    ['chain', () => chainPicture('chain', chainOf(record)).text],
    ['chromaticity', () => chromaticityDiagram('xy', [0.37, 0.62], [0.01, 0.01], 'x 0.37, y 0.62').text],
    ['polar', () => polarPlot('polar', arrays.angles[0], 'directions').text],
  ] as const)('%s', async (name, draw) => {
    await expect(`${outline(draw())}\n`).toMatchFileSnapshot(`outline/${name}.txt`);
  });
});
