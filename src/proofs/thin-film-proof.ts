import type { Vector3 } from '../design/description.js';
import { fateShare } from './estimate.js';
import { type Film, filmShares } from './film-law.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, medium, part, pump, stack, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const quarter = (n: number, nm: number): Film => [n, 0, nm / (4 * n)];
/** H(LH)^pairs of quarter waves. */
const mirror = (high: number, low: number, pairs: number, nm: number): Film[] => [
  quarter(high, nm),
  ...Array.from({ length: pairs }, () => [quarter(low, nm), quarter(high, nm)]).flat(),
];
/** Peak reflectance of such a mirror, Born & Wolf §1.6.5. */
function peak(n0: number, high: number, low: number, pairs: number, n1: number): number {
  const admittance = (high / low) ** (2 * pairs) * (high ** 2 / n1);
  return ((n0 - admittance) / (n0 + admittance)) ** 2;
}
const BORN_WOLF = 'Born & Wolf §1.6.5';
const ECHOES = 'sum of echoes';
const FIFTEEN = mirror(2.35, 1.46, 7, 520);
const SILVER: Film[] = [[0.05, 3.3, 50]];

interface Row {
  readonly name: string;
  readonly films: readonly Film[];
  /** Index outside, index of the coated part, angle outside in degrees, wavelength in nm. */
  readonly at: readonly [n0: number, n1: number, degrees: number, nm: number];
  /** Reflectance printed in a closed form; null where the sum of echoes says it. */
  readonly closed: number | null;
}

const ROWS: readonly Row[] = [
  // ((n₀nₛ − n₁²)/(n₀nₛ + n₁²))², the handbook 1.26 %.
  { name: 'quarter wave of 1.38 on glass', films: [quarter(1.38, 550)], at: [1, 1.52, 0, 550], closed: 0.012601 },
  {
    name: '7-layer quarter-wave mirror',
    films: mirror(2.35, 1.46, 3, 550),
    at: [1, 1.52, 0, 550],
    closed: peak(1, 2.35, 1.46, 3, 1.52),
  },
  {
    name: '7-layer mirror in liquid',
    films: mirror(2.15, 1.46, 3, 520),
    at: [1.3614, 1.5168, 0, 520],
    closed: peak(1.3614, 2.15, 1.46, 3, 1.5168),
  },
  { name: '15 layers in air, 45°', films: FIFTEEN, at: [1, 1.52, 45, 520], closed: null },
  { name: '15 layers in liquid, 45°', films: FIFTEEN, at: [1.3614, 1.52, 45, 520], closed: null },
  { name: '15 layers in liquid, 60°', films: FIFTEEN, at: [1.3614, 1.52, 60, 520], closed: null },
  { name: '15 layers in liquid, 60°, 445 nm', films: FIFTEEN, at: [1.3614, 1.52, 60, 445], closed: null },
  { name: '100 nm of air between liquids, 50°', films: [[1, 0, 100]], at: [1.3614, 1.3614, 50, 520], closed: null },
  { name: '50 nm of silver-like metal, 30°', films: SILVER, at: [1.3614, 1.5168, 30, 520], closed: null },
  { name: 'the same beyond the critical angle, 46°', films: SILVER, at: [1.52, 1, 46, 600], closed: null },
];

export const thinFilmProof: Proof = {
  name: 'Thin films, dry and wetted',
  law: 'R, T and what is absorbed of a stack between the media that touch it, at the angle in them',
  source: 'Born & Wolf, Principles of Optics, §1.6; Airy 1833 and Rouard 1937 for films one by one',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const row of ROWS) cases.push(...(await shine(context, row)));
    return cases;
  },
};

/** The coated part takes at once whatever gets into it. */
const SWALLOWS = { absorption: 1e4 };

async function shine(context: ProofContext, { name, films, at, closed }: Row): Promise<ProofCase[]> {
  const [n0, n1, degrees, nm] = at;
  const angle = radians(degrees);
  const along: Vector3 = [Math.sin(angle), 0, -Math.cos(angle)];
  const tallies = await traceCell(
    context,
    cell(name, {
      media: [medium('outside', n0), medium('inside', n1, SWALLOWS)],
      around: 'outside',
      finishes: [stack('films', films)],
      parts: [part('block', 'inside', { kind: 'box', size: [10, 10, 2] }, { faces: { top: 'films' } })],
      pumps: [pump([-along[0], 0, 1 - along[2]], along, thinBeam(), { wavelengthNm: nm })],
      exit: 'block.bottom',
    }),
    0.5,
  );
  const { reflectance, transmittance } = filmShares(films, n0, n1, angle, nm);
  const reflected = fateShare(tallies, slotsOf({ fate: 'reflected-at-entry', where: 'block.top' }));
  const cases = [
    // A table's error between its nodes is at most 1e-3, and far less than that almost everywhere; closed forms are for nodes.
    compare(
      `R, ${name}`,
      closed === null ? ECHOES : BORN_WOLF,
      reflected,
      closed ?? reflectance,
      closed === null ? 3e-4 : 1e-6,
    ),
  ];
  if (films.some(([, k]) => k > 0)) {
    const taken = fateShare(tallies, slotsOf({ fate: 'absorbed-by-finish', where: 'block.top' }));
    cases.push(compare(`absorbed, ${name}`, ECHOES, taken, 1 - reflectance - transmittance, 3e-4));
  }
  return cases;
}
