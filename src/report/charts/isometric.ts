/** A design drawn without a browser's 3D: parallel projection, faces as tints, edges, arrows of the pumps, some paths. */
import type { Drawing, DrawnFace } from '../../record/drawing.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { significant } from '../number-format.js';
import { type Bounds, boundsOf } from '../view/bounds.js';
import { finishTint } from '../view/finish-tints.js';
import { type KeptPath, keptPaths } from '../view/kept-paths.js';
import { along, boxCorners, firstOutlook, outlookAxes } from '../view/outlook.js';
import { partBounds, pathRooms } from '../view/pack-drawing.js';
import { pumpArrow } from '../view/pump-arrow.js';
import { hull, type Spot } from './hull.js';
import { lightStroke } from './light-stroke.js';
import { picture, round } from './picture.js';
import { spreadLabels } from './spread-labels.js';

export interface IsometricSize {
  readonly width: number;
  /** The design is drawn no higher. */
  readonly height: number;
  /** Room for names on either side. */
  readonly side: number;
  /** Characters of a name. */
  readonly letters: number;
  readonly paths: number;
  /** Points of all paths together: more would be a tangle. */
  readonly points: number;
  /** Characters of markup that paths, and that edges, may take. */
  readonly pathRoom: number;
  readonly edgeRoom: number;
}

export const WIDE_ISOMETRIC: IsometricSize = {
  width: 860,
  height: 520,
  side: 180,
  letters: 24,
  paths: 60,
  points: 500,
  pathRoom: 60_000,
  edgeRoom: 30_000,
};
export const NARROW_ISOMETRIC: IsometricSize = {
  width: 370,
  height: 300,
  side: 98,
  letters: 13,
  paths: 30,
  points: 220,
  pathRoom: 25_000,
  edgeRoom: 20_000,
};

const MARGIN = 30;
/** Light that leaves is drawn on for this share of the diagonal of the parts. */
const AWAY = 0.15;
const MOST_LABELS = 14;
const EXIT_COLOUR = 'var(--output)';
const EXIT_OPACITY = 0.22;

/** @param id unique on the page */
export function isometric(drawing: Drawing, id: string, look: IsometricSize): Markup {
  const { width, side, letters } = look;
  const solid = partBounds(drawing);
  const size = solid.high.map((value, i) => value - solid.low[i]);
  const outlook = firstOutlook(size);
  const { right, up, toward } = outlookAxes(outlook);
  const arrows = drawing.pumps.map((pump) => ({ pump, ...pumpArrow(pump, solid) }));
  const frame = boundsOf([
    [...boxCorners(solid.low, solid.high), ...arrows.map(({ tail }) => tail)].flatMap((at) => [
      along(at, right),
      along(at, up),
      0,
    ]),
  ]) as Bounds;
  const [wide, tall] = [0, 1].map((i) => Math.max(frame.high[i] - frame.low[i], 1e-9));
  const scale = Math.min((width - 2 * side) / wide, (look.height - 2 * MARGIN) / tall);
  const height = Math.max(150, tall * scale + 2 * MARGIN);
  const spot = (at: readonly number[]): Spot => [
    width / 2 + scale * (along(at, right) - (frame.low[0] + frame.high[0]) / 2),
    height / 2 - scale * (along(at, up) - (frame.low[1] + frame.high[1]) / 2),
  ];
  const faces = drawing.parts.flatMap((part) => part.faces).toSorted((a, b) => depth(a, toward) - depth(b, toward));
  const { paths } = keptPaths(drawing.paths, pathRooms(drawing, AWAY), look.points);
  const shown = drawnPaths(paths.slice(0, look.paths), spot, look.pathRoom);
  const labels = spreadLabels(labelsOf(drawing, arrows, spot, letters), { width, height, side });
  const parts = drawing.parts.map(({ name, medium }) => `${shortName(name, letters)} of ${shortName(medium, letters)}`);
  return picture(
    {
      id,
      title: 'The design in space',
      description: `Parallel projection from the front, the right and above. Parts: ${parts.slice(0, MOST_LABELS).join('; ')}. The box around all parts measures ${size.map((one) => significant(one, 4)).join(' by ')} mm along x, y and z. ${drawing.pumps.length} ${drawing.pumps.length === 1 ? 'pump' : 'pumps'}${shown.length > 0 ? `; ${shown.length} paths in the colour of their light, the pump light thin` : ''}.`,
    },
    width,
    height + 30,
    markup`<g>${faces.map((face) => tinted(face, spot))}</g><g class="iso-paths">${shown}</g><g class="iso-edges">${edgePaths(faces, spot, look.edgeRoom)}</g>${drawing.planes.map(
      ({ edges, isExit }) => markup`<path class="${isExit ? 'iso-exit' : 'iso-plane'}" d="${segments(edges, spot)}"/>`,
    )}<g class="iso-pumps">${arrows.map(({ tail, tip, pump }) => arrow(spot(tail), spot(tip), segments(pump.edges, spot)))}</g>${labels}${scaleBar(scale, height, width)}`,
    'isometric',
  );
}

function depth({ triangles }: DrawnFace, toward: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i + 3 <= triangles.length; i += 3) sum += along(triangles.slice(i, i + 3), toward);
  return triangles.length === 0 ? 0 : (3 * sum) / triangles.length;
}

/** The tint of a face as the outline of its projection, which for a curved one is drawn too. */
function tinted({ triangles, normals, finishKind, isExit }: DrawnFace, spot: (at: readonly number[]) => Spot): Markup {
  const spots = Array.from({ length: triangles.length / 3 }, (_, i) => spot(triangles.slice(3 * i, 3 * i + 3)));
  const outline = hull(spots);
  const { colour, opacity } = finishTint(finishKind);
  const flat = normals.every((value, i) => Math.abs(value - normals[i % 3]) < 1e-6);
  const d = `M${outline.map(([x, y]) => `${round1(x)} ${round1(y)}`).join('L')}Z`;
  if (outline.length < 3) return markup``;
  return markup`<path d="${d}" fill="${isExit ? EXIT_COLOUR : colour}" fill-opacity="${isExit ? EXIT_OPACITY : round(0.8 * opacity)}"${flat ? null : markup` class="iso-curved"`}/>`;
}

function edgePaths(
  faces: readonly DrawnFace[],
  spot: (at: readonly number[]) => Spot,
  most: number,
): readonly Markup[] {
  let room = most;
  return faces
    .toSorted((a, b) => Number(a.isExit) - Number(b.isExit))
    .map(({ edges, isExit }) => {
      const d = segments(edges, spot);
      room -= d.length;
      return room < 0 ? markup`` : markup`<path${isExit ? markup` class="iso-exit"` : null} d="${d}"/>`;
    });
}

/** Segments as one path; those that follow one another are joined. */
function segments(edges: readonly number[], spot: (at: readonly number[]) => Spot): string {
  let d = '';
  let last = '';
  for (let i = 0; i + 6 <= edges.length; i += 6) {
    const [from, to] = [spot(edges.slice(i, i + 3)), spot(edges.slice(i + 3, i + 6))].map(place);
    if (from === to) continue;
    d += from === last ? `L${to}` : `M${from}L${to}`;
    last = to;
  }
  return d;
}

function drawnPaths(
  paths: readonly KeptPath[],
  spot: (at: readonly number[]) => Spot,
  most: number,
): readonly Markup[] {
  let room = most;
  return paths.flatMap((path) => {
    const drawn = onePath(path, spot);
    room -= drawn.text.length;
    return room < 0 ? [] : [drawn];
  });
}

/** One history: a polyline for each stretch of one colour, and a dot where it ended. */
function onePath(
  { points, wavelengthsNm, pumpSegments, cutAfter }: KeptPath,
  spot: (at: readonly number[]) => Spot,
): Markup {
  const places = Array.from({ length: points.length / 3 }, (_, i) => place(spot(points.slice(3 * i, 3 * i + 3))));
  const stretches: Markup[] = [];
  for (let i = 0; i < wavelengthsNm.length; ) {
    const pump = i < pumpSegments;
    const stroke = lightStroke(wavelengthsNm[i]);
    let end = i;
    while (
      end < wavelengthsNm.length &&
      end !== cutAfter &&
      end < pumpSegments === pump &&
      lightStroke(wavelengthsNm[end]) === stroke
    )
      end++;
    if (end > i) {
      const d = `M${places.slice(i, end + 1).join('L')}`;
      stretches.push(
        pump ? markup`<path class="iso-pump-light" d="${d}"/>` : markup`<path stroke="${stroke}" d="${d}"/>`,
      );
    }
    i = end === i ? i + 1 : end === cutAfter ? end + 1 : end;
  }
  const [x, y] = places[places.length - 1].split(' ');
  return markup`<g>${stretches}<circle cx="${x}" cy="${y}" r="2"/></g>`;
}

function arrow(tail: Spot, tip: Spot, outline: string): Markup {
  const length = Math.hypot(tip[0] - tail[0], tip[1] - tail[1]);
  const rim = outline === '' ? null : markup`<path d="${outline}"/>`;
  // Seen along its axis there is no arrow to draw.
  if (length < 4) return markup`${rim}<circle cx="${round1(tip[0])}" cy="${round1(tip[1])}" r="4"/>`;
  const [ux, uy] = [(tip[0] - tail[0]) / length, (tip[1] - tail[1]) / length];
  const head = Math.min(14, length / 2);
  const neck: Spot = [tip[0] - head * ux, tip[1] - head * uy];
  const wings = [1, -1].map((side) => place([neck[0] - side * 0.42 * head * uy, neck[1] + side * 0.42 * head * ux]));
  return markup`${rim}<path class="iso-shaft" d="M${place(tail)}L${place(neck)}"/><path class="iso-head" d="M${place(tip)}L${wings[0]}L${wings[1]}Z"/>`;
}

function labelsOf(
  { parts, planes }: Drawing,
  arrows: readonly { readonly pump: Drawing['pumps'][number]; readonly tail: readonly number[] }[],
  spot: (at: readonly number[]) => Spot,
  letters: number,
) {
  const middle = (numbers: readonly number[]) => {
    const { low, high } = boundsOf([numbers]) ?? { low: [0, 0, 0], high: [0, 0, 0] };
    return spot(low.map((value, i) => (value + high[i]) / 2));
  };
  const exits = parts.flatMap(({ faces }) => faces.filter(({ isExit }) => isExit));
  return [
    ...exits.map(({ name, triangles }) => ({ text: `exit: ${name}`, at: middle(triangles) })),
    ...planes
      .filter(({ edges }) => edges.length > 0)
      .map(({ name, isExit, edges }) => ({ text: isExit ? `exit: ${name}` : name, at: middle(edges) })),
    ...arrows.map(({ pump, tail }) => ({
      text: letters < 20 ? pump.name : `${pump.name}, ${significant(pump.watts, 3)} W`,
      at: spot(tail),
    })),
    ...parts.map(({ name, bounds }) => ({ text: name, at: middle([...bounds[0], ...bounds[1]]) })),
  ]
    .slice(0, MOST_LABELS)
    .map(({ text, at }) => ({ text: shortName(text, letters), at }));
}

/** Lengths are true along the picture. */
function scaleBar(scale: number, height: number, width: number): Markup {
  const most = (0.15 * width) / scale;
  const power = 10 ** Math.floor(Math.log10(most));
  const length = power * (most >= 5 * power ? 5 : most >= 2 * power ? 2 : 1);
  const y = Math.round(height) + 12;
  return markup`<path class="iso-scale" d="M20 ${y - 5}v5h${round1(length * scale)}v-5"/><text class="caption" x="20" y="${y + 15}">${significant(length, 3)} mm</text>`;
}

const round1 = (value: number): number => Math.round(value * 10) / 10 + 0;
const place = ([x, y]: Spot): string => `${round1(x)} ${round1(y)}`;
