/**
 * A proof: the tracer held against something outside it. Every expectation comes from a printed table, a closed formula or a
 * computation that shares no code with the tracer.
 */

/** How sure the expected numbers are themselves: read in print, recalled, computed independently, or closed form. */
export type ProofStatus = 'verified' | 'memory' | 'computed here' | 'exact';

export interface ProofContext {
  /** Histories of an ordinary case; costly cases take a stated share of it. */
  readonly histories: number;
  readonly seed: string;
  /** Worker threads; 0 traces in the calling thread. */
  readonly threads: number;
}

export interface ProofCase {
  /** What was measured, and where. */
  readonly label: string;
  /** The equation or table row that gives `expected`. */
  readonly against: string;
  readonly measured: number;
  /** Of `measured`, from the run's own batches; 0 for a number without chance. */
  readonly standardError: number;
  readonly expected: number;
  /** Allowed beyond chance: rounding of a printed table, or the stated numerical error of the set-up. */
  readonly tolerance: number;
  /** (measured − expected) / standardError; null where there is no chance in it. */
  readonly deviation: number | null;
}

export interface Proof {
  readonly name: string;
  /** The law, one line. */
  readonly law: string;
  readonly source: string;
  readonly status: ProofStatus;
  run(context: ProofContext): Promise<readonly ProofCase[]>;
}
