import { emissionWeights } from '../photophysics/emission-weights.js';
import { overlapProbability } from '../photophysics/overlap-probability.js';
import { figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, ENDLESS, medium, part, pump, thinBeam } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

/** A parabola of light between two wavelengths, nm, in a dye whose absorption falls in a straight line to 0 at the red one. */
const FROM_NM = 500;
const TO_NM = 600;
/** At the blue end, 1/mm. */
const STEEPEST = 0.4;
const PATHS = [1, 5, 20] as const;

export const overlapProof: Proof = {
  name: 'Overlap of emission and absorption',
  law: 'a(L) = 1 − ∫ E(λ) exp(−µ(λ)L) dλ; with E ∝ u(1 − u) and µ = µ₀u it has a closed form',
  source: 'Beer–Lambert law averaged over a spectrum, integrated by hand',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    const place = (nm: number) => Math.min(1, Math.max(0, (TO_NM - nm) / (TO_NM - FROM_NM)));
    const parabola = (nm: number) => place(nm) * (1 - place(nm));
    const falling = (nm: number) => STEEPEST * place(nm);
    const emission = { kind: 'spectrum', photonsPerNm: parabola, fromNm: FROM_NM, toNm: TO_NM } as const;
    for (const path of PATHS) {
      const depth = STEEPEST * path;
      const expected = taken(depth);
      const against = '1 − 6 ∫ u(1 − u) exp(−µ₀Lu) du';
      const light = pump([0, 0, -path / 2 - 1], [0, 0, 1], thinBeam(1), { wavelengthNm: 550 });
      const tallies = await traceCell(
        context,
        cell(`overlap over ${path} mm`, {
          media: [medium('bath', 1.36, { dyes: [dye('dark', falling, 0)] }), medium('matched', 1.36)],
          around: 'matched',
          parts: [part('bath', 'bath', { kind: 'box', size: [4, 4, path] }, { faces: ENDLESS })],
          pumps: [{ ...light, spectrum: { photonsPerNm: parabola, fromNm: FROM_NM, toNm: TO_NM, meanNm: 550 } }],
          exit: 'bath.top',
        }),
      );
      cases.push(
        compare(
          `light taken over ${path} mm, traced`,
          against,
          figureMean(tallies, { pumpAbsorbed: 1 }),
          expected,
          1e-4,
        ),
        compare(
          `overlap probability over ${path} mm`,
          against,
          { value: overlapProbability(emissionWeights(emission), falling, path), standardError: 0 },
          expected,
          1e-5,
        ),
      );
    }
    return cases;
  },
};

/** 1 − 6 ∫₀¹ u(1 − u) exp(−κu) du. */
function taken(k: number): number {
  const first = (1 - Math.exp(-k) * (1 + k)) / k ** 2;
  const second = (2 - Math.exp(-k) * (k ** 2 + 2 * k + 2)) / k ** 3;
  return 1 - 6 * (first - second);
}
