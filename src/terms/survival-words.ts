/** What figures of saturation, gain and bleaching come to, in words, the same on terminal and page. */
import type { Figure, FigureName } from '../record/run-record.js';

type Figures = Readonly<Record<FigureName, Figure>>;

export interface Verdict {
  /** Figure whose number and note stand behind it. */
  readonly figure: FigureName;
  readonly words: string;
  /** Whether something should be done about it. */
  readonly alarm: boolean;
}

/** Shares of the absorption that may be lost to depletion without a word, and without a warning. */
const SLIGHT = 0.001;
const SOME = 0.02;
/** Exponents of the gain along the longest path: common practice, no source. */
const LITTLE_GAIN = 0.1;
const LARGE_GAIN = 1;
/** A working day. */
const SOON_S = 8 * 3600;

/** How far from saturation, from amplified emission and from bleaching; nothing about what is not known. */
export function survivalVerdicts(figures: Figures): Verdict[] {
  return [...saturation(figures), ...gain(figures), ...bleaching(figures)];
}

function saturation({ depletedAbsorption: { value } }: Figures): Verdict[] {
  if (value === null) return [];
  const share = percent(value);
  const words =
    value < SLIGHT
      ? `far from saturation: ${share} of the absorption is lost to it`
      : value < SOME
        ? `saturation is slight: ${share} of the absorption is lost to it`
        : `the dye saturates: ${share} of its absorption is lost`;
  return [{ figure: 'depletedAbsorption', words, alarm: value >= SOME }];
}

function gain({ gainOverLongestPath: { value } }: Figures): Verdict[] {
  if (value === null) return [];
  const words =
    value === 0
      ? 'no net gain, so no amplified spontaneous emission'
      : value < LITTLE_GAIN
        ? 'gain too small for amplified spontaneous emission'
        : value < LARGE_GAIN
          ? `light may grow by up to ${percent(Math.expm1(value))} on its way, which is not traced`
          : 'amplified spontaneous emission is to be expected, which is not traced';
  return [{ figure: 'gainOverLongestPath', words, alarm: value >= LITTLE_GAIN }];
}

function bleaching({ timeToBleach: cell, timeToBleachWithReservoir: circulating }: Figures): Verdict[] {
  const verdict = (figure: FigureName, seconds: number, where: string): Verdict => ({
    figure,
    words: `a tenth of the dye is bleached after ${durationWords(seconds)} ${where}`,
    alarm: seconds < SOON_S,
  });
  return [
    ...(cell.value === null ? [] : [verdict('timeToBleach', cell.value, 'with the liquid of the cell alone')]),
    ...(circulating.value === null
      ? []
      : [verdict('timeToBleachWithReservoir', circulating.value, 'with the reservoir')]),
  ];
}

const UNITS = [
  ['years', 31_557_600],
  ['days', 86_400],
  ['h', 3600],
  ['min', 60],
] as const;

/** A time known to two digits at best: "1.4 h", "12 days". */
export function durationWords(seconds: number): string {
  const [unit, size] = UNITS.find(([, length]) => seconds >= 1.5 * length) ?? ['s', 1];
  return `${Number((seconds / size).toPrecision(2))} ${unit}`;
}

const percent = (share: number): string => `${Number((100 * share).toPrecision(2))} %`;
