/** What a first guess of strength rests on. */
export interface GuessModel {
  /** Share of the pump light the dye absorbs at a strength, in units of the strength at hand. */
  readonly absorbed: (times: number) => number;
  /** Chance that emitted light is taken back on its way out, at a strength. */
  readonly overlap: (times: number) => number;
  /** Yield at a strength. */
  readonly quantumYield: (times: number) => number;
}

export interface StrengthGuess {
  /** Strength, in units of the one at hand. */
  readonly times: number;
  readonly absorbed: number;
  readonly overlap: number;
  readonly quantumYield: number;
  /** Photons that get away per pump photon. */
  readonly output: number;
}

/** Searched from a thousandth to a thousand times the strength at hand. */
const DECADES = 3;
const STEPS_PER_DECADE = 200;

/**
 * The strength at which most photons get away: absorbed share of the pump × Φ(1 − a)/(1 − aΦ) (Birks), the largest on a fine grid of strengths.
 * Knows one path of the pump and one of the emitted light, no finish and no exit.
 */
export function firstStrength({ absorbed, overlap, quantumYield }: GuessModel): StrengthGuess {
  let best: StrengthGuess | null = null;
  for (let i = -DECADES * STEPS_PER_DECADE; i <= DECADES * STEPS_PER_DECADE; i++) {
    const times = 10 ** (i / STEPS_PER_DECADE);
    const [share, a, yielded] = [absorbed(times), overlap(times), quantumYield(times)];
    const output = share * ((yielded * (1 - a)) / (1 - a * yielded));
    if (best === null || output > best.output)
      best = { times, absorbed: share, overlap: a, quantumYield: yielded, output };
  }
  return best as StrengthGuess;
}
