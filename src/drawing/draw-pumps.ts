/** Pumps as the drawing shows them: the outline of what emits, where it sits and where it looks. */
import type { Description, Outline, PumpDescription, Vector2, Vector3 } from '../design/description.js';
import type { Coordinates, DrawnPump } from '../record/drawing.js';
import { type BeamFrame, beamFrame } from '../scene/compile-pumps.js';
import type { PlacedPart } from '../scene/place-parts.js';
import { add, scale } from '../scene/vector.js';
import { FACETS_ROUND } from './facet-patch.js';
import { evenAngles, ringOf } from './rings.js';

/** More emitters than this are drawn as the outline of their bank. */
const MOST_EMITTERS = 200;
/** An emitter is drawn this large, in pitches: the design does not say how large it is. */
const EMITTER = 0.4;
/** Size, mm, of what has none: a single emitter, a beam without width. */
const POINT = 0.5;

export function drawPumps({ pumps }: Description, parts: readonly PlacedPart[]): DrawnPump[] {
  return pumps.map((pump) => {
    const frame = beamFrame(pump, parts);
    return {
      name: pump.name,
      watts: pump.power,
      wavelengthNm: pump.wavelengthNm,
      at: frame.origin,
      direction: frame.w,
      edges: emitterEdges(pump, frame),
    };
  });
}

function emitterEdges({ beam }: PumpDescription, frame: BeamFrame): Coordinates {
  switch (beam.kind) {
    case 'patch':
    case 'lambertian':
      return outlineEdges(beam.outline, frame);
    case 'gaussian':
      return outlineEdges({ kind: 'disc', radius: beam.radius }, frame);
    case 'diodes':
      return bankEdges(beam, frame);
    case 'rays':
      return rayEdges(beam.rays.position, frame);
  }
}

function bankEdges(
  { across, along, pitch, stack = null }: Extract<PumpDescription['beam'], { kind: 'diodes' }>,
  frame: BeamFrame,
): Coordinates {
  const { rows, pitch: rowPitch, step } = stack ?? { rows: 1, pitch: 0, step: 0 };
  if (rows > 1) {
    return Array.from({ length: rows }, (_, row) => {
      const shift = add(scale(frame.v, (row - (rows - 1) / 2) * rowPitch), scale(frame.w, -row * step));
      return bankEdges({ ...ONE_ROW, across, along, pitch }, { ...frame, origin: add(frame.origin, shift) });
    }).flat();
  }
  const least = Math.min(...[across, along].map((count, i) => (count > 1 ? pitch[i] : Number.POSITIVE_INFINITY)));
  const size = Number.isFinite(least) ? EMITTER * least : POINT;
  const emitter: Vector2 = [size, size];
  if (across * along > MOST_EMITTERS) {
    return rectangleEdges(frame, [0, 0], [(across - 1) * pitch[0] + size, (along - 1) * pitch[1] + size]);
  }
  return Array.from({ length: across * along }, (_, i) => {
    const u = ((i % across) - (across - 1) / 2) * pitch[0];
    const v = (Math.floor(i / across) - (along - 1) / 2) * pitch[1];
    return rectangleEdges(frame, [u, v], emitter);
  }).flat();
}

const ONE_ROW = { kind: 'diodes', divergence: [0, 0], lens: null } as const;

/** Rectangle about the places rays start from, in the plane of the pump. */
function rayEdges(position: readonly number[], frame: BeamFrame): Coordinates {
  const range = (axis: number): Vector2 => {
    const places = position.filter((_, i) => i % 3 === axis);
    return [places.reduce((a, b) => Math.min(a, b)), places.reduce((a, b) => Math.max(a, b))];
  };
  const [u, v] = [range(0), range(1)];
  const size: Vector2 = [u[1] - u[0], v[1] - v[0]];
  if (Math.max(...size) === 0) return outlineEdges({ kind: 'disc', radius: 0 }, frame);
  return rectangleEdges(frame, [(u[0] + u[1]) / 2, (v[0] + v[1]) / 2], size);
}

/** Sides of an outline about the origin of a frame, 6 numbers each; a small cross where it has no size. */
export function outlineEdges(outline: Outline, frame: Omit<BeamFrame, 'w'>): Coordinates {
  const { origin, u, v } = frame;
  if (outline.kind === 'rectangle' && Math.max(...outline.size) > 0) return rectangleEdges(frame, [0, 0], outline.size);
  if (outline.kind === 'disc' && outline.radius > 0)
    return closed(ringOf(origin, u, v, outline.radius, evenAngles(FACETS_ROUND)));
  return [u, v].flatMap((axis) => [...add(origin, scale(axis, -POINT / 2)), ...add(origin, scale(axis, POINT / 2))]);
}

function rectangleEdges({ origin, u, v }: Omit<BeamFrame, 'w'>, [atU, atV]: Vector2, [sizeU, sizeV]: Vector2) {
  const corner = (a: number, b: number): Vector3 =>
    add(origin, add(scale(u, atU + (a * sizeU) / 2), scale(v, atV + (b * sizeV) / 2)));
  return closed([corner(-1, -1), corner(1, -1), corner(1, 1), corner(-1, 1)]);
}

function closed(points: readonly Vector3[]): number[] {
  return points.flatMap((point, i) => [...point, ...points[(i + 1) % points.length]]);
}
