import type { Color, Plane } from 'three';
import { LineMaterial } from 'three/addons/lines/LineMaterial.js';
import { LineSegments2 } from 'three/addons/lines/LineSegments2.js';
import { LineSegmentsGeometry } from 'three/addons/lines/LineSegmentsGeometry.js';

export interface LineLook {
  /** CSS pixels. */
  readonly width: number;
  /** One colour, or red, green, blue (linear) of both ends of every segment. */
  readonly colour: Color | Float32Array;
  readonly opacity?: number;
  readonly planes?: Plane[];
}

/** Segments as lines some pixels wide, which plain WebGL lines are not. @param positions 6 numbers a segment */
export function fatLines(
  positions: Float32Array,
  { width, colour, opacity = 1, planes = [] }: LineLook,
): LineSegments2 {
  const geometry = new LineSegmentsGeometry();
  geometry.setPositions(positions);
  const varied = colour instanceof Float32Array;
  if (varied) geometry.setColors(colour);
  const material = new LineMaterial({ linewidth: width, vertexColors: varied, transparent: opacity < 1, opacity });
  if (!varied) material.color.copy(colour);
  material.clipping = true;
  material.clippingPlanes = planes;
  const lines = new LineSegments2(geometry, material);
  lines.frustumCulled = false;
  return lines;
}
