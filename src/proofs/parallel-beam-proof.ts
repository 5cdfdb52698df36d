import type { BeamDescription, PieceDescription, ShapeDescription, Vector2 } from '../design/description.js';
import { pieceFaces, shapeFaces } from '../design/shape-faces.js';
import { fateShare } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, medium, part, piece, pump } from './proof-cells.js';
import { integrate } from './quadrature.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Absorption of the bodies, 1/mm. */
const MU = 0.5;
const survives = (chord: number): number => Math.exp(-MU * chord);

/** Lens axis along the beam. */
const alongBeam = [{ axis: 'x' as const, angle: Math.PI / 2 }];

/** Depth of a conicoid behind its vertex. */
const sag = (radius: number, conic: number, across: number): number =>
  across ** 2 / (radius + Math.sqrt(radius ** 2 - (1 + conic) * across ** 2));

const squareOutline = (side: number): Vector2[] => [
  [-side / 2, -side / 2],
  [side / 2, -side / 2],
  [side / 2, side / 2],
  [-side / 2, side / 2],
];
const column = (side: number, height: number) => ({
  kind: 'frustum' as const,
  bottom: squareOutline(side),
  top: squareOutline(side),
  height,
  sides: ['front', 'right', 'back', 'left'],
});

interface Beam {
  readonly label: string;
  readonly against: string;
  readonly body: ShapeDescription | readonly PieceDescription[];
  /** Evenly filled cross-section of the beam along +z. */
  readonly fills: Extract<BeamDescription, { kind: 'patch' }>['outline'];
  readonly transmitted: number;
}

const disc = (radius: number) => ({ kind: 'disc' as const, radius });
const square = (side: number) => ({ kind: 'rectangle' as const, size: [side, side] as const });
const x = MU * 3;

const BEAMS: readonly Beam[] = [
  {
    label: 'sphere of radius 3',
    against: '(1 − (1 + 2x)e^(−2x))/2x², x = µR',
    body: { kind: 'sphere', radius: 3 },
    fills: disc(3),
    transmitted: (1 - (1 + 2 * x) * Math.exp(-2 * x)) / (2 * x * x),
  },
  {
    label: 'sphere with a hollow of radius 2',
    against: '∫e^(−µ·chord) over the disc',
    body: [piece({ kind: 'sphere', radius: 3 }, { minus: [piece({ kind: 'sphere', radius: 2 }, { name: 'hollow' })] })],
    fills: disc(3),
    // Outside the hollow's shadow the chord is 2√(9 − ρ²); inside it is shorter by 2√(4 − ρ²). ρ² = s: two smooth pieces.
    transmitted:
      (integrate((c) => 2 * c * survives(2 * c), 0, Math.sqrt(5)) +
        integrate((h) => 2 * h * survives(2 * Math.sqrt(5 + h * h) - 2 * h), 0, 2)) /
      9,
  },
  {
    label: 'cylinder from its side',
    against: '∫e^(−2x cos φ) cos φ dφ, x = µR',
    body: [piece({ kind: 'cylinder', radius: 2, height: 6 }, { turns: [{ axis: 'x', angle: Math.PI / 2 }] })],
    fills: square(4),
    transmitted: integrate((phi) => survives(4 * Math.cos(phi)) * Math.cos(phi), 0, Math.PI / 2),
  },
  {
    label: 'cone frustum along its axis, radii 3 and 1',
    against: 'chord h to ρ = 1, falling to 0 at ρ = 3',
    body: { kind: 'cone', bottomRadius: 3, topRadius: 1, height: 4 },
    fills: disc(3),
    transmitted: (survives(4) + integrate((rho) => 2 * rho * survives(2 * (3 - rho)), 1, 3)) / 9,
  },
  {
    label: 'cap of height 1.5 of a sphere of radius 2',
    against: 'chord √(R² − ρ²) − (R − h)',
    body: { kind: 'cap', radius: 2, height: 1.5 },
    fills: disc(Math.sqrt(3.75)),
    transmitted: integrate((rise) => 2 * rise * survives(rise - 0.5), 0.5, 2) / 3.75,
  },
  {
    label: 'cube of 3 mm on its edge',
    against: '(1 − e^(−µa√2))/(µa√2)',
    body: [
      piece(
        { kind: 'box', size: [3, 3, 6] },
        {
          turns: [
            { axis: 'z', angle: Math.PI / 4 },
            { axis: 'x', angle: Math.PI / 2 },
          ],
        },
      ),
    ],
    fills: square(3 * Math.SQRT2),
    transmitted: -Math.expm1(-MU * 3 * Math.SQRT2) / (MU * 3 * Math.SQRT2),
  },
  {
    label: 'triangular prism from its side',
    against: '(1 − e^(−µh))/(µh)',
    // A right triangle of 3 by 3; lit along its height: chords fall evenly from 3 to 0.
    body: [
      piece(
        {
          kind: 'prism',
          outline: [
            [-1.5, -1.5],
            [1.5, -1.5],
            [-1.5, 1.5],
          ],
          height: 6,
          sides: null,
        },
        { turns: [{ axis: 'x', angle: Math.PI / 2 }] },
      ),
    ],
    fills: square(3),
    transmitted: -Math.expm1(-MU * 3) / (MU * 3),
  },
  {
    label: 'two overlapping boxes as one part',
    against: 'each length counted once',
    body: [
      piece({ kind: 'box', size: [2, 2, 2] }, { name: 'low', at: [0, 0, -0.5] }),
      piece({ kind: 'box', size: [1, 1, 3] }, { name: 'high', at: [0, 0, 1] }),
    ],
    fills: square(2),
    transmitted: 0.75 * survives(2) + 0.25 * survives(4),
  },
  {
    label: 'paraboloid along its axis',
    against: '(1 − e^(−µh))/(µh)',
    body: { kind: 'paraboloid', focalLength: 1, height: 2 },
    fills: disc(Math.sqrt(8)),
    transmitted: -Math.expm1(-MU * 2) / (MU * 2),
  },
  {
    label: 'biconcave lens',
    against: 'chord t + 2 sag(ρ)',
    body: [
      piece(
        {
          kind: 'lens',
          outline: disc(3),
          thickness: 1,
          profile: 'round',
          front: { kind: 'hollow', radius: 5, conic: 0 },
          back: { kind: 'hollow', radius: 5, conic: 0 },
        },
        { turns: alongBeam },
      ),
    ],
    fills: disc(3),
    transmitted: integrate((rho) => ((2 * rho) / 9) * survives(1 + 2 * sag(5, 0, rho)), 0, 3),
  },
  {
    label: 'meniscus of a hyperboloid and an ellipsoid',
    against: 'chord t − sag₁(ρ) + sag₂(ρ)',
    body: [
      piece(
        {
          kind: 'lens',
          outline: disc(3),
          thickness: 2,
          profile: 'round',
          front: { kind: 'bulges', radius: 4, conic: -3 },
          back: { kind: 'hollow', radius: 7, conic: 0.5 },
        },
        { turns: alongBeam },
      ),
    ],
    fills: disc(3),
    transmitted: integrate((rho) => ((2 * rho) / 9) * survives(2 - sag(4, -3, rho) + sag(7, 0.5, rho)), 0, 3),
  },
  {
    label: 'four square lenslets on a plate',
    against: 'chord t − sag(ρ) over one of them',
    body: [
      {
        ...piece(
          {
            kind: 'lens',
            outline: square(2),
            thickness: 1,
            profile: 'round',
            front: { kind: 'bulges', radius: 3, conic: 0 },
            back: { kind: 'flat' },
          },
          { name: 'lenslets', turns: alongBeam },
        ),
        repeat: { counts: [2, 2, 1], pitch: [2, 2, 0] },
      },
      piece({ kind: 'box', size: [4, 4, 1] }, { name: 'plate', at: [0, 0, 1] }),
    ],
    fills: square(4),
    transmitted: integrate((a) => integrate((b) => survives(2 - sag(3, 0, Math.hypot(a, b))), 0, 1), 0, 1),
  },
  {
    label: 'square tunnel along its axis',
    against: '(b² + (a² − b²)e^(−µh))/a²',
    body: { kind: 'tube', outer: column(3, 3), bore: column(2, 3) },
    fills: square(3),
    transmitted: (4 + 5 * survives(3)) / 9,
  },
];

export const parallelBeamProof: Proof = {
  name: 'Parallel light through bodies',
  law: 'an evenly filled parallel beam keeps the mean of exp(−µ·chord)',
  source:
    'Beer–Lambert over the chords of each shape, closed or by quadrature; sphere: van de Hulst, Light Scattering by Small Particles (1957) §11.2',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const beam of BEAMS) cases.push(await throughBody(context, beam));
    return cases;
  },
};

async function throughBody(
  context: ProofContext,
  { label, against, body, fills, transmitted }: Beam,
): Promise<ProofCase> {
  const tallies = await traceCell(
    context,
    cell(label, {
      media: [medium('grey', 1.36, { absorption: MU }), medium('matched', 1.36)],
      around: 'matched',
      parts: [part('body', 'grey', body)],
      pumps: [pump([0, 0, -20], [0, 0, 1], { kind: 'patch', outline: fills, divergence: [0, 0] })],
      exit: exitOf(body),
    }),
    0.5,
  );
  return compare(
    `absorbed: ${label}`,
    against,
    fateShare(tallies, slotsOf({ fate: 'absorbed-by-solvent' })),
    1 - transmitted,
  );
}

function exitOf(body: Beam['body']): string {
  return `body.${'kind' in body ? shapeFaces(body)[0] : pieceFaces(body[0])[0]}`;
}
