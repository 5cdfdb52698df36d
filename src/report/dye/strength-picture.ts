import { linePlot, type PlotMark } from '../charts/line-plot.js';
import { shortName } from '../name-text.js';
import { significant } from '../number-format.js';
import { type DrawnPicture, standalonePicture } from '../pictures/standalone-picture.js';
import { niceAbove } from './dye-pictures.js';

/** One strength of a scan. Shares of the pump photons. */
export interface ScannedStrength {
  /** In the unit of the axis. */
  readonly strength: number;
  readonly exit: number;
  readonly exitError: number | null;
  /** Pump photons no dye took. */
  readonly unabsorbed: number;
}

export interface StrengthScanWords {
  readonly design: string;
  readonly dye: string;
  readonly unit: string;
  readonly foot: string;
  readonly best: string;
  readonly marks: readonly PlotMark[];
  /** Strengths that cannot be told from the best. */
  readonly band: readonly [number, number];
}

/** Exit photons against strength, between what passes through and what is lost after absorption. */
export function strengthPicture(points: readonly ScannedStrength[], words: StrengthScanWords): DrawnPicture {
  const strengths = points.map(({ strength }) => strength);
  const [low, high] = [Math.min(...strengths), Math.max(...strengths)];
  const margin = low === high ? 2 : (high / low) ** 0.02;
  const highest = Math.min(100, niceAbove(100 * Math.max(...points.flatMap((p) => [p.exit, p.unabsorbed, lost(p)]))));
  const chart = linePlot(
    {
      id: 'strength',
      title: 'Exit fraction against strength',
      description: `Exit photons per pump photon at ${points.length} strengths from ${significant(low, 3)} to ${significant(high, 3)} ${words.unit}, with what passes the dye and what is lost after it.`,
      across: `strength of ${shortName(words.dye, 40)}, ${words.unit}`,
      up: '% of the pump photons',
    },
    [low / margin, high * margin],
    'log',
    highest,
    [
      {
        words: 'out by the exit, with its standard error',
        colour: 'output',
        points: points.map((p) => [p.strength, 100 * p.exit]),
        errors: points.map(({ exitError }) => (exitError === null ? null : 100 * exitError)),
      },
      {
        words: 'pump light that no dye took',
        colour: 'pump',
        dash: 1,
        points: points.map((p) => [p.strength, 100 * p.unabsorbed]),
      },
      {
        words: 'absorbed by a dye, but not out by the exit',
        colour: 'lost',
        dash: 2,
        points: points.map((p) => [p.strength, 100 * lost(p)]),
      },
    ],
    words.marks,
    words.band,
  );
  return standalonePicture([chart], {
    title: 'How strong should the dye be?',
    subtitle: shortName(words.design, 200),
    facts: [words.best, 'Shaded: strengths that cannot be told from the best (two standard errors of the difference).'],
    foot: words.foot,
  });
}

export const lost = ({ exit, unabsorbed }: ScannedStrength): number => Math.max(0, 1 - exit - unabsorbed);
