import type { EmissionDescription } from '../design/description.js';
import type { RunTallies } from '../tallies/run-tallies.js';
import { MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W } from '../units/constants.js';
import { D65_FROM_NM, D65_TO_NM, d65Power } from './daylight-d65.js';
import { type Estimate, figureRatio } from './estimate.js';
import { AT_ONCE } from './inner-source.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, dye, medium, part, pump, thinBeam } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

/** Line, V(λ), chromaticity; CIE 15:2004 table T.4 (V to 6 decimals; x, y of the locus from the same table). */
const LINES = [
  [555, 1.0, 0.3373, 0.6589],
  [520, 0.71, 0.0743, 0.8338],
  [600, 0.631, 0.627, 0.3725],
] as const;
const D65 = { x: 0.31272, y: 0.32903 } as const;
/** A pump that the eye and the dye's own light do not share. */
const VIOLET_NM = 370;

export const photometryProof: Proof = {
  name: 'Lumens and chromaticity',
  law: 'Φ_v = 683 lm/W ∫V(λ)Φ dλ; x, y of lines and of daylight D65 emitted by a dye',
  source: 'CIE 15:2004; SI definition of the candela; CIE 018:2019; D65 from ISO/CIE 11664-2 (memory)',
  status: 'verified',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [wavelengthNm, sensitivity, x, y] of LINES) {
      const tallies = await emit(context, `line at ${wavelengthNm} nm`, { kind: 'line', wavelengthNm }, 0.05);
      const perEnergy = figureRatio(tallies, { exitY: 1 }, { exitEnergy: 1 });
      const efficacy: Estimate = {
        value: perEnergy.value * MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W,
        standardError: perEnergy.standardError * MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W,
      };
      cases.push(
        compare(`lm/W at ${wavelengthNm} nm`, '683.002 V(λ)', efficacy, 683.002 * sensitivity, 0.005),
        compare(`x of ${wavelengthNm} nm`, 'spectral locus', chromaticity(tallies, 'exitX'), x, 5e-5),
        compare(`y of ${wavelengthNm} nm`, 'spectral locus', chromaticity(tallies, 'exitY'), y, 5e-5),
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
      compare('x of D65', 'CIE 15:2004, from memory', chromaticity(tallies, 'exitX'), D65.x, 2e-5),
      compare('y of D65', 'CIE 15:2004, from memory', chromaticity(tallies, 'exitY'), D65.y, 2e-5),
    );
    return cases;
  },
};

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
