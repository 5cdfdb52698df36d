/** Description -> scene: the flat arrays the kernel reads, and the legend that gives its numbers their names back. */
import { carriesPolarisation } from '../design/carries-polarisation.js';
import type { Description } from '../design/description.js';
import { DesignFaults } from '../design/design-faults.js';
import type { Fault } from '../design/fault.js';
import { colourMatching } from '../materials/observer.js';
import type { FateSlot } from '../tallies/run-tallies.js';
import { EV_NM } from '../units/constants.js';
import { compileEmitters } from './compile-emitters.js';
import { type CompiledFilms, compileFilms } from './compile-films.js';
import { compileFinishes, TABLE_ANGLES } from './compile-finishes.js';
import { compileMedia } from './compile-media.js';
import { type BeamFrame, compilePumps } from './compile-pumps.js';
import { planRecorders, planVoxels, type RecorderPlan, type VoxelPlan } from './compile-recorders.js';
import { checkFaceReference, compileSolids, designSize, type SceneFace } from './compile-solids.js';
import { givenFinish } from './given-finish.js';
import { layOutRecorders } from './lay-out-recorders.js';
import { layOutSlots } from './lay-out-slots.js';
import { layOutMeshes } from './mesh/lay-out-meshes.js';
import { type PlacedPart, placeParts } from './place-parts.js';
import { SCENE_VERSION, type Scene } from './scene-layout.js';
import { sharedBytes, sharedDoubles, sharedInts } from './shared-arrays.js';
import { SpectrumPool } from './spectrum-pool.js';
import { type WavelengthGrid, wavelengthGrid } from './wavelength-grid.js';

/** Photon energies are counted in steps of 2^-22 of the largest, so that up to 2^31 histories sum without rounding. */
const QUANTA = 2 ** 22;

export interface SceneLegend {
  readonly parts: readonly PlacedPart[];
  readonly faces: readonly SceneFace[];
  readonly mediaNames: readonly string[];
  readonly finishNames: readonly string[];
  readonly slots: readonly FateSlot[];
  readonly recorders: readonly RecorderPlan[];
  readonly voxels: VoxelPlan;
  readonly grid: WavelengthGrid;
  readonly beams: readonly BeamFrame[];
  /** Stacks of thin films whose curves are finer than their tables. */
  readonly coarseFilms: CompiledFilms['coarse'];
  /** eV per energy quantum. */
  readonly quantumEv: number;
}

export interface CompiledScene {
  readonly scene: Scene;
  readonly legend: SceneLegend;
}

/** @throws DesignFaults when a part cannot be placed or a name of a face is wrong. */
export function compileScene(description: Description): CompiledScene {
  const { parts, faults } = placeParts(description.parts);
  faults.push(...referenceFaults(description, parts));
  if (faults.length > 0) throw new DesignFaults(faults);

  const grid = wavelengthGrid(description);
  const pool = new SpectrumPool(grid.nm.length);
  const solids = compileSolids(description, parts);
  const media = compileMedia(description, grid, pool);
  const finishes = compileFinishes(description, grid);
  const pumps = compilePumps(description, parts, grid, pool);
  const emitters = compileEmitters(description.pumps, grid);
  const recorders = planRecorders(description, solids, pumps.frames);
  const voxels = planVoxels(description, parts);
  const owners = parts.length + 1;
  const ownerMedia = [description.surroundings, ...parts.map(({ description: { medium } }) => medium)];
  const slots = layOutSlots(description, parts, solids.faces, media, ownerMedia);
  const records = layOutRecorders(solids, recorders, voxels, grid);
  const spectra = pool.finish();
  const faceFinish = finishOfFaces(solids.faces, finishes.names);
  const films = compileFilms(description, parts, solids.faces, faceFinish, finishes.names, media, grid);
  const largest = 1 / grid.nm[0];
  const energyQuanta = grid.nm.map((nm) => Math.round(QUANTA / nm / largest));
  const observer = Array.from(grid.nm, (nm) => colourMatching(nm));

  const scene: Scene = {
    version: SCENE_VERSION,
    wavelengths: grid.nm.length,
    polarised: carriesPolarisation(description) ? 1 : 0,
    families: solids.normals.length,
    familyNormal: sharedDoubles(solids.normals.flat()),
    familyStart: sharedInts(solids.starts),
    planeOffset: sharedDoubles(solids.offsets),
    quadrics: solids.curves,
    quadric: sharedDoubles(solids.quadrics),
    ...layOutMeshes(solids.meshes),
    primitiveStart: sharedInts(solids.primitiveStart),
    constraintSurface: sharedInts(solids.constraintSurface),
    constraintSide: sharedBytes(solids.constraintSide),
    constraintFace: sharedInts(solids.constraintFace),
    pieceStart: sharedInts(solids.pieceStart),
    pieceMember: sharedInts(solids.pieceMember),
    ownerPieceStart: sharedInts(solids.ownerPieceStart),
    owners,
    ownerMedium: sharedInts(ownerMedia.map((name) => media.names.indexOf(name))),
    faces: solids.faces.length,
    faceOwner: sharedInts(solids.faces.map(({ owner }) => owner)),
    faceFinish: sharedInts(faceFinish),
    faceAxis: sharedDoubles(solids.faces.flatMap(({ patch }) => ('axis' in patch ? patch.axis : patch.v))),
    ...records.arrays,
    media: media.names.length,
    index: sharedDoubles(media.index),
    attenuation: sharedDoubles(media.attenuation),
    maxAbsorbers: media.maxAbsorbers,
    absorberCount: sharedInts(media.absorberCount),
    absorberShare: sharedDoubles(media.absorberShare),
    dyeYield: sharedDoubles(media.dyeYield),
    diluteYield: sharedDoubles(media.diluteYield),
    dyeSpectrum: sharedInts(media.dyeSpectrum),
    maxScatterers: media.scatterers.maxScatterers,
    scatterShare: sharedDoubles(media.scatterShare),
    scattererCount: sharedInts(media.scatterers.count),
    scattererShare: sharedDoubles(media.scatterers.share),
    phaseTable: sharedInts(media.scatterers.table),
    phaseValue: sharedDoubles(media.scatterers.value),
    phaseCosine: sharedDoubles(media.scatterers.cosines),
    finishes: finishes.names.length,
    finishSplit: sharedInts(finishes.split),
    finishReflectSpread: sharedInts(finishes.reflectSpread),
    finishTransmitSpread: sharedInts(finishes.transmitSpread),
    finishWidth: sharedDoubles(finishes.width),
    finishWidthV: sharedDoubles(finishes.widthV),
    scatterHead: sharedInts(finishes.scatterHead),
    scatterNumbers: sharedDoubles(finishes.scatterNumbers),
    finishA: sharedDoubles(finishes.a),
    finishB: sharedDoubles(finishes.b),
    finishTable: sharedInts(finishes.table),
    tableAngles: TABLE_ANGLES,
    tableReflectance: sharedDoubles(finishes.tableReflectance),
    tableTransmittance: sharedDoubles(finishes.tableTransmittance),
    filmOf: sharedInts(films.filmOf),
    filmBlock: sharedInts(films.filmBlock),
    filmBeyond: sharedInts(films.filmBeyond),
    filmStart: sharedInts(films.filmStart),
    filmCells: sharedInts(films.filmCells),
    filmNodes: films.filmNodes,
    filmLayerStart: sharedInts(films.filmLayerStart),
    filmLayers: films.filmLayers,
    pumpCount: description.pumps.length,
    pumps: sharedDoubles(pumps.pumps),
    pumpBeam: sharedInts(pumps.beam),
    pumpOutline: sharedInts(pumps.outline),
    pumpSpectrum: sharedInts(pumps.spectrum),
    pumpCumulative: sharedDoubles(pumps.cumulative),
    farFieldStart: sharedInts(emitters.farFieldStart),
    farFieldPoints: sharedInts(emitters.farFieldPoints),
    farFields: sharedDoubles(emitters.farFields),
    pointingStart: sharedInts(emitters.pointingStart),
    pointing: sharedDoubles(emitters.pointing),
    rayStart: sharedInts(emitters.rayStart),
    rayCount: sharedInts(emitters.rayCount),
    rays: sharedDoubles(emitters.rays),
    rayKeep: sharedDoubles(emitters.rayKeep),
    rayOther: sharedInts(emitters.rayOther),
    rayWavelength: sharedInts(emitters.rayWavelength),
    spectrumKeep: sharedDoubles(spectra.keep),
    spectrumOther: sharedInts(spectra.other),
    energyQuanta: sharedDoubles(energyQuanta),
    luminousQuanta: sharedDoubles(energyQuanta.map((quanta, i) => Math.round(quanta * observer[i][1]))),
    observerX: sharedDoubles(observer.map(([x]) => x)),
    observerY: sharedDoubles(observer.map(([, y]) => y)),
    observerZ: sharedDoubles(observer.map(([, , z]) => z)),
    wavelengthNm: sharedDoubles(grid.nm),
    slots: slots.slots.length,
    faceSlot: sharedInts(slots.faceSlot),
    ownerSlot: sharedInts(slots.ownerSlot),
    dyeSlot: sharedInts(slots.dyeSlot),
    // Long enough for a cell's light, fine enough to see its structure.
    pathHistogramStep: designSize(parts) / 10,
  };
  return {
    scene,
    legend: {
      parts,
      faces: solids.faces,
      mediaNames: media.names,
      finishNames: finishes.names,
      slots: slots.slots,
      recorders,
      voxels,
      grid,
      beams: pumps.frames,
      coarseFilms: films.coarse,
      quantumEv: (largest * EV_NM) / QUANTA,
    },
  };
}

function referenceFaults(description: Description, parts: readonly PlacedPart[]): Fault[] {
  const detectors = new Set(description.detectors.map(({ name }) => name));
  const found: (Fault | null)[] = [];
  if (!detectors.has(description.exit.name)) {
    found.push(checkFaceReference(parts, description.exit.name, description.exit.path));
  }
  for (const { target, path } of description.detectors) {
    if (target.kind === 'face') found.push(checkFaceReference(parts, target.face, path));
  }
  for (const { aim, path } of description.pumps) {
    if (aim.kind === 'toward') found.push(checkFaceReference(parts, aim.face, path));
  }
  for (const part of parts) {
    const { name, faces } = part.description;
    for (const { face, path } of faces) {
      if (face !== '*') found.push(checkFaceReference(parts, `${name}.${face}`, path));
    }
  }
  return found.filter((fault) => fault !== null);
}

/** Finish of each face, −1 where the design gives none. */
function finishOfFaces(faces: readonly SceneFace[], finishNames: readonly string[]): number[] {
  return faces.map(({ part: { description }, reference }) => {
    const finish = givenFinish(description, reference.slice(description.name.length + 1));
    return finish === null ? -1 : finishNames.indexOf(finish);
  });
}
