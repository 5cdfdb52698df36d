import { fateShare, figureRatio } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, detector, dye, ENDLESS, medium, part, pump, thinBeam, twoColour } from './proof-cells.js';
import { integrate } from './quadrature.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Absorbance of the cuvette of 10 mm at the pump, and the stretch of the beam the window looks at, mm. */
const PRIMARY = [
  [0.3, 3, 7],
  [2, 4, 6],
] as const;
/** Optical depth at the emission wavelength between a sheet of emission and the face. */
const SECONDARY = [0.2, 1] as const;
/** Front face: absorption at pump and at emission, 1/mm, of a layer 0.2 mm thick. */
const FRONT = [
  [10, 1],
  [10, 10],
] as const;
const LAYER_MM = 0.2;
const AWAY_MM = 10;
const DISC_MM = 3;

export const innerFilterProof: Proof = {
  name: 'Inner filters of a cuvette',
  law: 'primary: (10^(−Ax₁) − 10^(−Ax₂))/(ln10 A (x₂ − x₁)); secondary: E₂(τ) over all directions; front face: both along each direction',
  source:
    'Parker & Barnes, Analyst 82 606 (1957); Lakowicz, Principles of Fluorescence Spectroscopy, ch. 2 (from memory)',
  status: 'exact',
  run: async (context) => [...(await primary(context)), ...(await secondary(context)), ...(await frontFace(context))],
};

/** At right angles a window sees a stretch of the beam: what is absorbed there, over what an endlessly thin solution would absorb. */
async function primary(context: ProofContext): Promise<ProofCase[]> {
  const cases: ProofCase[] = [];
  for (const [absorbance, from, to] of PRIMARY) {
    const perMm = (Math.LN10 * absorbance) / 10;
    const piece = (name: string, low: number, high: number) =>
      part(
        name,
        'solution',
        { kind: 'box', size: [4, 4, high - low] },
        { at: [0, 0, -(low + high) / 2], faces: ENDLESS },
      );
    const tallies = await traceCell(
      context,
      cell(`primary inner filter, absorbance ${absorbance}`, {
        media: [medium('solution', 1.36, { dyes: [dye('dye', twoColour(perMm, 0), 0)] }), medium('matched', 1.36)],
        around: 'matched',
        parts: [piece('before', 0, from), piece('window', from, to), piece('after', to, 10)],
        pumps: [pump([0, 0, 1], [0, 0, -1], thinBeam(0.5))],
        exit: 'after.bottom',
      }),
      0.5,
    );
    const taken = fateShare(tallies, slotsOf({ fate: 'lost-in-dye', where: 'window' }));
    const thin = perMm * (to - from);
    const expected = (10 ** ((-absorbance * from) / 10) - 10 ** ((-absorbance * to) / 10)) / thin;
    const measured = { value: taken.value / thin, standardError: taken.standardError / thin };
    cases.push(
      compare(
        `seen of the beam from ${from} to ${to} mm, absorbance ${absorbance}`,
        'Parker & Barnes',
        measured,
        expected,
      ),
    );
  }
  return cases;
}

/** A thin sheet emits; layers of dark absorber of equal depth lie to both sides. */
async function secondary(context: ProofContext): Promise<ProofCase[]> {
  const cases: ProofCase[] = [];
  for (const depth of SECONDARY) {
    const SHEET = 1e-4;
    const layer = (name: string, z: number) =>
      part(name, 'filter', { kind: 'box', size: [10, 10, 1] }, { at: [0, 0, z], faces: ENDLESS });
    const tallies = await traceCell(
      context,
      cell(`secondary inner filter, depth ${depth}`, {
        media: [
          medium('sheet', 1.36, { dyes: [dye('dye', twoColour(1e5, 0), 1)] }),
          medium('filter', 1.36, { dyes: [dye('dark', twoColour(0, depth), 0)] }),
          medium('matched', 1.36),
        ],
        around: 'matched',
        parts: [
          layer('above', (1 + SHEET) / 2),
          part('sheet', 'sheet', { kind: 'box', size: [10, 10, SHEET] }, { faces: ENDLESS }),
          layer('below', -(1 + SHEET) / 2),
        ],
        pumps: [pump([0, 0, 2], [0, 0, -1], thinBeam())],
        exit: 'below.bottom',
      }),
      0.5,
    );
    const left = figureRatio(tallies, { exitPhotons: 1 }, { emissions: 1 });
    const expected = integrate((mu) => Math.exp(-depth / Math.max(mu, 1e-12)), 0, 1) / 2;
    cases.push(compare(`through one face, depth ${depth}`, 'E₂(τ)/2', left, expected, 1e-6));
  }
  return cases;
}

/** Light that comes back toward the pump, into a disc on its axis. */
async function frontFace(context: ProofContext): Promise<ProofCase[]> {
  const cases: ProofCase[] = [];
  for (const [excitation, emission] of FRONT) {
    const tallies = await traceCell(
      context,
      cell(`front face, ${excitation} and ${emission} per mm`, {
        media: [
          medium('solution', 1.36, {
            dyes: [dye('dye', twoColour(excitation, 0), 1), dye('dark', twoColour(0, emission), 0)],
          }),
          medium('matched', 1.36),
        ],
        around: 'matched',
        parts: [part('layer', 'solution', { kind: 'box', size: [20, 20, LAYER_MM] }, { at: [0, 0, -LAYER_MM / 2] })],
        pumps: [pump([0, 0, 5], [0, 0, -1], thinBeam())],
        detectors: [
          detector('eye', {
            kind: 'plane',
            at: [0, 0, AWAY_MM],
            normal: [0, 0, 1],
            outline: { kind: 'disc', radius: DISC_MM },
          }),
        ],
        exit: 'eye',
      }),
      2,
    );
    const cone = (z: number) => (AWAY_MM + z) / Math.hypot(AWAY_MM + z, DISC_MM);
    const expected = integrate(
      (z) =>
        (excitation * Math.exp(-excitation * z) * integrate((mu) => Math.exp((-emission * z) / mu), cone(z), 1)) / 2,
      0,
      LAYER_MM,
    );
    const seen = figureRatio(tallies, { exitPhotons: 1 }, { launchedPhotons: 1 });
    cases.push(
      compare(
        `into a disc before the face, ${excitation} and ${emission} /mm`,
        '∫µ exp(−µz)∫exp(−µ′z/cos θ)',
        seen,
        expected,
      ),
    );
  }
  return cases;
}
