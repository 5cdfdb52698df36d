/** Every plot of a run as a picture of its own. */
import type { RunArrays } from '../../record/run-arrays.js';
import type { RunRecord } from '../../record/run-record.js';
import { uniqueSlugs } from '../../run-folder/slug.js';
import { chainOf } from '../chain-steps.js';
import { backgroundCurves } from '../charts/background-curves.js';
import { chainPicture } from '../charts/chain-picture.js';
import { chromaticityDiagram } from '../charts/chromaticity-diagram.js';
import { flowPicture, WIDE_FLOW } from '../charts/flow-picture.js';
import { histogramBars } from '../charts/histogram-bars.js';
import { polarPlot, polarWords } from '../charts/polar-plot.js';
import { RADIANCE_WORDS, radianceCurves } from '../charts/radiance-curves.js';
import { spectraStrips } from '../charts/spectra-strips.js';
import { plainFigure } from '../figure-text.js';
import { cutPicture, cutsOf, isCutStretched, isVolume } from '../map-cut.js';
import { mapNumbers, mapWords, noiseWords, placeWords } from '../map-words.js';
import { shortName } from '../name-text.js';
import { groupedCount } from '../number-format.js';
import { shownHistograms } from '../shown-histograms.js';
import { type ShownMap, shownMaps } from '../shown-map.js';
import { CURVES_WORDS, STRIPS_WORDS, spectrumStrips } from '../spectrum-strips.js';
import { type DrawnPicture, type PictureWords, standalonePicture } from './standalone-picture.js';

/** A picture that can be drawn: its file name without ending, and how. */
export interface RunPicture {
  readonly id: string;
  readonly title: string;
  /** File name without its ending; no two are alike. */
  readonly name: string;
  readonly draw: () => DrawnPicture;
}

interface Planned {
  readonly id: string;
  readonly title: string;
  readonly facts: readonly string[];
  readonly charts: () => Parameters<typeof standalonePicture>[0];
}

/** What can be drawn of a run, in the order of the page. Drawing is left until it is asked for. */
export function runPictures(record: RunRecord, arrays: RunArrays): readonly RunPicture[] {
  const { design, run, tool } = record;
  const words: Omit<PictureWords, 'title' | 'facts'> = {
    subtitle: shortName(design.title, 200),
    foot: `${groupedCount(run.histories)} histories, seed ${shortName(run.seed, 40)}, ${run.startedAt.slice(0, 10)}, ${tool.name} ${shortName(tool.version, 30)}. ±\u00a0is one standard error.`,
  };
  const planned = [
    flow(record),
    ...shownMaps(record, arrays).map((map) => mapPicture(record, map)),
    ...spectra(record, arrays),
    ...chromaticity(record),
    ...directions(record, arrays),
    ...radiance(record, arrays),
    ...histograms(record),
    chain(record),
  ];
  const names = uniqueSlugs(
    planned.map(({ id }) => id),
    'picture',
  );
  return planned.map(({ id, title, facts, charts }, i) => ({
    id,
    title,
    name: `picture-${names[i]}`,
    draw: () => standalonePicture(charts(), { ...words, title, facts }),
  }));
}

function flow(record: RunRecord): Planned {
  const { figures } = record;
  const share = plainFigure(figures.opticalEfficiency, { factor: 100, unit: '%' }) ?? '0 %';
  return {
    id: 'flow',
    title: 'Where the pump light goes',
    facts: [
      `${plainFigure(figures.exitPower) ?? 'Nothing'} of ${plainFigure(figures.pumpPower) ?? '?'} of pump light comes out, ${share}. To scale, from the pump watts above to every fate.`,
    ],
    charts: () => [flowPicture(record, 'flow', WIDE_FLOW)],
  };
}

function mapPicture({ run, figures }: RunRecord, map: ShownMap): Planned {
  const { mean, others } = mapNumbers(map);
  const cuts = cutsOf(map);
  const places = isVolume(map)
    ? [
        `Cut at ${cuts.map(({ along, cell }) => placeWords(map, along, cell[along])).join(', at ')}, through the most strongly lit cell.`,
      ]
    : [];
  const stretched = cuts.some((cut) => isCutStretched(map, cut)) ? ['Not to scale: a short side is stretched.'] : [];
  return {
    id: `map ${map.record.id}`,
    title: `${mapWords(map)} ${shortName(map.record.where)}`,
    facts: [
      `${mean} ${others}.`,
      noiseWords(map, run.histories, figures.pumpPower.value ?? 0),
      ...places,
      ...stretched,
    ],
    charts: () => cuts.map((cut) => cutPicture(map, `map-${cut.along}`, cut)),
  };
}

function spectra(record: RunRecord, arrays: RunArrays): readonly Planned[] {
  const { strips } = spectrumStrips(record, arrays);
  if (strips.length === 0) return [];
  const curves = backgroundCurves(record, arrays);
  return [
    {
      id: 'spectra',
      title: 'Spectra',
      facts: [STRIPS_WORDS, ...(curves.length === 0 ? [] : [CURVES_WORDS])],
      charts: () => [spectraStrips('spectra', arrays.spectra.wavelengthsNm, strips, curves)],
    },
  ];
}

function chromaticity({ figures }: RunRecord): readonly Planned[] {
  const { chromaticityX: x, chromaticityY: y, dominantWavelength } = figures;
  if (x.value === null || y.value === null) return [];
  const point = [x.value, y.value] as const;
  const error =
    x.standardError === null || y.standardError === null ? null : ([x.standardError, y.standardError] as const);
  const words = `x ${plainFigure(x)}, y ${plainFigure(y)}`;
  return [
    {
      id: 'chromaticity',
      title: 'Chromaticity of the exit light',
      facts: [
        `CIE 1931, ${words}; dominant wavelength ${plainFigure(dominantWavelength) ?? 'none'}. Along the edge: wavelengths in\u00a0nm.`,
      ],
      charts: () => [chromaticityDiagram('chromaticity', point, error, words)],
    },
  ];
}

function directions(record: RunRecord, arrays: RunArrays): readonly Planned[] {
  return record.angles.flatMap(({ id, where }): Planned[] => {
    const array = arrays.angles.find((one) => one.id === id);
    if (array === undefined || !array.wattsPerSr.some((value) => value > 0)) return [];
    const title = `Directions of the light at ${shortName(where)}`;
    return [
      {
        id: `directions ${id}`,
        title,
        facts: [polarWords(array)],
        charts: () => [polarPlot('directions', array, title)],
      },
    ];
  });
}

function radiance(record: RunRecord, arrays: RunArrays): readonly Planned[] {
  return record.radiance.flatMap(({ id, where }): Planned[] => {
    const array = arrays.radiance.find((one) => one.id === id);
    if (array === undefined || !array.values.some((value) => value > 0)) return [];
    const title = `Radiance at ${shortName(where)}`;
    return [
      {
        id: `radiance ${id}`,
        title,
        facts: [RADIANCE_WORDS],
        charts: () => [radianceCurves('radiance', array, title)],
      },
    ];
  });
}

function histograms(record: RunRecord): readonly Planned[] {
  return shownHistograms(record).map(({ histogram, words, facts }) => ({
    id: histogram.id,
    title: words.title,
    facts: [facts],
    charts: () => [histogramBars('histogram', histogram, words)],
  }));
}

function chain(record: RunRecord): Planned {
  const { luminousEfficacyWallPlug: total } = record.figures;
  const note = total.note === undefined ? '' : ` (${shortName(total.note, 200)})`;
  return {
    id: 'chain',
    title: 'From the wall socket to lumens',
    facts: [
      total.value === null
        ? `What the wall socket gives is not known${note}, so the chain begins with the pump light.`
        : `${plainFigure(total) ?? '?'} from the wall${note}.`,
    ],
    charts: () => [chainPicture('chain', chainOf(record))],
  };
}
