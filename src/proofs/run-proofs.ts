import { allProofs } from './all-proofs.js';
import { passes } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';

export interface ProofOptions extends ProofContext {
  /** Proofs to run; all when left out. */
  readonly proofs?: readonly Proof[];
  /** Only proofs whose name holds this text, in any case. */
  readonly only?: string;
}

export interface ProofSummary {
  readonly proofs: number;
  readonly cases: number;
  readonly failed: number;
}

/**
 * Runs proofs one after the other and hands over every case as it is done. A proof that cannot run at all counts as one
 * failed case that says why; the others still run.
 */
export async function runProofs(
  options: ProofOptions,
  onCase: (proof: Proof, proofCase: ProofCase, passed: boolean) => void,
): Promise<ProofSummary> {
  const { proofs = allProofs, only = '', histories, seed, threads } = options;
  const chosen = proofs.filter(({ name }) => name.toLowerCase().includes(only.toLowerCase()));
  let cases = 0;
  let failed = 0;
  for (const proof of chosen) {
    for (const proofCase of await runOne(proof, { histories, seed: `${seed}/${proof.name}`, threads })) {
      const passed = passes(proofCase);
      cases += 1;
      if (!passed) failed += 1;
      onCase(proof, proofCase, passed);
    }
  }
  return { proofs: chosen.length, cases, failed };
}

async function runOne(proof: Proof, context: ProofContext): Promise<readonly ProofCase[]> {
  try {
    const cases = await proof.run(context);
    return cases.length > 0 ? cases : [unrun('a proof without cases')];
  } catch (error) {
    return [unrun(error instanceof Error ? error.message : String(error))];
  }
}

function unrun(why: string): ProofCase {
  return {
    label: `could not be run: ${why}`,
    against: '',
    measured: Number.NaN,
    standardError: 0,
    expected: Number.NaN,
    tolerance: 0,
    deviation: null,
  };
}
