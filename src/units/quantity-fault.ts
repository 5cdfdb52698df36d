/** What is wrong with the text of a quantity, and which characters of it (`start` to before `end`) are to blame. */
export interface QuantityFault {
  readonly problem: string;
  readonly start: number;
  readonly end: number;
  readonly found?: string;
  readonly expected?: string;
  readonly suggestion?: string;
  /** `found` stands where the name of a dial is expected. */
  readonly unknownDial?: true;
}

/** Carries a fault out of the depth of the parser; never leaves the units folder. */
export class QuantityError extends Error {
  constructor(readonly fault: QuantityFault) {
    super(fault.problem);
    this.name = 'QuantityError';
  }
}
