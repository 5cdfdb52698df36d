/** Colour and direction: spectra, chromaticity, angles. */
import type { RunArrays } from '../../record/run-arrays.js';
import type { RunRecord } from '../../record/run-record.js';
import { backgroundCurves } from '../charts/background-curves.js';
import { chromaticityDiagram } from '../charts/chromaticity-diagram.js';
import { histogramBars } from '../charts/histogram-bars.js';
import { polarPlot, polarWords } from '../charts/polar-plot.js';
import { RADIANCE_WORDS, radianceCurves } from '../charts/radiance-curves.js';
import { spectraStrips } from '../charts/spectra-strips.js';
import { figureText, noteText, plainFigure } from '../figure-text.js';
import { type Markup, markup } from '../markup.js';
import { nameText, shortName } from '../name-text.js';
import { groupedCount } from '../number-format.js';
import { shownHistograms } from '../shown-histograms.js';
import { CURVES_WORDS, STRIPS_WORDS, spectrumStrips } from '../spectrum-strips.js';
import { termMark } from '../term-mark.js';

const MOST_ANGLES = 12;

export function lightSection(record: RunRecord, arrays: RunArrays): Markup {
  return markup`<section id="light"><h2>Colour and direction</h2><div class="maps">${spectra(record, arrays)}${chromaticity(record)}${angles(record, arrays)}${radiance(record, arrays)}${histograms(record)}</div></section>`;
}

/** The strips, what was not seen, and whether some were left out. */
function spectra(record: RunRecord, arrays: RunArrays): Markup | null {
  const { strips, empty, more } = spectrumStrips(record, arrays);
  if (strips.length === 0) return null;
  const curves = backgroundCurves(record, arrays);
  return markup`<figure><figcaption><h3>Spectra${termMark('spectrum')}</h3><p class="facts">${STRIPS_WORDS}${curves.length === 0 ? '' : ` ${CURVES_WORDS}`}</p>${
    empty.length === 0
      ? null
      : markup`<p class="facts">None seen in ${groupedCount(record.run.histories)} histories: ${shortName(empty.join('; '), 300)}.</p>`
  }${more ? markup`<p class="facts">More spectra are in the folder of the run.</p>` : null}</figcaption>${spectraStrips('spectra', arrays.spectra.wavelengthsNm, strips, curves)}</figure>`;
}

function chromaticity(record: RunRecord): Markup {
  const { chromaticityX: x, chromaticityY: y, dominantWavelength } = record.figures;
  if (x.value === null || y.value === null) {
    return markup`<figure><figcaption><h3>Chromaticity${termMark('chromaticity')}</h3><p class="facts">Not known${noteText(x)}.</p></figcaption></figure>`;
  }
  const error =
    x.standardError === null || y.standardError === null ? null : ([x.standardError, y.standardError] as const);
  const words = `x ${plainFigure(x)}, y ${plainFigure(y)}`;
  return markup`<figure><figcaption><h3>Chromaticity${termMark('chromaticity')}</h3><p class="facts">CIE 1931, x ${figureText(record, 'chromaticityX')}, y ${figureText(record, 'chromaticityY')}; dominant ${figureText(record, 'dominantWavelength') ?? 'wavelength none'}${noteText(dominantWavelength)}; mean ${figureText(record, 'meanExitWavelength') ?? 'not known'}. The edge of the coloured field is pure light of the wavelength written beside it, in nm.</p></figcaption>${chromaticityDiagram('chromaticity', [x.value, y.value], error, words)}</figure>`;
}

function angles(record: RunRecord, arrays: RunArrays): readonly Markup[] {
  return record.angles.slice(0, MOST_ANGLES).flatMap(({ id, where }, i) => {
    const array = arrays.angles.find((one) => one.id === id);
    if (array === undefined || !array.wattsPerSr.some((value) => value > 0)) return [];
    const title = `Directions of the light at ${shortName(where)}`;
    return [
      markup`<figure><figcaption><h3>Directions at ${nameText(where)}${termMark('radiant-intensity')}</h3><p class="facts">${polarWords(array)}${termMark('lambert')}</p></figcaption>${polarPlot(`angles-${i}`, array, title)}</figure>`,
    ];
  });
}

function radiance(record: RunRecord, arrays: RunArrays): readonly Markup[] {
  return record.radiance.slice(0, MOST_ANGLES).flatMap(({ id, where }, i) => {
    const array = arrays.radiance.find((one) => one.id === id);
    if (array === undefined || !array.values.some((value) => value > 0)) return [];
    const title = `Radiance at ${shortName(where)}`;
    return [
      markup`<figure><figcaption><h3>Radiance at ${nameText(where)}${termMark('radiance')}</h3><p class="facts">${RADIANCE_WORDS}</p></figcaption>${radianceCurves(`radiance-${i}`, array, title)}</figure>`,
    ];
  });
}

/** How often a photon was absorbed, and how far the light went. */
function histograms(record: RunRecord): readonly Markup[] {
  return shownHistograms(record).map(
    ({ histogram, words, facts }, i) =>
      markup`<figure><figcaption><h3>${words.title}${termMark(`histogram-${histogram.id}`)}</h3><p class="facts">${facts}</p></figcaption>${histogramBars(`histogram-${i}`, histogram, words)}</figure>`,
  );
}
