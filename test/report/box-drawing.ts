/** A drawing made by hand (invented): a mirrored box cell with a lid, a bank that looks at its front, and paths of several fates. */
import type { Drawing, DrawnFace, DrawnPart } from '../../src/record/drawing.js';

type Vector = readonly [number, number, number];
type Path = Drawing['paths'][number];
type Finishes = Readonly<Record<string, readonly [finish: string, kind: string]>>;

const SILVERED = ['silvered', 'mirror'] as const;
const BLUE_PASS = ['blue-pass', 'dichroic'] as const;
const FACES = ['left', 'right', 'front', 'back', 'bottom', 'top'] as const;

/** @param size of the cell, mm; its middle is the origin and a lid 1/8 as high lies on it */
export function boxDrawing(size: Vector = [20, 8, 8], paths = 40): Drawing {
  const [x, y, z] = size.map((length) => length / 2);
  const lid = z / 4;
  const cell = box('cell', 'bath', true, [-x, -y, -z], [x, y, z], {
    left: SILVERED,
    right: SILVERED,
    bottom: SILVERED,
    front: BLUE_PASS,
    back: BLUE_PASS,
  });
  return {
    parts: [cell, box('lid', 'window', false, [-x, -y, z], [x, y, z + lid], {}, 'top')],
    pumps: [
      {
        name: 'front-bank',
        watts: 60,
        wavelengthNm: 445,
        at: [0, -y - 40, 0],
        direction: [0, 1, 0],
        edges: loop([
          [-0.8 * x, -y - 40, -0.6 * z],
          [0.8 * x, -y - 40, -0.6 * z],
          [0.8 * x, -y - 40, 0.6 * z],
          [-0.8 * x, -y - 40, 0.6 * z],
        ]),
      },
    ],
    planes: [],
    paths: Array.from({ length: paths }, (_, i) => path(i, [x, y, z], lid)),
    pathsFrom: 2048,
  };
}

/** A box with the names of its faces as a design has them. */
export function box(
  name: string,
  medium: string,
  dyed: boolean,
  low: Vector,
  high: Vector,
  finishes: Finishes,
  exit?: string,
): DrawnPart {
  const faces = FACES.map((face, i): DrawnFace => {
    const axis = i >> 1;
    const [u, v] = [0, 1, 2].filter((other) => other !== axis);
    const corner = (a: number, b: number): Vector => {
      const at = [0, 0, 0];
      at[axis] = i % 2 === 0 ? low[axis] : high[axis];
      at[u] = a === 0 ? low[u] : high[u];
      at[v] = b === 0 ? low[v] : high[v];
      return [at[0], at[1], at[2]];
    };
    const round = [corner(0, 0), corner(1, 0), corner(1, 1), corner(0, 1)];
    // u, v and the axis are right-handed for x and z, left-handed for y; the low side looks the other way.
    if ((axis === 1) === (i % 2 === 1)) round.reverse();
    const normal = [0, 1, 2].map((other) => (other === axis ? (i % 2 === 0 ? -1 : 1) : 0));
    const [finish, finishKind] = finishes[face] ?? ['clear', 'clear'];
    return {
      name: `${name}.${face}`,
      finish,
      finishKind,
      isExit: face === exit,
      triangles: [0, 1, 2, 0, 2, 3].flatMap((n) => [...round[n]]),
      normals: Array.from({ length: 6 }, () => normal).flat(),
      edges: loop(round),
    };
  });
  return { name, medium, mediumKind: dyed ? 'liquid' : 'solid', dyed, faces, bounds: [low, high] };
}

function loop(corners: readonly Vector[]): number[] {
  return corners.flatMap((corner, i) => [...corner, ...corners[(i + 1) % corners.length]]);
}

const ENDS: readonly Path['end'][] = [
  { fate: 'left-by-exit', light: 'emitted', where: 'lid.top', by: null },
  { fate: 'absorbed-by-finish', light: 'emitted', where: 'cell.left', by: 'silvered' },
  { fate: 'absorbed-by-finish', light: 'emitted', where: 'cell.bottom', by: 'silvered' },
  { fate: 'lost-in-dye', light: 'emitted', where: 'cell', by: 'fluorescein' },
  { fate: 'left-elsewhere', light: 'emitted', where: 'cell.front', by: null },
  { fate: 'reflected-at-entry', light: 'pump', where: 'cell.front', by: null },
  { fate: 'left-elsewhere', light: 'pump', where: 'cell.back', by: null },
  { fate: 'left-by-exit', light: 'emitted', where: 'lid.top', by: null },
];

/** One path, repeatable: pump light comes in at the front, is taken by the dye and goes about until it ends where it should. */
function path(i: number, [x, y, z]: Vector, lid: number): Path {
  const share = (k: number) => 2 * ((0.5 + i * 0.754877666 + k * 0.569840291) % 1) - 1;
  const end = ENDS[i % ENDS.length];
  const entry: Vector = [0.75 * x * share(1), -y, 0.55 * z * share(2)];
  const start: Vector = [entry[0], -y - 40, entry[2]];
  const mirrored: Vector = [entry[0] + 30 * share(3), -y - 60, entry[2] + 10];
  const through: Vector = [entry[0], y + 60, entry[2]];
  if (end.fate === 'reflected-at-entry') return made(end, [start, entry, mirrored], 445, 2);
  if (end.light === 'pump') return made(end, [start, entry, [entry[0], y, entry[2]], through], 445, 3);
  const taken: Vector = [entry[0], -y + y * (0.2 + 0.6 * Math.abs(share(4))), entry[2]];
  const turns = Array.from({ length: 2 + (i % 5) }, (_, k): Vector => {
    const at: [number, number, number] = [x * share(5 + 3 * k), y * share(6 + 3 * k), z * share(7 + 3 * k)];
    const axis = (i + k) % 3;
    at[axis] = Math.sign(share(8 + 3 * k) || 1) * [x, y, z][axis];
    return at;
  });
  const out = lastPoints(end, [x, y, z], lid, share);
  return made(end, [start, entry, taken, ...turns, ...out], 505 + 5 * (i % 13), 2);
}

function lastPoints(end: Path['end'], [x, y, z]: Vector, lid: number, share: (k: number) => number): readonly Vector[] {
  const [u, v] = [0.9 * share(31), 0.9 * share(32)];
  if (end.where === 'lid.top')
    return [
      [u * x, v * y, z],
      [u * x, v * y, z + lid],
      [2 * u * x, 2 * v * y, z + 400],
    ];
  if (end.where === 'cell.left') return [[-x, u * y, v * z]];
  if (end.where === 'cell.bottom') return [[u * x, v * y, -z]];
  if (end.where === 'cell.front')
    return [
      [u * x, -y, v * z],
      [2 * u * x, -y - 300, 2 * v * z],
    ];
  return [[u * x, v * y, share(33) * z]];
}

function made(end: Path['end'], points: readonly Vector[], nm: number, pumpSegments: number): Path {
  const wavelengthsNm = Array.from({ length: points.length - 1 }, (_, i) => (i < pumpSegments ? 445 : nm));
  return { end, points: points.flat(), wavelengthsNm, pumpSegments, cutAfter: -1 };
}
