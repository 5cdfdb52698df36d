import type { Drawing } from '../../record/drawing.js';
import { visibleText } from '../markup.js';
import { shortName } from '../name-text.js';
import { type Bounds, boundsOf, widened } from './bounds.js';
import { type KeptPath, keptPaths } from './kept-paths.js';
import { lightIndex } from './light-index.js';
import { lightTable } from './light-table.js';
import type { PackedDrawing, PackedFace } from './packed-drawing.js';
import { pumpArrow } from './pump-arrow.js';
import { viewName } from './view-name.js';
import { type Welded, weld } from './weld.js';

/** What a page of 3 MB has room for beside its maps. */
const MOST_TRIANGLES = 16_000;
const MOST_EDGES = 12_000;
const MOST_POINTS = 36_000;
const CELLS = 65_535;
/** Cells joined at the first try to make a mesh coarser. */
const COARSE = 64;
const FATE_LETTERS = 120;

/** A drawing for the 3D view of the page. Coordinates lie on a grid of 65 535 cells; meshes too fine for a page are made coarser. */
export function packDrawing(drawing: Drawing): PackedDrawing {
  const solid = partBounds(drawing);
  const arrows = drawing.pumps.map((pump) => pumpArrow(pump, solid));
  const room = roomOf(drawing, solid);
  const { fates, paths } = keptPaths(drawing.paths, pathRooms(drawing, ROUND_ABOUT), MOST_POINTS);
  const all = boundsOf([room.low, room.high, ...paths.map(({ points }) => points)]) ?? room;
  const step = Math.max(...all.high.map((value, i) => value - all.low[i]), Number.MIN_VALUE) / CELLS;
  const cellOf = (value: number, axis: number) => clampCell((value - all.low[axis]) / step);
  const faces = drawing.parts.flatMap((part) => part.faces);
  const welded = weldAll(faces, cellOf);
  const outlines = [...faces, ...drawing.pumps, ...drawing.planes].map(({ edges }) => edgesOf(edges, cellOf));
  limitEdges(outlines);
  const edgeCount = (i: number) => outlines[i].length / 6;
  let at = 0;
  const parts = drawing.parts.map((part) => ({
    name: viewName(part.name),
    medium: viewName(part.medium),
    dyed: part.dyed,
    low: part.bounds[0],
    high: part.bounds[1],
    faces: part.faces.map((face): PackedFace => {
      const i = at++;
      return {
        name: viewName(face.name),
        finish: viewName(face.finish),
        finishKind: viewName(face.finishKind),
        isExit: face.isExit,
        vertices: welded[i].vertices.length / 3,
        triangles: welded[i].corners.length / 3,
        edges: edgeCount(i),
      };
    }),
  }));
  const pumps = drawing.pumps.map(({ name, watts, wavelengthNm, at: place }, i) => ({
    name: viewName(name),
    watts,
    wavelengthNm,
    at: place,
    ...arrows[i],
    edges: edgeCount(faces.length + i),
  }));
  const planes = drawing.planes.map(({ name, isExit }, i) => ({
    name: viewName(name),
    isExit,
    edges: edgeCount(faces.length + drawing.pumps.length + i),
  }));
  return {
    low: all.low,
    step,
    parts,
    pumps,
    planes,
    fates: fates.map((fate) => ({
      ...fate,
      where: fate.where === null ? null : viewName(fate.where),
      words: visibleText(shortName(fate.words, FATE_LETTERS)),
    })),
    paths: paths.map(({ fate, points, pumpSegments, cutAfter }) => [fate, points.length / 3, pumpSegments, cutAfter]),
    vertices: words16(welded.flatMap(({ vertices }) => vertices)),
    normals: base64(Int8Array.from(welded.flatMap(({ normals }) => normals))),
    corners: words16(welded.flatMap(({ corners }) => corners)),
    edges: words16(outlines.flat()),
    points: words16(paths.flatMap(({ points }) => points.map((value, i) => Math.round(cellOf(value, i % 3))))),
    lights: base64(Uint8Array.from(paths.flatMap(({ wavelengthsNm }: KeptPath) => wavelengthsNm.map(lightIndex)))),
    colours: base64(lightTable()),
  };
}

/** Light that leaves is followed by this share of the diagonal of the parts. */
const ROUND_ABOUT = 0.35;

/** Where the paths of a picture end at the latest: the room of everything there is, and nearer once they have met the parts. */
export function pathRooms(drawing: Drawing, share: number): readonly Bounds[] {
  const solid = partBounds(drawing);
  const reached = boundsOf([solid.low, solid.high, ...drawing.planes.map(({ edges }) => edges)]) ?? solid;
  return [widened(roomOf(drawing, solid), ROOM_EDGE), widened(reached, share)];
}

const ROOM_EDGE = 0.05;

/** The box around all parts; around everything where there is no part. */
export function partBounds(drawing: Drawing): Bounds {
  return boundsOf(drawing.parts.flatMap(({ bounds }) => [...bounds])) ?? roomOf(drawing, null);
}

/** The box around parts, pumps and planes. */
function roomOf({ pumps, planes }: Drawing, solid: Bounds | null): Bounds {
  const lists = [...pumps.flatMap(({ at, edges }) => [at, edges]), ...planes.map(({ edges }) => edges)];
  return (
    boundsOf([...(solid === null ? [] : [solid.low, solid.high]), ...lists]) ?? { low: [0, 0, 0], high: [1, 1, 1] }
  );
}

function weldAll(
  faces: Drawing['parts'][number]['faces'],
  cellOf: (value: number, axis: number) => number,
): readonly Welded[] {
  // Where triangles are too many to begin with, the fine grid need not be tried.
  let coarse = faces.reduce((sum, { triangles }) => sum + triangles.length / 9, 0) > MOST_TRIANGLES ? COARSE : 1;
  for (;;) {
    const welded = faces.map(({ triangles, normals }) => weld(triangles, normals, cellOf, coarse));
    const count = welded.reduce((sum, { corners }) => sum + corners.length / 3, 0);
    if (count <= MOST_TRIANGLES || coarse > CELLS / 8) return welded;
    coarse = Math.max(COARSE, coarse * (count > 4 * MOST_TRIANGLES ? 2 : Math.SQRT2));
  }
}

function edgesOf(edges: readonly number[], cellOf: (value: number, axis: number) => number): number[] {
  return edges.slice(0, edges.length - (edges.length % 6)).map((value, i) => Math.round(cellOf(value, i % 3)));
}

/** The faces with the most edges lose some, evenly, until the page has room for all. */
function limitEdges(outlines: number[][]): void {
  const total = () => outlines.reduce((sum, { length }) => sum + length / 6, 0);
  for (let over = total(); over > MOST_EDGES; over = total()) {
    const most = outlines.reduce((at, list, i) => (list.length > outlines[at].length ? i : at), 0);
    outlines[most] = outlines[most].filter((_, i) => Math.floor(i / 6) % 2 === 0);
  }
}

const clampCell = (cell: number): number => (Number.isFinite(cell) ? Math.min(CELLS, Math.max(0, cell)) : 0);
const words16 = (values: readonly number[]): string => base64(Uint16Array.from(values));

function base64(array: Uint8Array | Int8Array | Uint16Array): string {
  return Buffer.from(array.buffer, array.byteOffset, array.byteLength).toString('base64');
}
