/** drawing.json: the design in space and some histories, as compact as JSON allows. */
import { z } from 'zod';
import type { Coordinates, Drawing, DrawnFace } from '../record/drawing.js';
import { fateSlotSchema } from './run-schema.js';

/** Counts up whenever a reader of older drawings would go wrong. */
export const DRAWING_FORMAT = 1;
/** A drawing as the file keeps it: coordinates to 1e-4 mm, components of unit vectors to 1e-4. Twice the same as once. */
export function keptDrawing(drawing: Drawing): Drawing {
  return {
    parts: drawing.parts.map((part) => ({
      ...part,
      faces: part.faces.map((face) => ({
        ...face,
        triangles: short(face.triangles),
        normals: short(face.normals),
        edges: short(face.edges),
      })),
      bounds: [short(part.bounds[0]), short(part.bounds[1])],
    })),
    pumps: drawing.pumps.map((pump) => ({
      ...pump,
      at: short(pump.at),
      direction: short(pump.direction),
      edges: short(pump.edges),
    })),
    planes: drawing.planes.map((plane) => ({ ...plane, normal: short(plane.normal), edges: short(plane.edges) })),
    paths: drawing.paths.map((path) => ({ ...path, points: short(path.points) })),
    pathsFrom: drawing.pathsFrom,
  };
}

// The sum takes the sign from −0, which JSON would lose.
const short = (values: Coordinates): number[] => values.map((value) => Math.round(value * 1e4) / 1e4 + 0);

export function drawingJson(drawing: Drawing): string {
  const kept = keptDrawing(drawing);
  const parts = kept.parts.map((part) => ({ ...part, faces: part.faces.map(shortNormals) }));
  return `${JSON.stringify({ format: DRAWING_FORMAT, ...kept, parts })}\n`;
}

/** A flat face has one normal; it is written once. */
function shortNormals(face: DrawnFace): DrawnFace {
  const { normals } = face;
  const flat = normals.length > 3 && normals.every((c, i) => c === normals[i % 3]);
  return flat ? { ...face, normals: normals.slice(0, 3) } : face;
}

const threes = z.array(z.number()).refine((list) => list.length % 3 === 0, { error: 'not whole points' });
const sixes = z.array(z.number()).refine((list) => list.length % 6 === 0, { error: 'not whole segments' });
const nines = z.array(z.number()).refine((list) => list.length % 9 === 0, { error: 'not whole triangles' });
const point = z.array(z.number()).length(3);
const text = z.string();

const face = z
  .object({
    name: text,
    finish: text,
    finishKind: text,
    isExit: z.boolean(),
    triangles: nines,
    normals: threes,
    edges: sixes,
  })
  .transform((written): DrawnFace => ({ ...written, normals: wholeNormals(written) }))
  .refine(({ triangles, normals }) => triangles.length === normals.length, { error: 'not a normal for every corner' });

function wholeNormals({ triangles, normals }: { triangles: Coordinates; normals: Coordinates }): Coordinates {
  if (normals.length !== 3) return normals;
  return triangles.map((_, i) => normals[i % 3]);
}

const path = z
  .object({
    end: fateSlotSchema,
    points: threes,
    wavelengthsNm: z.array(z.number()),
    pumpSegments: z.int().nonnegative(),
    cutAfter: z.int().min(-1),
  })
  .refine(({ points, wavelengthsNm }) => points.length >= 6 && wavelengthsNm.length === points.length / 3 - 1, {
    error: 'not a wavelength for every segment',
  });

/** Keys it does not know are passed over: a drawing may gain some without a new format number. */
export const drawingSchema = z
  .object({
    format: z.literal(DRAWING_FORMAT),
    parts: z.array(
      z.object({
        name: text,
        medium: text,
        mediumKind: z.enum(['gas', 'liquid', 'solid']),
        dyed: z.boolean(),
        faces: z.array(face),
        bounds: z.tuple([point, point]),
      }),
    ),
    pumps: z.array(
      z.object({
        name: text,
        watts: z.number(),
        wavelengthNm: z.number(),
        at: point,
        direction: point,
        edges: sixes,
      }),
    ),
    planes: z.array(z.object({ name: text, isExit: z.boolean(), normal: point, edges: sixes })),
    paths: z.array(path),
    pathsFrom: z.int().nonnegative(),
  })
  .transform(({ format: _, ...drawing }): Drawing => drawing);
