import type { EmissionDescription } from '../design/description.js';
import { colourMatching } from '../materials/observer.js';
import type { RunTallies } from '../tallies/run-tallies.js';
import { MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W } from '../units/constants.js';
import { D65_FROM_NM, D65_TO_NM, d65Power } from './daylight-d65.js';
import { type Estimate, figureRatio } from './estimate.js';
import { AT_ONCE } from './inner-source.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, dye, medium, part, pump, thinBeam } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

/** Rows of the observer, CIE 15:2004 table T.4: nm, x̄, ȳ = V, z̄, six decimals. */
const LINES = [
  [520, 0.06327, 0.71, 0.07825],
  [555, 0.51205, 1.0, 0.00575],
  [600, 1.0622, 0.631, 0.0008],
] as const;
const D65 = { x: 0.31272, y: 0.32903 } as const;
/** Five printed decimals, and sums in steps of 5 instead of 1 nm. */
const ROUNDING = 2e-5;
/** What linear interpolation between rows of the observer shifts D65 by. */
const BETWEEN_ROWS = 5e-5;
/** A pump that the eye and the dye's own light do not share. */
const VIOLET_NM = 370;

export const photometryProof: Proof = {
  name: 'Lumens and chromaticity',
  law: 'Φ_v = 683 lm/W ∫V(λ)Φ dλ; x, y of lines and of daylight D65 emitted by a dye',
  source: 'CIE 15:2004; SI definition of the candela; CIE 018:2019; D65 from ISO/CIE 11664-2 (memory)',
  status: 'verified',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [wavelengthNm, x, sensitivity, z] of LINES) {
      const sum = x + sensitivity + z;
      const tallies = await emit(context, `line at ${wavelengthNm} nm`, { kind: 'line', wavelengthNm }, 0.05);
      const perEnergy = figureRatio(tallies, { exitY: 1 }, { exitEnergy: 1 });
      const efficacy: Estimate = {
        value: perEnergy.value * MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W,
        standardError: perEnergy.standardError * MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W,
      };
      cases.push(
        compare(`lm/W at ${wavelengthNm} nm`, '683.002 V(λ)', efficacy, 683.002 * sensitivity, 0.001),
        compare(`x of ${wavelengthNm} nm`, 'CIE 15 table T.4', chromaticity(tallies, 'exitX'), x / sum, 2e-6),
        compare(`y of ${wavelengthNm} nm`, 'CIE 15 table T.4', chromaticity(tallies, 'exitY'), sensitivity / sum, 2e-6),
      );
    }
    const daylight: EmissionDescription = {
      kind: 'spectrum',
      photonsPerNm: (nm) => d65Power(nm) * nm,
      fromNm: D65_FROM_NM,
      toNm: D65_TO_NM,
    };
    const tallies = await emit(context, 'daylight', daylight, 1);
    cases.push(
      compare('x of D65 summed over the observer', 'CIE 15:2004, memory', exact(sumOf(0)), D65.x, ROUNDING),
      compare('y of D65 summed over the observer', 'CIE 15:2004, memory', exact(sumOf(1)), D65.y, ROUNDING),
      compare('x of D65 emitted by a dye', 'CIE 15:2004, memory', chromaticity(tallies, 'exitX'), D65.x, BETWEEN_ROWS),
      compare('y of D65 emitted by a dye', 'CIE 15:2004, memory', chromaticity(tallies, 'exitY'), D65.y, BETWEEN_ROWS),
    );
    return cases;
  },
};

const exact = (value: number): Estimate => ({ value, standardError: 0 });

/** x (0) or y (1) of D65 by the sum over the observer's rows that CIE 15 allows. */
function sumOf(axis: 0 | 1): number {
  const totals = [0, 0, 0];
  for (let nm = D65_FROM_NM; nm <= D65_TO_NM; nm += 5) {
    colourMatching(nm).forEach((value, index) => {
      totals[index] += value * d65Power(nm);
    });
  }
  return totals[axis] / (totals[0] + totals[1] + totals[2]);
}

/** A matched box that takes the pump at once and emits the given light on every side. */
function emit(context: ProofContext, title: string, emission: EmissionDescription, share: number): Promise<RunTallies> {
  const dyes = [dye('emitter', (nm) => (nm < 375 ? AT_ONCE : 0), 1, emission)];
  return traceCell(
    context,
    cell(title, {
      media: [medium('dyed', 1.36, { dyes }), medium('matched', 1.36)],
      around: 'matched',
      parts: [part('box', 'dyed', { kind: 'box', size: [10, 10, 1] }, { faces: { bottom: 'perfect' } })],
      pumps: [pump([0, 0, 0], [0, 0, 1], thinBeam(), { wavelengthNm: VIOLET_NM })],
      exit: 'box.top',
    }),
    share,
  );
}

const chromaticity = (tallies: RunTallies, axis: 'exitX' | 'exitY'): Estimate =>
  figureRatio(tallies, { [axis]: 1 }, { exitX: 1, exitY: 1, exitZ: 1 });
