import type { ShapeDescription, Vector3 } from '../design/description.js';
import { figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, lambertianDisc, medium, part, pump } from './proof-cells.js';
import { gaussNodes } from './quadrature.js';
import { traceCell } from './trace-cell.js';

/** Where Lambertian light enters: a point just under the surface, the way in, and the area it stands for. */
interface Entry {
  readonly at: Vector3;
  readonly inward: Vector3;
  readonly area: number;
}

interface Body {
  readonly name: string;
  readonly shape: ShapeDescription;
  readonly entries: readonly Entry[];
  readonly volume: number;
  readonly surface: number;
}

const NODES = gaussNodes(12);
const UNDER_MM = 1e-9;

/** Rings of a flat disc, looking along ±z: by symmetry a radius stands for the whole ring. */
const disc = (radius: number, z: number, inwardZ: number): Entry[] =>
  NODES.map(({ at, weight }) => ({
    at: [radius * Math.sqrt(at), 0, z + UNDER_MM * inwardZ],
    inward: [0, 0, inwardZ],
    area: weight * Math.PI * radius ** 2,
  }));

/** Rings of a cone's (or cylinder's) side between two radii. */
function coneSide(bottom: number, top: number, height: number): Entry[] {
  const slant = Math.hypot(height, bottom - top);
  const inward: Vector3 = [-height / slant, 0, (top - bottom) / slant];
  return NODES.map(({ at, weight }) => {
    const radius = bottom + (top - bottom) * at;
    return {
      at: [radius + UNDER_MM * inward[0], 0, height * (at - 0.5) + UNDER_MM * inward[2]],
      inward,
      area: weight * 2 * Math.PI * radius * slant,
    };
  });
}

/** Rings of the dome of a cap; equal heights are equal areas (Archimedes). */
const dome = (radius: number, height: number): Entry[] =>
  NODES.map(({ at, weight }) => {
    const rise = radius - height + height * at;
    const across = Math.sqrt(radius ** 2 - rise ** 2);
    const inward: Vector3 = [-across / radius, 0, -rise / radius];
    return {
      at: [across + UNDER_MM * inward[0], 0, rise - radius + height / 2 + UNDER_MM * inward[2]],
      inward,
      area: weight * 2 * Math.PI * radius * height,
    };
  });

/** A quarter of each of three faces of a box; the rest follows by symmetry. */
function boxFaces(size: Vector3): Entry[] {
  return [0, 1, 2].flatMap((axis) => {
    const [p, q] = [(axis + 1) % 3, (axis + 2) % 3];
    return NODES.flatMap((s) =>
      NODES.map((t): Entry => {
        const at = [0, 0, 0];
        const inward = [0, 0, 0];
        at[axis] = size[axis] / 2 - UNDER_MM;
        at[p] = (size[p] / 2) * s.at;
        at[q] = (size[q] / 2) * t.at;
        inward[axis] = -1;
        return {
          at: [at[0], at[1], at[2]],
          inward: [inward[0], inward[1], inward[2]],
          area: 2 * size[p] * size[q] * s.weight * t.weight,
        };
      }),
    );
  });
}

const BODIES: readonly Body[] = [
  {
    name: 'box 2 × 3 × 5',
    shape: { kind: 'box', size: [2, 3, 5] },
    entries: boxFaces([2, 3, 5]),
    volume: 30,
    surface: 62,
  },
  {
    name: 'sphere of radius 3',
    shape: { kind: 'sphere', radius: 3 },
    entries: [{ at: [0, 0, 3 - UNDER_MM], inward: [0, 0, -1], area: 1 }],
    volume: 36 * Math.PI,
    surface: 36 * Math.PI,
  },
  {
    name: 'cylinder, radius 2, height 3',
    shape: { kind: 'cylinder', radius: 2, height: 3 },
    entries: [...disc(2, 1.5, -1), ...disc(2, -1.5, 1), ...coneSide(2, 2, 3)],
    volume: 12 * Math.PI,
    surface: 20 * Math.PI,
  },
  {
    name: 'cone frustum, radii 3 and 1, height 2',
    shape: { kind: 'cone', bottomRadius: 3, topRadius: 1, height: 2 },
    entries: [...disc(3, -1, 1), ...disc(1, 1, -1), ...coneSide(3, 1, 2)],
    volume: (Math.PI * 2 * (9 + 3 + 1)) / 3,
    surface: Math.PI * (9 + 1 + (3 + 1) * Math.hypot(2, 2)),
  },
  {
    name: 'cap of height 1.5 of a sphere of radius 2',
    shape: { kind: 'cap', radius: 2, height: 1.5 },
    entries: [...disc(Math.sqrt(4 - 0.25), -0.75, 1), ...dome(2, 1.5)],
    volume: (Math.PI * 1.5 ** 2 * (6 - 1.5)) / 3,
    surface: Math.PI * (3.75 + 2 * 2 * 1.5),
  },
];

/** Allowed for twelve nodes a direction; at 8·10⁵ histories nothing of it is seen above 3·10⁻⁴. */
const QUADRATURE_ERROR = 3e-4;

export const meanChordProof: Proof = {
  name: 'Mean chord of a convex body',
  law: 'Lambertian light that enters a convex body evenly over its whole surface stays for 4V/S on average',
  source: 'Cauchy (1841); Czuber (1884); Kellerer, Radiation Research 47 359 (1971)',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const { name, shape, entries, volume, surface } of BODIES) {
      const tallies = await traceCell(
        context,
        cell(`chord, ${name}`, {
          media: [medium('clear', 1.36), medium('matched', 1.36)],
          around: 'matched',
          parts: [part('body', 'clear', shape)],
          pumps: entries.map(({ at, inward, area }, index) =>
            pump(at, inward, lambertianDisc(1e-9), { name: `entry-${index}`, power: area }),
          ),
          exit: shape.kind === 'sphere' ? 'body.surface' : 'body.bottom',
        }),
      );
      const expected = (4 * volume) / surface;
      cases.push(
        compare(
          `mean path in mm, ${name}`,
          '4V/S',
          figureMean(tallies, { pumpPath: 1 }),
          expected,
          expected * QUADRATURE_ERROR,
        ),
      );
    }
    return cases;
  },
};
