/** The histograms of a run with the words they are shown under. */
import type { FigureName, RunRecord } from '../record/run-record.js';
import type { HistogramWords } from './charts/histogram-bars.js';
import { plainFigure } from './figure-text.js';

type Histogram = RunRecord['histograms'][number];

export interface ShownHistogram {
  readonly histogram: Histogram;
  readonly words: HistogramWords;
  /** A sentence or two below the title. */
  readonly facts: string;
}

interface Known {
  readonly words: HistogramWords;
  readonly facts: string;
  /** Mean of what is counted, where the record has it as a figure. */
  readonly mean: FigureName | null;
}

const KNOWN: Readonly<Record<string, Known>> = {
  'absorptions-per-history': {
    words: { title: 'Absorptions in a history', across: 'absorptions by dye in one history', of: 'histories' },
    facts: 'How often one pump photon and its successors were absorbed by a dye.',
    mean: 'absorptionsPerHistory',
  },
  'reabsorptions-of-exit-photons': {
    words: {
      title: 'Reabsorptions behind an exit photon',
      across: 'reabsorptions before the exit',
      of: 'exit photons',
    },
    facts: 'How often the light that left by the exit had been taken back by a dye and emitted anew.',
    mean: null,
  },
  'path-of-exit-photons': {
    words: { title: 'Path of an exit photon', across: 'path from pump to exit, mm', of: 'exit photons' },
    facts:
      'Length of the way of the light that left by the exit, inside parts, from the pump on and over all re-emissions.',
    mean: null,
  },
};

/** Those in which something was counted. */
export function shownHistograms(record: RunRecord): readonly ShownHistogram[] {
  return record.histograms
    .filter(({ shares }) => shares.some((share) => share > 0))
    .map((histogram) => {
      const known = Object.hasOwn(KNOWN, histogram.id) ? KNOWN[histogram.id] : undefined;
      const mean = known?.mean ? plainFigure(record.figures[known.mean]) : null;
      const unit = histogram.unit === '' ? '' : `, ${histogram.unit}`;
      return {
        histogram,
        words: known?.words ?? { title: histogram.id, across: `${histogram.id}${unit}`, of: 'all' },
        facts: `${known?.facts ?? ''}${mean === null ? '' : ` Mean ${mean}.`}`,
      };
    });
}
