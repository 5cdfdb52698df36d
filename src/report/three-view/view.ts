/** The three views of a sheet: what of a point in space each of them shows. */
import type { Coordinates } from '../../record/drawing.js';

export type ViewName = 'front' | 'top' | 'right';

export interface View {
  readonly name: ViewName;
  readonly title: string;
  /** Axes of space that run to the right and up on the sheet. */
  readonly across: 0 | 1 | 2;
  readonly up: 0 | 1 | 2;
  /** Axis along the line of sight, and which way along it the viewer stands. */
  readonly sight: 0 | 1 | 2;
  readonly toViewer: 1 | -1;
}

export const FRONT: View = { name: 'front', title: 'Front', across: 0, up: 2, sight: 1, toViewer: -1 };
export const TOP: View = { name: 'top', title: 'Top', across: 0, up: 1, sight: 2, toViewer: 1 };
export const RIGHT: View = { name: 'right', title: 'Right', across: 1, up: 2, sight: 0, toViewer: 1 };
export const VIEWS: readonly View[] = [TOP, FRONT, RIGHT];

/** A point of the sheet: in a view mm to the right and up, on paper units to the right and down. */
export type FlatPoint = readonly [number, number];
export type FlatLine = readonly [FlatPoint, FlatPoint];

/** To the right, up, toward the viewer; mm. */
export type Seen = readonly [across: number, up: number, near: number];

/** The point or direction whose three numbers begin at `at`. */
export function seen(view: View, coordinates: Coordinates, at = 0): Seen {
  return [coordinates[at + view.across], coordinates[at + view.up], view.toViewer * coordinates[at + view.sight]];
}
