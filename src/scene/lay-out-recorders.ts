/** Places in the tally arrays for every map, spectrum and angular map. */

import type { RecorderPlan, VoxelPlan } from './compile-recorders.js';
import type { CompiledSolids } from './compile-solids.js';
import { CELLS, NORMAL, RECORDER, type Scene, WRAP } from './scene-layout.js';
import { sharedBytes, sharedDoubles, sharedInts } from './shared-arrays.js';
import { frameAbout, scale } from './vector.js';
import type { WavelengthGrid } from './wavelength-grid.js';

type RecorderArrays = Pick<
  Scene,
  | 'faceExit'
  | 'faceRecorderOut'
  | 'faceRecorderArriving'
  | 'planeDetector'
  | 'quadricDetector'
  | 'detectorAperture'
  | 'detectorExit'
  | 'detectorSign'
  | 'recorders'
  | 'recorderFrame'
  | 'recorderWrap'
  | 'recorderCells'
  | 'recorderMap'
  | 'recorderSpectrum'
  | 'recorderAngles'
  | 'recorderPolar'
  | 'recorderRadiance'
  | 'radianceGrid'
  | 'recorderNormal'
  | 'recorderLights'
  | 'recorderNext'
  | 'voxelOrigin'
  | 'voxelScale'
  | 'voxelCells'
  | 'voxelPumpMap'
  | 'voxelEmittedMap'
  | 'mapCells'
  | 'spectrumCells'
  | 'angleCells'
  | 'radianceCells'
  | 'spectrumLaunched'
  | 'spectrumAbsorbedPump'
  | 'spectrumEmitted'
>;

export function layOutRecorders(
  solids: CompiledSolids,
  plans: readonly RecorderPlan[],
  voxels: VoxelPlan,
  grid: WavelengthGrid,
): { arrays: RecorderArrays } {
  const wavelengths = grid.nm.length;
  const counter = () => {
    let next = 0;
    const take = (cells: number) => {
      next += cells;
      return next - cells;
    };
    return { take, total: () => next };
  };
  const maps = counter();
  const spectra = counter();
  const angles = counter();
  const radiance = counter();
  const frame = new Float64Array(plans.length * RECORDER.STRIDE);
  const aperture = new Float64Array(plans.length * 2);
  const mapAt: number[] = [];
  const spectrumAt: number[] = [];
  const anglesAt: number[] = [];
  const radianceAt: number[] = [];
  plans.forEach((plan, i) => {
    frame.set(frameOf(plan), i * RECORDER.STRIDE);
    mapAt.push(maps.take(plan.cells[0] * plan.cells[1]));
    spectrumAt.push(plan.spectrum ? spectra.take(2 * wavelengths) : -1);
    anglesAt.push(plan.angles ? angles.take(polarCells(plan) * CELLS.azimuth) : -1);
    radianceAt.push(plan.radiance === null ? -1 : radiance.take(plan.radiance.reduce((a, b) => a * b)));
    if (plan.sphere !== null) aperture.set(plan.sphere.polar, 2 * i);
    if (plan.outline?.kind === 'disc') aperture.set([plan.outline.radius, -1], 2 * i);
    if (plan.outline?.kind === 'rectangle') aperture.set(scaleHalf(plan.outline.size), 2 * i);
  });
  const voxelCount = voxels.cells[0] * voxels.cells[1] * voxels.cells[2];
  const faceRecorder = (what: (plan: RecorderPlan) => boolean) =>
    solids.faces.map((face) => plans.findIndex((plan) => plan.face === face && what(plan)));
  const planeDetector = new Int32Array(solids.offsets.length).fill(-1);
  plans.forEach((plan, i) => {
    if (plan.plane !== null) planeDetector[plan.plane.plane] = i;
  });
  const quadricDetector = new Int32Array(solids.curves).fill(-1);
  plans.forEach((plan, i) => {
    if (plan.curve !== null) quadricDetector[plan.curve] = i;
  });
  const exitFaces = new Set(plans.filter(({ isExit }) => isExit).map(({ face }) => face));
  return {
    arrays: {
      faceExit: sharedBytes(solids.faces.map((face) => (exitFaces.has(face) ? 1 : 0))),
      faceRecorderOut: sharedInts(faceRecorder(({ what }) => what !== 'pumped-face')),
      faceRecorderArriving: sharedInts(faceRecorder(({ what }) => what === 'pumped-face')),
      planeDetector: sharedInts(planeDetector),
      quadricDetector: sharedInts(quadricDetector),
      detectorAperture: sharedDoubles(aperture),
      detectorExit: sharedBytes(plans.map(({ isExit }) => (isExit ? 1 : 0))),
      detectorSign: sharedBytes(plans.map(({ plane }) => plane?.sign ?? 0)),
      recorders: plans.length,
      recorderFrame: sharedDoubles(frame),
      recorderWrap: sharedInts(
        plans.map(({ wrapped, sphere }) => (sphere !== null ? WRAP.sphere : wrapped ? WRAP.side : WRAP.flat)),
      ),
      recorderCells: sharedInts(plans.flatMap(({ cells }) => cells)),
      recorderMap: sharedInts(mapAt),
      recorderSpectrum: sharedInts(spectrumAt),
      recorderAngles: sharedInts(anglesAt),
      recorderPolar: sharedInts(plans.map(polarCells)),
      recorderRadiance: sharedInts(radianceAt),
      radianceGrid: sharedInts(plans.flatMap((plan) => plan.radiance ?? [0, 0, 0, 0])),
      recorderNormal: sharedDoubles(plans.flatMap(localNormal)),
      recorderNext: sharedInts(plans.map((plan, i) => nextOnFace(plans, plan, i))),
      recorderLights: sharedInts(plans.map((p) => (p.countsPump ? 1 : 0) | (p.countsEmitted ? 2 : 0))),
      voxelOrigin: sharedDoubles(voxels.origin),
      voxelScale: sharedDoubles(voxels.cells.map((cells, axis) => cells / voxels.size[axis])),
      voxelCells: sharedInts(voxels.cells),
      voxelPumpMap: maps.take(voxelCount),
      voxelEmittedMap: maps.take(voxelCount),
      mapCells: maps.total(),
      spectrumLaunched: spectra.take(wavelengths),
      spectrumAbsorbedPump: spectra.take(wavelengths),
      spectrumEmitted: spectra.take(wavelengths),
      spectrumCells: spectra.total(),
      angleCells: angles.total(),
      radianceCells: radiance.total(),
    },
  };
}

/** Cells of an angular record along the polar angle: all of the same width. */
export const polarCells = ({ polarToDeg }: RecorderPlan): number => (CELLS.polar * polarToDeg) / 90;

/** What the outward normal at a point of the recorder is worked out from; see LOCAL_NORMAL. */
function localNormal({ face, sphere, origin, wrapped }: RecorderPlan): number[] {
  const patch = face?.patch;
  const sign = face?.hollow === true ? -1 : 1;
  if (sphere !== null) return [NORMAL.aboutCentre, ...origin, 0, 0, 1];
  if (patch?.kind === 'zone') return [NORMAL.aboutCentre, ...patch.centre, 0, 0, sign];
  if (wrapped && patch?.kind === 'side') {
    const slope = patch.bottomRadius - patch.topRadius;
    const slant = Math.hypot(patch.height, slope);
    return [NORMAL.ofSide, 0, 0, 0, patch.height / slant, slope / slant, sign];
  }
  return [NORMAL.flat, 0, 0, 0, 0, 0, 1];
}

/** The next recorder of light leaving through the same face, −1 for none. */
function nextOnFace(plans: readonly RecorderPlan[], plan: RecorderPlan, at: number): number {
  if (plan.face === null || plan.what === 'pumped-face') return -1;
  return plans.findIndex((other, i) => i > at && other.face === plan.face && other.what !== 'pumped-face');
}

const scaleHalf = ([a, b]: readonly [number, number]): [number, number] => [a / 2, b / 2];

function frameOf(plan: RecorderPlan): number[] {
  const [u, v] = plan.extent;
  const { normal } = plan;
  const perpendicular = Math.abs(plan.u[0] * normal[0] + plan.u[1] * normal[1] + plan.u[2] * normal[2]) < 1e-9;
  const azimuth = plan.wrapped || perpendicular ? { u: plan.u, v: plan.v } : frameAbout(normal);
  // A wrapped map finds its cell along the axis; its azimuth comes from the axes u, v.
  const stepV = scale(plan.wrapped ? plan.normal : plan.v, plan.cells[1] / (v[1] - v[0]));
  return [
    ...plan.origin,
    ...scale(plan.u, plan.cells[0] / (u[1] - u[0])),
    ...stepV,
    ...normal,
    ...azimuth.u,
    ...azimuth.v,
  ];
}
