import {
  BufferGeometry,
  CanvasTexture,
  Color,
  Float32BufferAttribute,
  Group,
  type Plane,
  Points,
  PointsMaterial,
  SRGBColorSpace,
} from 'three';
import { ON_DARK, ON_LIGHT, shade } from '../light-shade.js';
import type { OpenDrawing, OpenPath } from '../unpack-drawing.js';
import { empty } from './dispose.js';
import { fatLines } from './fat-lines.js';
import type { PageColours } from './page-colours.js';

const PUMP_WIDTH = 0.8;
const EMITTED_WIDTH = 1.5;
const PUMP_OPACITY = 0.6;
const END_SIZE = 7;

/** The ways of some histories: pump light thin, emitted light in its colour, a dot where each ended. */
export class PathModels {
  readonly group = new Group();
  readonly #drawing: OpenDrawing;
  readonly #planes: Plane[];
  #disc: CanvasTexture | undefined;

  constructor(drawing: OpenDrawing, planes: Plane[]) {
    this.#drawing = drawing;
    this.#planes = planes;
  }

  show(paths: readonly OpenPath[], colours: PageColours, pixelRatio: number): void {
    empty(this.group);
    if (paths.length === 0) return;
    const lights = this.#lightColours(colours.dark);
    const pump: Line = { positions: [], colours: [] };
    const emitted: Line = { positions: [], colours: [] };
    const ends: Line = { positions: [], colours: [] };
    for (const path of paths) {
      const { way } = path;
      for (let i = 0; i + 1 < path.points; i++) {
        // The middle of a long path is not kept: a straight line across the gap would be a lie.
        if (i === path.cutAfter) continue;
        const line = i < path.pumpSegments ? pump : emitted;
        // The colour of a laser line lies outside what screens can show; pump light has its colour on this page.
        const light = line === pump ? colours.pump : lights[path.lights[i]];
        line.positions.push(...way.subarray(3 * i, 3 * i + 6));
        line.colours.push(light.r, light.g, light.b, light.r, light.g, light.b);
      }
      const { r, g, b } = colours.groups[this.#drawing.fates[path.fate].group] ?? colours.ink;
      ends.positions.push(...way.subarray(way.length - 3));
      ends.colours.push(r, g, b);
    }
    const planes = this.#planes;
    const lines = [
      [pump, PUMP_WIDTH, PUMP_OPACITY],
      [emitted, EMITTED_WIDTH, 1],
    ] as const;
    for (const [line, width, opacity] of lines) {
      if (line.positions.length === 0) continue;
      const colour = Float32Array.from(line.colours);
      this.group.add(fatLines(Float32Array.from(line.positions), { width, colour, opacity, planes }));
    }
    this.group.add(this.#dots(ends, pixelRatio));
  }

  #dots({ positions, colours }: Line, pixelRatio: number): Points {
    this.#disc ??= disc();
    const geometry = new BufferGeometry();
    geometry.setAttribute('position', new Float32BufferAttribute(positions, 3));
    geometry.setAttribute('color', new Float32BufferAttribute(colours, 3));
    const material = new PointsMaterial({
      size: END_SIZE * pixelRatio,
      sizeAttenuation: false,
      vertexColors: true,
      map: this.#disc,
      alphaTest: 0.5,
      clippingPlanes: this.#planes,
    });
    const points = new Points(geometry, material);
    points.frustumCulled = false;
    return points;
  }

  #lightColours(dark: boolean): readonly Color[] {
    const { colours } = this.#drawing;
    return Array.from({ length: colours.length / 3 }, (_, i) => {
      const [r, g, b] = shade([colours[3 * i], colours[3 * i + 1], colours[3 * i + 2]], dark ? ON_DARK : ON_LIGHT);
      return new Color().setRGB(r / 255, g / 255, b / 255, SRGBColorSpace);
    });
  }
}

interface Line {
  readonly positions: number[];
  readonly colours: number[];
}

function disc(): CanvasTexture {
  const canvas = document.createElement('canvas');
  canvas.width = 32;
  canvas.height = 32;
  const context = canvas.getContext('2d');
  if (context !== null) {
    context.fillStyle = '#fff';
    context.arc(16, 16, 15, 0, 2 * Math.PI);
    context.fill();
  }
  return new CanvasTexture(canvas);
}
