/** The chain from wall power to lumens, as quotients of what stands in the record. */
import type { RunRecord } from '../record/run-record.js';
import { plainFigure } from './figure-text.js';
import { groupOf, totalOf } from './ledger-words.js';
import { significant } from './number-format.js';

export interface ChainStep {
  readonly name: string;
  /** Share of the step before that is passed on; lm/W in the last step. */
  readonly factor: number;
  /** What is passed on, W; null for lumens. */
  readonly watts: number | null;
  readonly result: string;
  /** What is passed on: current, pump light or emitted light. */
  readonly kind: 'electrical' | 'pump' | 'emitted';
}

export interface Chain {
  /** From the wall, W; null where a diode efficiency is not given, and the chain begins with the pump light. */
  readonly wallWatts: number | null;
  readonly pumpWatts: number;
  readonly steps: readonly ChainStep[];
}

/** What the chain begins with. */
export const WALL_WORDS = { wall: 'from the wall', pump: 'of pump light' } as const;

export function chainOf(record: RunRecord): Chain {
  const { figures, ledger, pumps } = record;
  const pumpWatts = figures.pumpPower.value ?? 0;
  const share = (group: ReturnType<typeof groupOf>) => totalOf(ledger.watts.filter((row) => groupOf(row) === group));
  const taken = 1 - share('pump-lost');
  const emitted = taken - share('heat');
  const out = share('output');
  const told = figures.luminousEfficacyWallPlug.value !== null;
  const { steps: supply, wallWatts } = told ? supplySteps(pumps, pumpWatts) : { steps: [], wallWatts: null };
  const step = (name: string, kind: ChainStep['kind'], part: number, whole: number, result: string): ChainStep => ({
    name,
    kind,
    factor: quotient(part, whole),
    watts: part * pumpWatts,
    result: `${wattText(part * pumpWatts)} ${result}`,
  });
  return {
    wallWatts,
    pumpWatts,
    steps: [
      ...supply,
      step('optics: bring into the dye', 'pump', taken, 1, 'in the dye'),
      step('dye: gives back as light, not heat', 'emitted', emitted, taken, 'of emitted light'),
      step('way out: finds the exit', 'emitted', out, emitted, 'out'),
      {
        name: 'eye: lm per W of this light',
        kind: 'emitted',
        factor: quotient(figures.luminousFlux.value ?? 0, out * pumpWatts),
        watts: null,
        result: plainFigure(figures.luminousFlux) ?? 'no lumens',
      },
    ],
  };
}

/** Drivers and diodes of all pumps together; none where a diode efficiency is not given. */
function supplySteps(pumps: RunRecord['pumps'], pumpWatts: number): { steps: ChainStep[]; wallWatts: number | null } {
  if (pumps.length === 0 || pumps.some(({ diodeEfficiency }) => diodeEfficiency === null)) {
    return { steps: [], wallWatts: null };
  }
  const into = pumps.reduce((sum, { power, diodeEfficiency }) => sum + power / (diodeEfficiency ?? 1), 0);
  const wallWatts = pumps.reduce(
    (sum, { power, diodeEfficiency, driverEfficiency }) =>
      sum + power / ((diodeEfficiency ?? 1) * (driverEfficiency ?? 1)),
    0,
  );
  const loose = pumps.filter(({ driverEfficiency }) => driverEfficiency === null).length;
  const unstated =
    loose === 0 ? '' : loose === pumps.length ? ' (not given: as if lossless)' : ' (where given, else lossless)';
  return {
    wallWatts,
    steps: [
      {
        name: `driver: passes on${unstated}`,
        kind: 'electrical',
        factor: quotient(into, wallWatts),
        watts: into,
        result: `${wattText(into)} into the diodes`,
      },
      {
        name: 'diode: makes light',
        kind: 'pump',
        factor: quotient(pumpWatts, into),
        watts: pumpWatts,
        result: `${wattText(pumpWatts)} of pump light`,
      },
    ],
  };
}

const quotient = (part: number, whole: number): number => (whole > 0 ? part / whole : 0);
const wattText = (watts: number): string => `${significant(watts, 4)} W`;
