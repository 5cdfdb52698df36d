import type { BeamDescription, ShapeDescription } from '../design/description.js';
import { fateShare } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, medium, part, pump } from './proof-cells.js';
import { nestedCubes, partedOctahedron } from './proof-meshes.js';
import { integrate } from './quadrature.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Absorption of the bodies, 1/mm. */
const MU = 0.5;
const survives = (chord: number): number => Math.exp(-MU * chord);
const RADIUS = 3;
const x = MU * RADIUS;

interface Beam {
  readonly label: string;
  readonly against: string;
  readonly body: () => ShapeDescription;
  readonly fills: Extract<BeamDescription, { kind: 'patch' }>['outline'];
  readonly transmitted: number;
  /** By what the body falls short of the one whose law is used. */
  readonly shortfall: number;
}

const BEAMS: readonly Beam[] = [
  {
    label: 'octahedron of 8 triangles along its axis',
    against: '∫2m e^(−2µh(1 − m)) dm',
    // A square of 4 mm between two points: chords fall evenly from 6 in the middle to 0 at the rim.
    body: () => partedOctahedron(0, ([a, b, c]) => [2 * (a - b), 2 * (a + b), RADIUS * c]),
    fills: { kind: 'rectangle', size: [4, 4] },
    transmitted: integrate((m) => 2 * m * survives(2 * RADIUS * (1 - m)), 0, 1),
    shortfall: 0,
  },
  {
    label: 'sphere of 32 768 triangles',
    against: '(1 − (1 + 2x)e^(−2x))/2x², x = µR',
    body: () =>
      partedOctahedron(6, (p) => {
        const norm = RADIUS / Math.hypot(...p);
        return [p[0] * norm, p[1] * norm, p[2] * norm];
      }),
    fills: { kind: 'disc', radius: RADIUS },
    transmitted: (1 - (1 + 2 * x) * Math.exp(-2 * x)) / (2 * x * x),
    // Edges of at most 2.3°: the middles of facets lie up to 3·10⁻⁴ R below the sphere.
    shortfall: 3e-4,
  },
  {
    label: 'cube of 4 mm with a cavity of 2 mm, and a cube of 1 mm in it',
    against: 'each length counted by the shells it is within',
    body: () => nestedCubes([4, 2, 1]),
    fills: { kind: 'rectangle', size: [4, 4] },
    transmitted: 0.75 * survives(4) + (0.25 - 1 / 16) * survives(2) + survives(3) / 16,
    shortfall: 0,
  },
];

export const meshProof: Proof = {
  name: 'Triangle meshes',
  law: 'an evenly filled parallel beam keeps the mean of exp(−µ·chord), in bodies given as triangles',
  source:
    'Beer–Lambert over the chords of each shape, closed or by quadrature; sphere: van de Hulst, Light Scattering by Small Particles (1957) §11.2',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const { label, against, body, fills, transmitted, shortfall } of BEAMS) {
      const tallies = await traceCell(
        context,
        cell(label, {
          media: [medium('grey', 1.36, { absorption: MU }), medium('matched', 1.36)],
          around: 'matched',
          parts: [part('body', 'grey', body())],
          pumps: [pump([0, 0, -20], [0, 0, 1], { kind: 'patch', outline: fills, divergence: [0, 0] })],
          exit: 'body.surface',
        }),
        0.5,
      );
      const measured = fateShare(tallies, slotsOf({ fate: 'absorbed-by-solvent' }));
      cases.push(compare(`absorbed: ${label}`, against, measured, 1 - transmitted, shortfall));
    }
    return cases;
  },
};
