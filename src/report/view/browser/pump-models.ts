import { type Color, ConeGeometry, Group, Mesh, MeshBasicMaterial, Vector3 } from 'three';
import type { OpenDrawing } from '../unpack-drawing.js';
import { empty } from './dispose.js';
import { fatLines } from './fat-lines.js';
import type { PageColours } from './page-colours.js';

const UP = new Vector3(0, 1, 0);
const HEAD = 0.28;

/** Pumps: what emits, and an arrow beside the parts that says where the light goes. Planes in the open: their rims. */
export class PumpModels {
  readonly group = new Group();
  readonly #drawing: OpenDrawing;

  constructor(drawing: OpenDrawing) {
    this.#drawing = drawing;
  }

  paint({ pump, output, soft }: PageColours): void {
    empty(this.group);
    for (const { outline, at, tip, tail } of this.#drawing.pumps) {
      if (outline.length > 0) this.group.add(fatLines(outline, { width: 1.4, colour: pump }));
      const start = new Vector3(...tail);
      const end = new Vector3(...tip);
      const way = end.clone().sub(start);
      const neck = start.clone().addScaledVector(way, 1 - HEAD);
      this.group.add(fatLines(Float32Array.of(...start.toArray(), ...neck.toArray()), { width: 4, colour: pump }));
      // The axis from the pump, which may stand far off, to its arrow.
      this.group.add(fatLines(Float32Array.of(...at, ...start.toArray()), { width: 0.8, colour: pump, opacity: 0.6 }));
      this.group.add(head(neck, end, pump));
    }
    for (const { outline, isExit } of this.#drawing.planes) {
      if (outline.length > 0)
        this.group.add(fatLines(outline, { width: isExit ? 2.6 : 1.2, colour: isExit ? output : soft }));
    }
  }
}

function head(from: Vector3, to: Vector3, colour: Color): Mesh {
  const way = to.clone().sub(from);
  const length = way.length();
  const cone = new Mesh(new ConeGeometry(length * 0.24, length, 20), new MeshBasicMaterial({ color: colour }));
  cone.position.copy(from).addScaledVector(way, 0.5);
  cone.quaternion.setFromUnitVectors(UP, way.normalize());
  return cone;
}
