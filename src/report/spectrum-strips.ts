/** The spectra of a run as strips, with their words. */
import type { RunArrays } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import type { SpectrumStrip } from './charts/spectra-strips.js';
import { shortName } from './name-text.js';

type SpectrumRecord = RunRecord['spectra'][number];

const MOST_SPECTRA = 24;

export const STRIPS_WORDS =
  'Each strip to its own height. The dashed line over the exit is the shape of what the dye emits, at equal area: where the exit falls below it, the dye took the light back.';
export const CURVES_WORDS =
  'Lines behind: what the dyes absorb and emit, each to its peak in this range, and what the finishes pass at normal incidence (or reflect, if they pass nothing), by the scale on the right.';

export interface SpectrumStrips {
  readonly strips: readonly SpectrumStrip[];
  /** Words for spectra in which nothing was seen. */
  readonly empty: readonly string[];
  /** The folder has more than can be drawn. */
  readonly more: boolean;
}

export function spectrumStrips(record: RunRecord, { spectra: { columns } }: RunArrays): SpectrumStrips {
  const valuesOf = (id: string) => columns.find((column) => column.id === id)?.values ?? null;
  const emitted = record.spectra.find(({ what }) => what === 'emitted-in-dye');
  const strips = record.spectra.flatMap((spectrum): SpectrumStrip[] => {
    const values = valuesOf(spectrum.id);
    if (values === null || !(spectrum.photonFraction > 0)) return [];
    const { light, photonFraction } = spectrum;
    const shape = spectrum.what === 'exit' && emitted !== undefined ? valuesOf(emitted.id) : null;
    return [{ title: shortName(spectrumWords(spectrum), 48), light, photonFraction, values, shape }];
  });
  return {
    strips: strips.slice(0, MOST_SPECTRA),
    empty: record.spectra.filter(({ photonFraction }) => !(photonFraction > 0)).map(spectrumWords),
    more: strips.length > MOST_SPECTRA,
  };
}

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
