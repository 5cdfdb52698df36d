/** Names of faces in columns beside the views, each with a leader line; those that find no room get a number. */
import { round } from '../charts/picture.js';
import { type Markup, markup } from '../markup.js';
import type { LabelColumn, SheetLayout, ViewPlace } from './sheet-layout.js';
import { COLUMN, PITCH } from './sheet-layout.js';
import { fitText } from './text-width.js';
import type { FlatPoint } from './view.js';

export interface Labelled {
  readonly name: string;
  readonly isExit: boolean;
  /** Bare faces without a finish are labelled last. */
  readonly plain: boolean;
  /** On the sheet, in the views where the face can be pointed at. */
  readonly anchors: readonly SheetAnchor[];
}

export interface SheetAnchor {
  readonly place: ViewPlace;
  readonly point: FlatPoint;
  readonly within: boolean;
  readonly merit: number;
  readonly lean: number;
}

export interface FaceLabels {
  readonly drawn: Markup;
  /** Faces that are only numbered in the views, or not marked at all (number null), in order. */
  readonly listed: readonly { readonly name: string; readonly number: number | null }[];
  /** On a crowded sheet, those that no view shows: they are named in a list only. */
  readonly hidden: readonly string[];
}

/** More faces than this are crowded. */
const CROWD = 60;
/** Anchors of what can be seen have at least this merit. */
const SEEN = 1;

interface Row {
  readonly item: Labelled;
  readonly anchor: SheetAnchor;
  y: number;
}

export function faceLabels(items: readonly Labelled[], { columns }: SheetLayout): FaceLabels {
  const filled = columns.map((): Row[] => []);
  const rank = (item: Labelled) => (item.isExit ? 0 : item.plain ? 2 : 1);
  const left: Labelled[] = [];
  const isHidden = ({ isExit, anchors }: Labelled) =>
    items.length > CROWD && !isExit && anchors.every(({ merit }) => merit < SEEN);
  const shown = items.filter((item) => !isHidden(item));
  for (const item of shown.toSorted((a, b) => rank(a) - rank(b))) {
    const choices = columns
      .flatMap((column, c) =>
        filled[c].length < column.rows - 1
          ? item.anchors
              .filter(({ place }) => place.view === column.view)
              .map((anchor) => ({ c, anchor, worth: worthOf(anchor, column, filled[c].length) }))
          : [],
      )
      .sort((a, b) => b.worth - a.worth);
    if (choices.length === 0) left.push(item);
    else filled[choices[0].c].push({ item, anchor: choices[0].anchor, y: 0 });
  }
  for (const [c, column] of columns.entries()) spread(filled[c], column);
  const { drawn, listed } = numbers(
    items.filter((item) => left.includes(item)),
    filled.flat(),
  );
  const labels = columns.map((column, c) => filled[c].map((row) => label(row, column)));
  return {
    drawn: markup`<g class="labels">${labels}${drawn}</g>`,
    listed,
    hidden: items.filter(isHidden).map(({ name }) => name),
  };
}

/** Seen well, near the column, and in a column that is not crowded. */
function worthOf({ place, point, merit }: SheetAnchor, { side, rows }: LabelColumn, taken: number): number {
  const share = (point[0] - place.left) / Math.max(1, place.right - place.left);
  return merit - 0.5 * (side === 'left' ? share : 1 - share) - (0.7 * taken) / rows;
}

/** Rows in the order of what they point at, apart enough, then exchanged where their lines cross. */
function spread(rows: Row[], column: LabelColumn): void {
  const wanted = ({ anchor }: Row) => anchor.point[1] - PITCH * anchor.lean;
  rows.sort((a, b) => wanted(a) - wanted(b));
  const highest = column.top + PITCH;
  const lowest = column.top + column.rows * PITCH - 4;
  rows.forEach((row, i) => {
    row.y = Math.max(highest, wanted(row) + 4, i === 0 ? 0 : rows[i - 1].y + PITCH);
  });
  for (let i = rows.length - 1; i >= 0; i--) {
    rows[i].y = Math.min(rows[i].y, (i === rows.length - 1 ? lowest + PITCH : rows[i + 1].y) - PITCH);
  }
  for (let turn = 0; turn < rows.length; turn++) {
    for (let i = 0; i + 1 < rows.length; i++) {
      const [a, b] = [rows[i], rows[i + 1]];
      if (!cross(a, b, column.x)) continue;
      [a.y, b.y] = [b.y, a.y];
      [rows[i], rows[i + 1]] = [b, a];
    }
  }
}

function cross(a: Row, b: Row, x: number): boolean {
  const side = (p: FlatPoint, q: FlatPoint, r: FlatPoint) =>
    (q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]);
  const [p, q, r, s]: FlatPoint[] = [[x, a.y], a.anchor.point, [x, b.y], b.anchor.point];
  return side(p, q, r) * side(p, q, s) < 0 && side(r, s, p) * side(r, s, q) < 0;
}

function label({ item, anchor, y }: Row, { x, side }: LabelColumn): Markup {
  const outward = side === 'left' ? -1 : 1;
  const [ax, ay] = anchor.point;
  const text = item.isExit ? `${fitText(item.name, COLUMN - 60)} (exit)` : fitText(item.name, COLUMN - 14);
  const line = `M${round(x)} ${round(y - 4)}L${round(x - 8 * outward)} ${round(y - 4)}L${round(ax)} ${round(ay)}`;
  const end = anchor.within
    ? markup`<circle class="arrow" cx="${round(ax)}" cy="${round(ay)}" r="2"/>`
    : markup`<path class="arrow" d="${head([x - 8 * outward, y - 4], anchor.point)}"/>`;
  return markup`<g class="${item.isExit ? 'label exit-label' : 'label'}"><title>${fitText(item.name, 2000)}</title><path class="leader" d="${line}"/>${end}<text x="${round(x + 3 * outward)}" y="${round(y)}" text-anchor="${side === 'left' ? 'end' : 'start'}">${text}</text></g>`;
}

/** An arrowhead at `tip` that comes from `from`. */
export function head(from: FlatPoint, tip: FlatPoint, length = 7, half = 1.7): string {
  const gap = Math.hypot(tip[0] - from[0], tip[1] - from[1]) || 1;
  const [ux, uy] = [(tip[0] - from[0]) / gap, (tip[1] - from[1]) / gap];
  const [bx, by] = [tip[0] - length * ux, tip[1] - length * uy];
  return `M${round(tip[0])} ${round(tip[1])}L${round(bx - half * uy)} ${round(by + half * ux)}L${round(bx + half * uy)} ${round(by - half * ux)}Z`;
}

const BALLOON = 8;

/** Numbers at the faces, none over another or over the end of a leader line. */
function numbers(items: readonly Labelled[], rows: readonly Row[]): { drawn: Markup[]; listed: FaceLabels['listed'] } {
  const taken: FlatPoint[] = rows.map(({ anchor }) => anchor.point);
  const drawn: Markup[] = [];
  let next = 1;
  const listed = items.map(({ name, anchors }) => {
    const [anchor] = anchors.toSorted((a, b) => b.merit - a.merit);
    const spot = anchor === undefined ? null : freeSpot(anchor.point, taken);
    if (anchor === undefined || spot === null) return { name, number: null };
    taken.push(spot);
    const [x, y] = spot;
    const far = Math.hypot(x - anchor.point[0], y - anchor.point[1]) > BALLOON;
    const line = far
      ? markup`<path class="leader" d="M${round(x)} ${round(y)}L${round(anchor.point[0])} ${round(anchor.point[1])}"/>`
      : null;
    drawn.push(
      markup`<g class="label"><title>${fitText(name, 2000)}</title>${line}<circle class="balloon" cx="${round(x)}" cy="${round(y)}" r="${BALLOON}"/><text class="small" x="${round(x)}" y="${round(y + 3.2)}" text-anchor="middle">${next}</text></g>`,
    );
    return { name, number: next++ };
  });
  return { drawn, listed };
}

function freeSpot(wanted: FlatPoint, taken: readonly FlatPoint[]): FlatPoint | null {
  for (let k = 0; k < 140; k++) {
    // Sunflower spiral: even in area.
    const [radius, angle] = [4.6 * Math.sqrt(k), 2.39996 * k];
    const spot: FlatPoint = [wanted[0] + radius * Math.cos(angle), wanted[1] + radius * Math.sin(angle)];
    if (taken.every(([x, y]) => Math.hypot(spot[0] - x, spot[1] - y) > 2 * BALLOON + 1)) return spot;
  }
  return null;
}
