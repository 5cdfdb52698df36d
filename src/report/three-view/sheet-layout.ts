/** Where everything stands on the sheet: third-angle projection, the top view above the front, the right view to its right. */
import type { Drawing } from '../../record/drawing.js';
import { ROW } from './dimension-lines.js';
import { arrangeMeasures, type Measure, measuresOf, type RowedMeasure } from './dimensions.js';
import { type SheetBounds, sheetBounds } from './sheet-bounds.js';
import { type FlatPoint, FRONT, RIGHT, TOP, type View } from './view.js';

export const SHEET_WIDTH = 1240;
export const MARGIN = 26;
export const COLUMN = 178;
/** Sheet units from label to label. */
export const PITCH = 16;
/** Round each view, for the arrows of pumps and the exit. */
const ROOM = 54;
const TITLE = 20;
const HIGHEST = 720;

export interface ViewPlace {
  readonly view: View;
  /** From view to sheet. */
  readonly place: (point: FlatPoint) => FlatPoint;
  /** The box of what is drawn to scale, on the sheet. */
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** A column of labels beside the views. */
export interface LabelColumn {
  readonly view: View;
  /** Where leader lines start. */
  readonly x: number;
  readonly side: 'left' | 'right';
  readonly top: number;
  readonly rows: number;
}

export interface SheetLayout {
  readonly bounds: SheetBounds;
  readonly scale: number;
  readonly views: readonly ViewPlace[];
  readonly columns: readonly LabelColumn[];
  readonly widths: readonly RowedMeasure[];
  readonly depths: readonly RowedMeasure[];
  readonly heights: readonly RowedMeasure[];
  /** Sizes that found no room. */
  readonly undrawn: number;
  /** Sheet place of the first row below the front and right views, and right of the front view. */
  readonly below: number;
  readonly beside: number;
  readonly bottom: number;
}

export function layOutSheet(drawing: Drawing): SheetLayout {
  const bounds = sheetBounds(drawing);
  const { low, high } = bounds.shown;
  const [width, depth, height] = high.map((c, i) => Math.max(c - low[i], 1e-6));
  const widths = measuresOf(drawing, bounds.parts, 0, 2, -1);
  const depths = measuresOf(drawing, bounds.parts, 1, 2, -1);
  const heights = measuresOf(drawing, bounds.parts, 2, 0, 1);
  const inner = SHEET_WIDTH - 2 * MARGIN - 2 * COLUMN - 4 * ROOM;
  const scaleFor = (rows: number) => Math.min((inner - (rows + 1) * ROW) / (width + depth), HIGHEST / (depth + height));
  // How many rows there are hangs on the scale, and the scale on them.
  let scale = scaleFor(3);
  for (let turn = 0; turn < 3; turn++) scale = scaleFor(rowsOf(heights, scale));
  const tiers = {
    widths: arrangeMeasures(widths, scale),
    depths: arrangeMeasures(depths, scale),
    heights: arrangeMeasures(heights, scale),
  };
  const besideRows = count(tiers.heights.rows);
  const belowRows = Math.max(count(tiers.widths.rows), count(tiers.depths.rows));

  const between = 2 * ROOM + (besideRows + 1) * ROW;
  const used = width * scale + depth * scale + between + 2 * ROOM;
  const frontLeft = MARGIN + COLUMN + ROOM + Math.max(0, (SHEET_WIDTH - 2 * MARGIN - 2 * COLUMN - used) / 2);
  const rightLeft = frontLeft + width * scale + between;
  const faces = drawing.parts.reduce((sum, part) => sum + part.faces.length, 0);
  const wanted = Math.min(360, Math.ceil(faces / 4) * PITCH + PITCH);
  const topHigh = Math.max(depth * scale + 2 * ROOM, wanted);
  const belowHigh = (belowRows + 1) * ROW;
  const frontHigh = Math.max(height * scale + 2 * ROOM + belowHigh, wanted);
  const topTop = MARGIN + TITLE;
  const frontTop = topTop + topHigh + TITLE;
  const topBox = { left: frontLeft, top: topTop + (topHigh - depth * scale) / 2 };
  const frontY = frontTop + (frontHigh - belowHigh - height * scale) / 2;
  const at = (view: View, left: number, top: number): ViewPlace => {
    const bottom = top + (high[view.up] - low[view.up]) * scale;
    return {
      view,
      place: ([a, u]) => [left + (a - low[view.across]) * scale, bottom - (u - low[view.up]) * scale],
      left,
      right: left + (high[view.across] - low[view.across]) * scale,
      top,
      bottom,
    };
  };
  const front = at(FRONT, frontLeft, frontY);
  const right = at(RIGHT, rightLeft, frontY);
  const top = at(TOP, topBox.left, topBox.top);
  const rows = (high: number) => Math.floor(high / PITCH);
  const columnX = (box: ViewPlace, side: 'left' | 'right') =>
    side === 'left'
      ? Math.max(MARGIN + COLUMN, box.left - ROOM)
      : Math.min(SHEET_WIDTH - MARGIN - COLUMN, box.right + ROOM);
  return {
    bounds,
    scale,
    views: [top, front, right],
    columns: [
      { view: TOP, x: columnX(top, 'left'), side: 'left', top: topTop, rows: rows(topHigh) },
      { view: TOP, x: columnX(top, 'right'), side: 'right', top: topTop, rows: rows(topHigh) },
      { view: FRONT, x: columnX(front, 'left'), side: 'left', top: frontTop, rows: rows(frontHigh) },
      { view: RIGHT, x: columnX(right, 'right'), side: 'right', top: frontTop, rows: rows(frontHigh) },
    ],
    widths: tiers.widths.rows,
    depths: tiers.depths.rows,
    heights: tiers.heights.rows,
    undrawn: tiers.widths.left + tiers.depths.left + tiers.heights.left,
    below: front.bottom + ROOM,
    beside: front.right + ROOM,
    bottom: frontTop + frontHigh,
  };
}

const count = (rows: readonly RowedMeasure[]): number => Math.max(0, ...rows.map(({ row }) => row + 1));

const rowsOf = (measures: readonly Measure[], scale: number): number => count(arrangeMeasures(measures, scale).rows);
