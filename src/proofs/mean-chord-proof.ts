import type { ShapeDescription, Vector2, Vector3 } from '../design/description.js';
import { shapeFaces } from '../design/shape-faces.js';
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

/** Rings of a paraboloid of revolution with its vertex at the bottom. */
function bowl(focalLength: number, height: number): Entry[] {
  const rim = Math.sqrt(4 * focalLength * height);
  return NODES.map(({ at, weight }) => {
    const across = rim * at;
    const slope = across / (2 * focalLength);
    const stretch = Math.hypot(1, slope);
    const inward: Vector3 = [-slope / stretch, 0, 1 / stretch];
    return {
      at: [across + UNDER_MM * inward[0], 0, across ** 2 / (4 * focalLength) - height / 2 + UNDER_MM * inward[2]],
      inward,
      area: weight * rim * 2 * Math.PI * across * stretch,
    };
  });
}

/** One of two equal spherical sides of a lens (equal depths are equal areas), standing for both, and its edge. */
function biconvex(radius: number, rim: number, edge: number): Entry[] {
  const depth = radius - Math.sqrt(radius ** 2 - rim ** 2);
  const side = NODES.map(({ at, weight }): Entry => {
    const rise = radius - depth * at;
    const across = Math.sqrt(radius ** 2 - rise ** 2);
    const inward: Vector3 = [-across / radius, -rise / radius, 0];
    return {
      at: [across + UNDER_MM * inward[0], edge / 2 + depth * (1 - at) + UNDER_MM * inward[1], 0],
      inward,
      area: weight * 2 * 2 * Math.PI * radius * depth,
    };
  });
  const rings = NODES.map(
    ({ at, weight }): Entry => ({
      at: [rim - UNDER_MM, edge * (at - 0.5), 0],
      inward: [-1, 0, 0],
      area: weight * 2 * Math.PI * rim * edge,
    }),
  );
  return [...side, ...rings];
}

/** Faces of a rectangular frustum: a quarter of its ends, a half of its front and left, which stand for their opposites too. */
function frustum([w0, d0]: Vector2, [w1, d1]: Vector2, height: number): Entry[] {
  const grid = NODES.flatMap((s) => NODES.map((t) => ({ s: s.at, t: t.at, weight: s.weight * t.weight })));
  const end = (w: number, d: number, up: number) =>
    grid.map(
      ({ s, t, weight }): Entry => ({
        at: [(w / 2) * s, (d / 2) * t, up * (height / 2 - UNDER_MM)],
        inward: [0, 0, -up],
        area: weight * w * d,
      }),
    );
  const wall = (w: number, v: number, lean: number, place: (across: number, out: number, z: number) => Vector3) => {
    const slant = Math.hypot(height, lean);
    return grid.map(({ s, t, weight }): Entry => {
      const width = w + (v - w) * t;
      const inward = place(0, -height / slant, -lean / slant);
      const at = place((width / 2) * s, (place === onFront ? d0 : w0) / 2 - lean * t, height * (t - 0.5));
      return {
        at: [at[0] + UNDER_MM * inward[0], at[1] + UNDER_MM * inward[1], at[2] + UNDER_MM * inward[2]],
        inward,
        area: 2 * weight * width * slant,
      };
    });
  };
  return [
    ...end(w0, d0, -1),
    ...end(w1, d1, 1),
    ...wall(w0, w1, (d0 - d1) / 2, onFront),
    ...wall(d0, d1, (w0 - w1) / 2, onLeft),
  ];
}
const onFront = (across: number, out: number, z: number): Vector3 => [across, -out, z];
const onLeft = (across: number, out: number, z: number): Vector3 => [-out, across, z];

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
  {
    name: 'paraboloid of focal length 1, height 2',
    shape: { kind: 'paraboloid', focalLength: 1, height: 2 },
    entries: [...disc(Math.sqrt(8), 1, -1), ...bowl(1, 2)],
    volume: 8 * Math.PI,
    surface: 8 * Math.PI + ((Math.PI * Math.sqrt(8)) / 24) * (24 ** 1.5 - 8 ** 1.5),
  },
  {
    name: 'biconvex lens, radii 5, rim 3, edge 1',
    shape: {
      kind: 'lens',
      outline: { kind: 'disc', radius: 3 },
      thickness: 3,
      profile: 'round',
      front: { kind: 'bulges', radius: 5, conic: 0 },
      back: { kind: 'bulges', radius: 5, conic: 0 },
    },
    entries: biconvex(5, 3, 1),
    volume: Math.PI * (9 + 28 / 3),
    surface: Math.PI * (6 + 20),
  },
  {
    name: 'rectangular frustum, 4 × 2 to 2 × 1, height 3',
    shape: {
      kind: 'frustum',
      bottom: [
        [-2, -1],
        [2, -1],
        [2, 1],
        [-2, 1],
      ],
      top: [
        [-1, -0.5],
        [1, -0.5],
        [1, 0.5],
        [-1, 0.5],
      ],
      height: 3,
      sides: ['front', 'right', 'back', 'left'],
    },
    entries: frustum([4, 2], [2, 1], 3),
    volume: 14,
    surface: 10 + 6 * Math.hypot(3, 0.5) + 3 * Math.hypot(3, 1),
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
          exit: `body.${shapeFaces(shape)[0]}`,
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
