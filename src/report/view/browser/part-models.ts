import {
  BufferAttribute,
  BufferGeometry,
  Color,
  DoubleSide,
  Group,
  Mesh,
  MeshLambertMaterial,
  type Plane,
} from 'three';
import type { LineMaterial } from 'three/addons/lines/LineMaterial.js';
import type { LineSegments2 } from 'three/addons/lines/LineSegments2.js';
import { finishTint } from '../finish-tints.js';
import type { OpenDrawing, OpenFace } from '../unpack-drawing.js';
import { fatLines } from './fat-lines.js';
import type { PageColours } from './page-colours.js';

const EDGE = 1.1;
const EXIT_EDGE = 2.6;
const LIT_EDGE = 3;
const LIT_OPACITY = 0.38;
const EXIT_OPACITY = 0.3;

interface FaceModel {
  readonly face: OpenFace;
  readonly part: number;
  readonly mesh: Mesh<BufferGeometry, MeshLambertMaterial>;
  readonly edges: LineSegments2 & { material: LineMaterial };
}

/** The parts as translucent faces with edges. */
export class PartModels {
  readonly group = new Group();
  readonly #models: readonly FaceModel[];

  constructor(drawing: OpenDrawing, planes: Plane[]) {
    this.#models = drawing.parts.flatMap((part, i) => part.faces.map((face) => modelOf(face, i, planes)));
    for (const { mesh, edges } of this.#models) this.group.add(mesh, edges);
  }

  /** What the pointer may hit. */
  meshes(): readonly Mesh[] {
    return this.#models.filter(({ mesh }) => mesh.visible).map(({ mesh }) => mesh);
  }

  faceOf(mesh: unknown): OpenFace | null {
    return this.#models.find((model) => model.mesh === mesh)?.face ?? null;
  }

  visibleFaces(): readonly OpenFace[] {
    return this.#models.filter(({ mesh }) => mesh.visible).map(({ face }) => face);
  }

  showParts(hidden: ReadonlySet<number>): void {
    for (const { part, mesh, edges } of this.#models) {
      mesh.visible = !hidden.has(part);
      edges.visible = mesh.visible;
    }
  }

  paint({ ink, output, focus }: PageColours, isLit: (face: OpenFace) => boolean): void {
    for (const { face, mesh, edges } of this.#models) {
      const lit = isLit(face);
      const tint = finishTint(face.finishKind);
      const exit = face.isExit;
      mesh.material.color.copy(lit ? focus : exit ? output : new Color(tint.colour));
      mesh.material.opacity = lit ? LIT_OPACITY : exit ? EXIT_OPACITY : tint.opacity;
      edges.material.color.copy(lit ? focus : exit ? output : ink);
      edges.material.linewidth = lit ? LIT_EDGE : exit ? EXIT_EDGE : EDGE;
      edges.renderOrder = lit || exit ? 3 : 2;
    }
  }
}

function modelOf(face: OpenFace, part: number, planes: Plane[]): FaceModel {
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new BufferAttribute(face.positions, 3));
  geometry.setAttribute('normal', new BufferAttribute(face.normals, 3));
  geometry.setIndex(new BufferAttribute(face.corners, 1));
  const material = new MeshLambertMaterial({
    transparent: true,
    side: DoubleSide,
    depthWrite: false,
    clippingPlanes: planes,
    // Edges of the same face lie in its plane and must stay whole.
    polygonOffset: true,
    polygonOffsetFactor: 1,
    polygonOffsetUnits: 1,
  });
  const mesh = new Mesh(geometry, material);
  mesh.renderOrder = 1;
  return { face, part, mesh, edges: fatLines(face.outline, { width: EDGE, colour: new Color(), planes }) };
}
