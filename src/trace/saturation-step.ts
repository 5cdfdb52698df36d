/** Turns of a saturated trace: types only, for the record. */
export interface GroundShare {
  readonly medium: string;
  readonly dye: string;
  /** Share of the molecules that absorb. */
  readonly share: number;
}

/** One turn of the iteration. */
export interface SaturationStep {
  /** Shares that were traced with. */
  readonly shares: readonly GroundShare[];
  /** Exit photons per pump photon, with its error by the scatter of the batches. */
  readonly exitPhotonFraction: number;
  readonly standardError: number | null;
  /** Largest distance between a share and what this turn says it should be. */
  readonly off: number;
}
