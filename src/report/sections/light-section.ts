/** Colour and direction: spectra, chromaticity, angles. */
import type { RunArrays } from '../../record/run-arrays.js';
import type { RunRecord } from '../../record/run-record.js';
import { chromaticityDiagram } from '../charts/chromaticity-diagram.js';
import { polarPlot } from '../charts/polar-plot.js';
import { type SpectrumStrip, spectraStrips } from '../charts/spectra-strips.js';
import { figureText, noteText, plainFigure } from '../figure-text.js';
import { type Markup, markup } from '../markup.js';
import { nameText, shortName } from '../name-text.js';
import { groupedCount } from '../number-format.js';
import { termMark } from '../term-mark.js';

const MOST_SPECTRA = 24;
const MOST_ANGLES = 12;

export function lightSection(record: RunRecord, arrays: RunArrays): Markup {
  return markup`<section id="light"><h2>Colour and direction</h2><div class="maps">${spectra(record, arrays)}${chromaticity(record)}${angles(record, arrays)}</div></section>`;
}

type SpectrumRecord = RunRecord['spectra'][number];

function spectrumWords({ what, where, light }: SpectrumRecord): string {
  switch (what) {
    case 'launched':
      return 'launched by the pumps';
    case 'absorbed-pump':
      return 'pump light absorbed by dye';
    case 'emitted-in-dye':
      return 'emitted in the dye, all re-emissions';
    case 'exit':
      return `out by the exit ${where ?? ''}`;
    case 'leak':
      return `pump light out by the exit ${where ?? ''}`;
    default:
      return `${light} light at ${where ?? what}`;
  }
}

function spectra(record: RunRecord, { spectra: { wavelengthsNm, columns } }: RunArrays): Markup | null {
  const valuesOf = (id: string) => columns.find((column) => column.id === id)?.values ?? null;
  const emitted = record.spectra.find(({ what }) => what === 'emitted-in-dye');
  const strips = record.spectra.flatMap((spectrum): SpectrumStrip[] => {
    const values = valuesOf(spectrum.id);
    if (values === null || !(spectrum.photonFraction > 0)) return [];
    const { light, photonFraction } = spectrum;
    const shape = spectrum.what === 'exit' && emitted !== undefined ? valuesOf(emitted.id) : null;
    return [{ title: shortName(spectrumWords(spectrum), 48), light, photonFraction, values, shape }];
  });
  if (strips.length === 0) return null;
  const empty = record.spectra.filter(({ photonFraction }) => !(photonFraction > 0)).map(spectrumWords);
  return markup`<figure><figcaption><h3>Spectra${termMark('spectrum')}</h3><p class="facts">Each strip to its own height. The line over the exit is the shape of what the dye emits, at equal area: where the exit falls below it, the dye took the light back.</p>${
    empty.length === 0
      ? null
      : markup`<p class="facts">None seen in ${groupedCount(record.run.histories)} histories: ${shortName(empty.join('; '), 300)}.</p>`
  }${strips.length > MOST_SPECTRA ? markup`<p class="facts">More spectra are in the folder of the run.</p>` : null}</figcaption>${spectraStrips('spectra', wavelengthsNm, strips.slice(0, MOST_SPECTRA))}</figure>`;
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
      markup`<figure><figcaption><h3>Directions at ${nameText(where)}${termMark('radiant-intensity')}</h3><p class="facts">Radiant intensity against the angle from the normal, averaged over azimuth, drawn to both sides. Dashed: the same power after Lambert’s cosine law${termMark('lambert')}. Near 0° few photons fall into each step, so the curve is roughest there.</p></figcaption>${polarPlot(`angles-${i}`, array, title)}</figure>`,
    ];
  });
}
