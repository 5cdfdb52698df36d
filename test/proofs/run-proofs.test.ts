import { describe, expect, it } from 'vitest';
import { allProofs } from '../../src/proofs/all-proofs.js';
import { compare, passes } from '../../src/proofs/judge-case.js';
import type { Proof, ProofCase } from '../../src/proofs/proof.js';
import { runProofs } from '../../src/proofs/run-proofs.js';

const SEED = 'shuttle';
const OPTIONS = { histories: 20_000, seed: SEED, threads: 0 } as const;

const named = (name: string): Proof => {
  const proof = allProofs.find((one) => one.name === name);
  if (!proof) throw new Error(`no proof named ${name}`);
  return proof;
};

/** The same proof with every expectation moved by 5 %. */
const wronged = (proof: Proof): Proof => ({
  ...proof,
  run: async (context) =>
    (await proof.run(context)).map(({ label, against, measured, standardError, expected, tolerance }) =>
      compare(label, against, { value: measured, standardError }, expected * 1.05, tolerance),
    ),
});

const verdicts = async (proofs: readonly Proof[], only?: string) => {
  const seen: { proofCase: ProofCase; passed: boolean }[] = [];
  const summary = await runProofs(
    { ...OPTIONS, proofs, ...(only === undefined ? {} : { only }) },
    (_, proofCase, passed) => seen.push({ proofCase, passed }),
  );
  return { seen, summary };
};

describe('running proofs', () => {
  it(`reports a wrong expectation as failed, seed ${SEED}`, async () => {
    const { seen, summary } = await verdicts([wronged(named('Spread of beams and sheets'))]);
    const gaussian = seen.find(({ proofCase }) => proofCase.label.includes('Gaussian beam of radius 2'));
    expect(gaussian?.passed).toBe(false);
    expect(gaussian?.proofCase.deviation).toBeLessThan(-4);
    expect(summary.failed).toBe(seen.filter(({ passed }) => !passed).length);
  });

  it(`reports wrong deterministic numbers as failed, seed ${SEED}`, async () => {
    const { seen } = await verdicts([wronged(named('Prism'))]);
    expect(seen.map(({ passed }) => passed)).toEqual([false, false, false]);
  });

  it('counts a proof that cannot run as one failed case that says why, and runs the next', async () => {
    const broken: Proof = {
      name: 'broken',
      law: '-',
      source: '-',
      status: 'exact',
      run: () => Promise.reject(new Error('no light')),
    };
    const { seen, summary } = await verdicts([broken, named('Prism')]);
    expect(seen[0].proofCase.label).toContain('no light');
    expect(seen[0].passed).toBe(false);
    expect(summary).toEqual({ proofs: 2, cases: 4, failed: 1 });
  });

  it('runs only proofs whose name holds the text, in any case', async () => {
    const { summary } = await verdicts(allProofs, 'prism');
    expect(summary).toEqual({ proofs: 1, cases: 3, failed: 0 });
    expect((await verdicts(allProofs, 'nothing of the sort')).summary.proofs).toBe(0);
  });
});

describe('the band of a case', () => {
  const at = (value: number, standardError: number, tolerance = 0) =>
    passes(compare('', '', { value, standardError }, 1, tolerance));

  it('is four standard errors and the stated tolerance wide', () => {
    expect(at(1.0399, 0.01)).toBe(true);
    expect(at(1.0401, 0.01)).toBe(false);
    expect(at(0.9599, 0.01)).toBe(false);
    expect(at(1.0449, 0.01, 0.005)).toBe(true);
    expect(at(1.0001, 0)).toBe(false);
  });

  it('never holds what is not a number', () => {
    expect(at(Number.NaN, 0.01)).toBe(false);
    expect(at(1, Number.NaN)).toBe(false);
  });

  it('gives no deviation where there is no chance', () => {
    expect(compare('', '', { value: 2, standardError: 0 }, 1).deviation).toBeNull();
    expect(compare('', '', { value: 2, standardError: 0.5 }, 1).deviation).toBe(2);
  });
});
