/** What is wrong or odd about a design's geometry and finishes, and a report of every face. Nothing is traced. */
import type { Description, FinishDescription, LayerDescription, Vector3 } from '../design/description.js';
import { DesignFaults } from '../design/design-faults.js';
import type { Fault } from '../design/fault.js';
import { AMPLITUDES, amplitudesAt } from '../optics/thin-film-stack.js';
import { thinFilms } from '../optics/thin-films.js';
import { filmFaults } from './check-films.js';
import { coincidentFaults } from './check-meshes.js';
import { pumpFaults } from './check-pumps.js';
import { scattererFaults } from './check-scatterers.js';
import { strengthFaults, voxelFaults } from './check-strength.js';
import { surroundingFaults } from './check-surroundings.js';
import { type CompiledScene, compileScene } from './compile-scene.js';
import { designSize, type FaceMember, type SceneFace } from './compile-solids.js';
import type { FacePatch } from './convex-solid.js';
import { patchArea, patchCentre, patchNormal, patchPoint, pickByArea } from './face-patch.js';
import { INTERFACE, RegionGraph } from './region-graph.js';
import { add, scale } from './vector.js';

export interface SceneCheck {
  readonly faults: readonly Fault[];
  /** Empty when the parts could not be placed. */
  readonly faces: readonly FaceReport[];
}

export interface FaceReport {
  readonly part: string;
  readonly face: string;
  readonly shape: PatchShape;
  readonly centre: Vector3;
  readonly normal: Vector3;
  readonly areaMm2: number;
  readonly finish: string;
  /** 'part.face' of what touches it, 'part' where it dips into another part, 'surroundings'. */
  readonly touches: readonly string[];
  /** Share of the area where the face is the boundary of its part: 0 when it is buried or cut away. */
  readonly exposed: number;
}

type PatchShape = 'flat' | 'cylinder' | 'cone' | 'sphere' | 'conic' | 'profile' | 'facets';

const SAMPLES = 256;
/** Step off the face to look at either side, mm. */
const STEP = 1e-5;

export function checkScene(description: Description): SceneCheck {
  let compiled: CompiledScene;
  try {
    compiled = compileScene(description);
  } catch (error) {
    if (error instanceof DesignFaults) return { faults: error.faults, faces: [] };
    throw error;
  }
  const looks = new FaceLook(description, compiled);
  const views = compiled.legend.faces.map((face) => ({ face, ...looks.look(face) }));
  const faults = [
    ...views.flatMap(({ face, exposed, clashes }) => finishFaults(compiled, face, exposed, clashes)),
    ...exitFaults(description, compiled, views),
    ...partFaults(description, views),
    ...strengthFaults(description),
    ...voxelFaults(description, compiled.legend.voxels, compiled.legend.beams),
    ...scattererFaults(description, designSize(compiled.legend.parts)),
    ...surroundingFaults(description),
    ...filmFaults(description, compiled.legend),
    ...pumpFaults(description),
    ...coveredFaults(description, compiled, views),
    ...coincidentFaults(views),
  ];
  return { faults, faces: views.map(({ face, exposed, touches }) => report(compiled, face, exposed, touches)) };
}

interface Look {
  readonly exposed: number;
  readonly touches: readonly string[];
  /** Other faces on the same spot that carry another finish. */
  readonly clashes: readonly SceneFace[];
}

class FaceLook {
  readonly #graph: RegionGraph;
  readonly #faces: readonly SceneFace[];
  readonly #finish: Int32Array;
  readonly #names: readonly string[];

  constructor(description: Description, { scene, legend }: CompiledScene) {
    this.#graph = new RegionGraph(scene);
    this.#faces = legend.faces;
    this.#finish = scene.faceFinish;
    this.#names = ['surroundings', ...description.parts.map(({ name }) => name)];
  }

  look(face: SceneFace): Look {
    const touches = new Set<string>();
    const clashes = new Set<SceneFace>();
    let exposed = 0;
    for (let i = 0; i < SAMPLES; i++) {
      // R2 sequence (Roberts 2018): even cover of the unit square.
      const s = (0.5 + i * 0.7548776662466927) % 1;
      const t = (0.5 + i * 0.5698402909980532) % 1;
      const { member, rest } = pickByArea(
        face.members.map(({ patch }) => patch),
        s,
      );
      const { patch, surface } = face.members[member];
      const { point, normal } = patchPoint(patch, rest, t);
      const out = face.hollow ? scale(normal, -1) : normal;
      if (this.#ownerAt(point, out, -STEP) !== face.owner) continue;
      const beyond = this.#ownerAt(point, out, STEP);
      if (beyond === face.owner) continue;
      exposed++;
      const [left, entered] = this.#facesAt(surface, point, out);
      touches.add(entered?.reference ?? this.#names[beyond]);
      for (const partner of [left, entered]) {
        if (partner === undefined || partner === face) continue;
        const [own, other] = [this.#finish[face.index], this.#finish[partner.index]];
        if (own >= 0 && other >= 0 && own !== other) clashes.add(partner);
      }
    }
    return { exposed: exposed / SAMPLES, touches: [...touches].sort(), clashes: [...clashes] };
  }

  #ownerAt(point: Vector3, direction: Vector3, step: number): number {
    return this.#graph.owner[this.#regionAt(point, direction, step)];
  }

  #regionAt(point: Vector3, direction: Vector3, step: number): number {
    const [x, y, z] = add(point, scale(direction, step));
    if (this.#graph.crowded) this.#graph.forget();
    return this.#graph.locate(x, y, z, 0.6, 0.64, 0.48);
  }

  /** Faces by which light leaves and enters at a spot of a face: what is traced there is asked, not worked out again. */
  #facesAt(surface: FaceMember['surface'], point: Vector3, out: Vector3): readonly (SceneFace | undefined)[] {
    const graph = this.#graph;
    const region = this.#regionAt(point, out, -STEP);
    let way = 2 * graph.families;
    if (surface.kind === 'curve') way += surface.index;
    else if (surface.kind === 'mesh') way += graph.quadrics + graph.scene.meshGroup[surface.index] + surface.group;
    else {
      const [x, y, z] = graph.scene.familyNormal.subarray(3 * surface.family, 3 * surface.family + 3);
      way = 2 * surface.family + (x * out[0] + y * out[1] + z * out[2] > 0 ? 1 : 0);
    }
    const record = graph.resolve(region, way);
    if (record < 0) return [];
    return [INTERFACE.faceOut, INTERFACE.faceIn].map((place) => this.#faces[graph.interfaces[record + place]]);
  }
}

function report(
  { scene, legend }: CompiledScene,
  face: SceneFace,
  exposed: number,
  touches: readonly string[],
): FaceReport {
  const part = face.part.description.name;
  const normal = patchNormal(face.patch);
  const finish = scene.faceFinish[face.index];
  const { patch } = face;
  return {
    part,
    face: face.reference.slice(part.length + 1),
    shape: shapeOf(patch),
    centre: patchCentre(patch),
    normal: face.hollow ? scale(normal, -1) : normal,
    areaMm2: patchArea(patch),
    finish: finish < 0 ? 'clear' : legend.finishNames[finish],
    touches,
    exposed,
  };
}

function shapeOf(patch: FacePatch): PatchShape {
  switch (patch.kind) {
    case 'polygon':
    case 'disc':
      return 'flat';
    case 'zone':
      return 'sphere';
    case 'side':
      return patch.bottomRadius === patch.topRadius ? 'cylinder' : 'cone';
    case 'profile':
      return 'profile';
    case 'dish':
      return patch.conic !== 0 ? 'conic' : patch.ruled === null ? 'sphere' : 'cylinder';
    case 'facets':
      return patch.flat ? 'flat' : 'facets';
    case 'group':
      return shapeOf(patch.members[0]);
  }
}

function finishFaults(
  { legend, scene }: CompiledScene,
  face: SceneFace,
  exposed: number,
  clashes: readonly SceneFace[],
): Fault[] {
  const { name, faces } = face.part.description;
  const named = faces.find((entry) => `${name}.${entry.face}` === face.reference);
  const given = named ?? faces.find((entry) => entry.face === '*');
  if (given === undefined) return [];
  const faults: Fault[] = [];
  // A finish for all faces need not reach every one of them.
  if (named !== undefined && exposed === 0 && patchArea(face.patch) > 0) {
    faults.push({
      code: 'finish',
      severity: 'error',
      path: given.path,
      problem: 'this face is buried in another part or cut away, so its finish never meets light',
      found: `${given.finish} on ${face.reference}`,
      suggestion: 'give the finish to the face that bounds the part there, or move the part',
    });
  }
  // Told once, at the later of the two faces.
  for (const other of clashes.filter(({ index }) => index < face.index)) {
    faults.push({
      code: 'finish',
      severity: 'error',
      path: given.path,
      problem: `two finishes on one spot: ${face.reference} lies on ${other.reference}`,
      found: `${given.finish} and ${legend.finishNames[scene.faceFinish[other.index]]}`,
      expected: 'one finish where two faces touch',
    });
  }
  return faults;
}

function exitFaults(
  description: Description,
  { scene, legend }: CompiledScene,
  views: readonly { readonly face: SceneFace; readonly exposed: number; readonly touches: readonly string[] }[],
): Fault[] {
  const { name, path } = description.exit;
  const view = views.find(({ face }) => face.reference === name);
  if (view === undefined) return [];
  const refuse = (problem: string, suggestion: string): Fault[] => [
    { code: 'unreachable', severity: 'error', path, problem, found: name, suggestion },
  ];
  if (view.exposed === 0) {
    return refuse(
      'the exit is buried in another part, so no light can leave there',
      'name the face that light crosses last',
    );
  }
  const finish = description.finishes.get(legend.finishNames[Math.max(0, scene.faceFinish[view.face.index])]);
  const inside = view.touches.filter((name) => name !== 'surroundings');
  if (inside.length > 0) {
    return [
      {
        code: 'caution',
        severity: 'warning',
        path,
        problem: 'the exit touches another part, so light counts as output before it has left the device',
        found: `${name}, which touches ${inside.join(', ')}`,
        suggestion: 'name the face that light crosses last',
      },
    ];
  }
  return finish !== undefined && opaque(finish)
    ? refuse('the finish of the exit lets nothing through', `take ${finish.name} off this face, or name another exit`)
    : [];
}

/** `others` is quickly said of a wall and then shuts it off from the liquid it holds. */
function coveredFaults(
  description: Description,
  { scene, legend }: CompiledScene,
  views: readonly { readonly face: SceneFace; readonly touches: readonly string[] }[],
): Fault[] {
  return views.flatMap(({ face, touches }): Fault[] => {
    const part = face.part.description;
    const rest = part.faces.find((entry) => entry.face === '*');
    if (rest === undefined || part.faces.some((entry) => `${part.name}.${entry.face}` === face.reference)) return [];
    const finish = description.finishes.get(legend.finishNames[Math.max(0, scene.faceFinish[face.index])]);
    const neighbours = touches.filter((name) => name !== 'surroundings');
    if (finish === undefined || !opaque(finish) || neighbours.length === 0) return [];
    return [
      {
        code: 'caution',
        severity: 'warning',
        path: rest.path,
        problem: `${finish.name} on all other faces also shuts this part off from what it touches`,
        found: `${face.reference}, which touches ${neighbours.join(', ')}`,
        suggestion: `give that face a finish of its own, such as clear`,
      },
    ];
  });
}

function opaque(finish: FinishDescription): boolean {
  switch (finish.kind) {
    case 'black':
    case 'mirror':
    case 'metal':
      return true;
    case 'diffuser':
      return finish.transmits === 0;
    case 'scatter':
      return finish.split?.transmits === 0;
    case 'bsdf':
      return finish.transmitted.every((polar) => polar.every((row) => row.every((value) => value === 0)));
    case 'stack':
      return opaqueStack(finish.layers);
    case 'table':
      return finish.transmittance.every((row) => row.every((value) => value === 0));
    default:
      return false;
  }
}

/** A metal too thick to see through; what touches the stack hardly matters. */
function opaqueStack(layers: readonly LayerDescription[]): boolean {
  const out = new Float64Array(AMPLITUDES.COUNT);
  for (let nm = 400; nm <= 700; nm += 20) {
    const at = layers.map(({ n, k, thicknessNm }) => ({ n: n(nm), k: k(nm), thicknessNm }));
    amplitudesAt(thinFilms(at, nm), 1.4, 1.4, 1, out);
    if (out[AMPLITUDES.transmittanceS] > 1e-9) return false;
  }
  return true;
}

function partFaults(
  description: Description,
  views: readonly { readonly face: SceneFace; readonly exposed: number }[],
): Fault[] {
  const faults: Fault[] = [];
  for (const part of description.parts) {
    if (views.some(({ face, exposed }) => face.part.description === part && exposed > 0)) continue;
    faults.push({
      code: 'geometry',
      severity: 'error',
      path: part.path,
      problem: 'the whole part is hidden inside later parts or cut away',
      found: part.name,
      suggestion: 'move it further down in the file (the later part wins) or remove it',
    });
  }
  const dyed = description.parts.some(({ medium }) => (description.media.get(medium)?.dyes.length ?? 0) > 0);
  if (!dyed) {
    faults.push({
      code: 'caution',
      severity: 'warning',
      path: [],
      problem: 'no part holds a dye, so nothing will fluoresce',
    });
  }
  return faults;
}
