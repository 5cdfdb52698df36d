import { describe, expect, it } from 'vitest';
import { allProofs } from '../../src/proofs/all-proofs.js';
import type { ProofCase } from '../../src/proofs/proof.js';
import { runProofs } from '../../src/proofs/run-proofs.js';

/** 4 standard errors at a fixed seed: the same bits, hence the same verdict, on every machine. Sources stand in each proof. */
const SEED = 'loom';
const HISTORIES = 20_000;

describe('the tracer against outside truths', () => {
  it.each(allProofs.map((proof) => [proof.name, proof] as const))(`%s holds, seed ${SEED}`, async (_, proof) => {
    const outside: ProofCase[] = [];
    const summary = await runProofs(
      { histories: HISTORIES, seed: SEED, threads: 0, proofs: [proof] },
      (_proof, proofCase, passed) => {
        if (!passed) outside.push(proofCase);
      },
    );
    expect(outside).toEqual([]);
    expect(summary.cases).toBeGreaterThan(0);
  });

  it('names every proof once, with law and source', () => {
    expect(new Set(allProofs.map(({ name }) => name)).size).toBe(allProofs.length);
    for (const { law, source } of allProofs) {
      expect(law).not.toBe('');
      expect(source).not.toBe('');
      expect(law).not.toContain('\n');
    }
  });
});
