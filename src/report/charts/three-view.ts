/** A dimensioned drawing of a design in three views, on one sheet. */
import type { Drawing } from '../../record/drawing.js';
import { type Markup, markup, trusted } from '../markup.js';
import { shortName } from '../name-text.js';
import { dimensionLine } from '../three-view/dimension-lines.js';
import { exitMark, planeLines } from '../three-view/exit-mark.js';
import { faceAnchors } from '../three-view/face-anchors.js';
import { faceLabels, type Labelled, type SheetAnchor } from '../three-view/face-labels.js';
import { linePath } from '../three-view/line-paths.js';
import type { OccluderGrid } from '../three-view/occluder-grid.js';
import { occludersOf } from '../three-view/occluders.js';
import { pumpMarks } from '../three-view/pump-marks.js';
import { layOutSheet, MARGIN, SHEET_WIDTH, type SheetLayout, type ViewPlace } from '../three-view/sheet-layout.js';
import { sheetNotes } from '../three-view/sheet-notes.js';
import { SHEET_STYLE } from '../three-view/sheet-style.js';
import { silhouette } from '../three-view/silhouette.js';
import { type SheetAbout, titleBlock } from '../three-view/title-block.js';
import { seen } from '../three-view/view.js';
import { type ViewLines, viewLines } from '../three-view/view-lines.js';
import { round } from './picture.js';

/** The sheet as one SVG, the same text for the same drawing. @param id unique on the page */
export function threeView(drawing: Drawing, about: SheetAbout, id: string): Markup {
  const layout = layOutSheet(drawing);
  const { low, high } = layout.bounds.shown;
  const size = Math.max(...high.map((c, i) => c - low[i]));
  const views = layout.views.map((place) => {
    const occluders = occludersOf(drawing, place.view, size);
    return { place, occluders, lines: viewLines(drawing, place.view, occluders, size) };
  });
  const labels = faceLabels(labelled(drawing, views, 2e-4 * size), layout);
  const notes = sheetNotes(drawing, labels, layout.bounds.far, layout.undrawn, layout.bottom + 8);
  const block = titleBlock(about, layout.scale, notes.bottom);
  const height = Math.ceil(block.bottom + MARGIN);
  const words = `Front, top and right views of ${drawing.parts.length} ${drawing.parts.length === 1 ? 'part' : 'parts'} in third-angle projection, with sizes in mm, the names of the faces, and ${drawing.pumps.length} ${drawing.pumps.length === 1 ? 'pump' : 'pumps'}; the lists below the views say the same in words.`;
  return markup`<svg xmlns="http://www.w3.org/2000/svg" role="img" class="three-view" width="${SHEET_WIDTH}" height="${height}" viewBox="0 0 ${SHEET_WIDTH} ${height}" aria-labelledby="${id}-title ${id}-description"><title id="${id}-title">Three views of ${shortName(about.title, 120)}</title><desc id="${id}-description">${words}</desc><style>${trusted(SHEET_STYLE)}</style><rect class="sheet" width="${SHEET_WIDTH}" height="${height}"/>${views.map(
    ({ place, lines }) => drawView(drawing, place, lines, layout),
  )}${dimensions(layout)}${labels.drawn}${views.map(({ place }) => pumpMarks(drawing.pumps, layout.bounds.far, place))}${notes.drawn}${block.drawn}</svg>`;
}

function drawView(drawing: Drawing, place: ViewPlace, lines: ViewLines, { views }: SheetLayout): Markup {
  // The titles of views side by side stand level.
  const title = Math.min(...views.filter(({ bottom }) => bottom === place.bottom).map(({ top }) => top)) - 47;
  // One path for all: where dyed parts stand one behind another the tint is no darker.
  const tint = drawing.parts.flatMap((part) => (part.dyed ? silhouette(part, place) : [])).join('');
  return markup`<g class="view"><text class="view-title" x="${round(place.left)}" y="${round(title)}">${place.view.title}</text><path class="tint" d="${tint}"/><path class="hidden" d="${linePath(lines.hidden, place.place)}"/>${planeLines(drawing, place)}<path class="visible" d="${linePath(lines.visible, place.place)}"/>${exitMark(drawing, lines, place)}</g>`;
}

function dimensions({ views, widths, depths, heights, below, beside }: SheetLayout): Markup {
  const [, front, right] = views;
  const x =
    ({ place }: ViewPlace) =>
    (mm: number) =>
      place([mm, 0])[0];
  const y =
    ({ place }: ViewPlace) =>
    (mm: number) =>
      place([0, mm])[1];
  const under = (view: ViewPlace) => ({ along: x(view), across: y(view), firstRow: below, upright: false });
  return markup`<g class="dimensions">${widths.map((one) => dimensionLine(one, under(front)))}${depths.map((one) =>
    dimensionLine(one, under(right)),
  )}${heights.map((one) => dimensionLine(one, { along: y(front), across: x(front), firstRow: beside, upright: true }))}</g>`;
}

/** Faces and planes in the order of the file, with the places where leader lines may meet them. */
function labelled(
  { parts, planes }: Drawing,
  views: readonly { readonly place: ViewPlace; readonly occluders: OccluderGrid }[],
  slack: number,
): Labelled[] {
  const faces = parts.flatMap((part) => part.faces).filter(({ triangles }) => triangles.length > 0);
  const ofFaces = faces.map((face, i): Labelled => {
    const anchors = views.flatMap(({ place, occluders }): SheetAnchor[] => {
      const anchors = faceAnchors(face, place.view, occluders, slack, i);
      return anchors.map((anchor) => ({ ...anchor, place, point: place.place(anchor.point) }));
    });
    return { name: face.name, isExit: face.isExit, plain: face.finish === 'clear', anchors };
  });
  const ofPlanes = planes.map(({ name, isExit, edges, normal }): Labelled => {
    const anchors = views.map(({ place }): SheetAnchor => {
      const [a, u] = seen(place.view, edges);
      const facing = Math.abs(seen(place.view, normal)[2]);
      return { place, point: place.place([a, u]), within: false, merit: facing > 0.9 ? 0.6 : 1.6, lean: 1 };
    });
    return { name, isExit, plain: false, anchors: edges.length === 0 ? [] : anchors };
  });
  return [...ofFaces, ...ofPlanes];
}
