/**
 * The hot loop: one batch of histories, from pump to fate. Analog: every event of a photon is drawn as nature would, so both
 * ledgers are sums of whole numbers. Nothing is allocated; scalars live in locals; helpers take and fill typed arrays.
 */
import { drawIndex } from '../numerics/sample-table.js';
import { nextUnit } from '../numerics/random-stream.js';
import { SOBOL_DIMENSIONS, sobolUnit, startSobol, stepSobol } from '../numerics/sobol.js';
import { fresnelReflectance } from '../optics/fresnel.js';
import { metalReflectance } from '../optics/metal-reflectance.js';
import { PASS, type RegionGraph } from '../scene/region-graph.js';
import {
  ABSORPTION_HISTOGRAM_CELLS,
  DYE_SLOT,
  EXIT_EMITTED_SLOT,
  EXIT_PUMP_SLOT,
  FACE_SLOT,
  MISSED_SLOT,
  OWNER_SLOT,
  PATH_HISTOGRAM_CELLS,
  type Scene,
  SPLIT,
  SPREAD,
} from '../scene/scene-layout.js';
import { type BatchTally, closeGroup, GROUP_HISTORIES } from '../tallies/batch-tally.js';
import { FIGURE } from '../tallies/run-tallies.js';
import { choosePump, LAUNCH, launchPump } from './launch-pump.js';
import { nearestOther, travelNormal } from './next-boundary.js';
import { depositVoxel, mapCoordinate, recordLight } from './record-light.js';
import { scatterAbout, scatterLambertian } from './scatter.js';
import { tableShares } from './table-shares.js';

/**
 * After this many boundaries in a row at which nothing was left to chance, light goes round a closed path for good: where
 * nothing absorbs its fate is `trapped`, otherwise the medium it crosses absorbs it, as it would after more turns.
 */
const CLOSED_PATH = 20_000;

/** What came of a batch: how many histories ended in no fate (0, or the program is at fault). */
export function traceBatch(
  scene: Scene,
  graph: RegionGraph,
  tally: BatchTally,
  random: Int32Array,
  half: number,
  histories: number,
): number {
  const wavelengths = scene.wavelengths;
  const ways = graph.ways;
  const families2 = 2 * scene.families;
  const others = scene.families > 3 || scene.quadrics > 0;
  const maxAbsorbers = scene.maxAbsorbers;
  const { index, attenuation, absorberCount, absorberShare, dyeYield, dyeSpectrum } = scene;
  const { energyQuanta, finishSplit, finishA, finishB, faceSlot, ownerSlot, dyeSlot } = scene;
  const { bound, neighbour, crossing, medium: regionMedium, owner: regionOwner } = graph;
  const { vector, grown } = tally;
  const { maps, spectra } = grown;
  const figures = 2 * scene.slots;

  const ray = new Float64Array(6);
  const normal = new Float64Array(3);
  const hit = new Float64Array(2);
  const shares = new Float64Array(2);
  const points = new Int32Array(SOBOL_DIMENSIONS);
  for (let i = 0; i < SOBOL_DIMENSIONS; i++) points[i] = (nextUnit(random) * 2 ** 32) | 0;
  startSobol(points, points);
  const startRegion = new Int32Array(scene.pumpCount).fill(-1);
  let defects = 0;
  let inGroup = 0;

  for (let history = 0; history < histories; history++) {
    if (graph.crowded) {
      graph.forget();
      startRegion.fill(-1);
    }
    const pump = choosePump(scene, points);
    let wavelength = launchPump(scene, pump, points, ray);
    let x = ray[0];
    let y = ray[1];
    let z = ray[2];
    let dx = ray[3];
    let dy = ray[4];
    let dz = ray[5];
    let tau = -Math.log(sobolUnit(points, LAUNCH.freePath));
    stepSobol(points, history);
    let region = startRegion[pump];
    if (region < 0 || !graph.contains(region, x, y, z)) {
      region = graph.locate(x, y, z, dx, dy, dz);
      startRegion[pump] = region;
    }
    // −∞ for a zero component makes its two distances +∞.
    let ix = dx !== 0 ? 1 / dx : Number.NEGATIVE_INFINITY;
    let iy = dy !== 0 ? 1 / dy : Number.NEGATIVE_INFINITY;
    let iz = dz !== 0 ? 1 / dz : Number.NEGATIVE_INFINITY;
    let medium = regionMedium[region];
    let owner = regionOwner[region];
    let mu = attenuation[medium * wavelengths + wavelength];
    let light = 0;
    let entered = owner !== 0;
    let lastFace = -1;
    let absorptions = 0;
    let pumpPath = 0;
    let emittedPath = 0;
    let closed = 0;
    let dimmed = false;
    /** Slot of the fate, −1 while under way. */
    let fate = -1;

    vector[figures + FIGURE.launchedPhotons]++;
    vector[figures + FIGURE.launchedEnergy] += energyQuanta[wavelength];
    spectra[scene.spectrumLaunched + wavelength]++;

    while (fate < 0) {
      // ---- nearest way out of the region
      let way = -1;
      let t = Number.POSITIVE_INFINITY;
      const b = region * families2;
      const upX = dx > 0 ? 1 : 0;
      const tx = (bound[b + upX] - x) * ix;
      if (tx < t) {
        t = tx;
        way = upX;
      }
      const upY = dy > 0 ? 3 : 2;
      const ty = (bound[b + upY] - y) * iy;
      if (ty < t) {
        t = ty;
        way = upY;
      }
      const upZ = dz > 0 ? 5 : 4;
      const tz = (bound[b + upZ] - z) * iz;
      if (tz < t) {
        t = tz;
        way = upZ;
      }
      if (others) {
        hit[0] = t;
        hit[1] = way;
        nearestOther(scene, graph, region, x, y, z, dx, dy, dz, hit);
        t = hit[0];
        way = hit[1];
      }
      if (t < 0) t = 0;

      // ---- absorbed on the way?
      const depth = mu > 0 ? mu * t : 0;
      if (mu > 0) dimmed = true;
      const goesRound = closed > CLOSED_PATH && mu > 0;
      if (depth >= tau || goesRound) {
        const s = goesRound ? 0 : tau / mu;
        x += s * dx;
        y += s * dy;
        z += s * dz;
        if (owner !== 0) {
          if (light === 0) pumpPath += s;
          else emittedPath += s;
        }
        const quanta = energyQuanta[wavelength];
        depositVoxel(scene, maps, half, light, quanta, x, y, z);
        const count = absorberCount[medium];
        let absorber = 0;
        if (count > 1) {
          const unit = nextUnit(random);
          const row = medium * maxAbsorbers;
          while (absorber < count - 1 && unit >= absorberShare[(row + absorber) * wavelengths + wavelength]) absorber++;
        }
        if (absorber === 0) {
          fate = ownerSlot[owner] + OWNER_SLOT.bulkPump + light;
          break;
        }
        absorptions++;
        if (light === 0) {
          vector[figures + FIGURE.pumpAbsorbed]++;
          spectra[scene.spectrumAbsorbedPump + wavelength]++;
        }
        const dye = medium * maxAbsorbers + absorber;
        const slot = dyeSlot[owner * maxAbsorbers + absorber];
        if (nextUnit(random) >= dyeYield[dye]) {
          fate = slot + DYE_SLOT.lostPump + light;
          break;
        }
        const unit = nextUnit(random);
        wavelength = drawIndex(
          scene.spectrumKeep,
          scene.spectrumOther,
          dyeSpectrum[dye] * wavelengths,
          wavelengths,
          unit,
        );
        vector[2 * (slot + DYE_SLOT.stokesPump + light) + 1] += quanta - energyQuanta[wavelength];
        vector[figures + FIGURE.emissions]++;
        spectra[scene.spectrumEmitted + wavelength]++;
        // Isotropic: Marsaglia, Ann. Math. Stat. 43 645 (1972).
        let p = 0;
        let q = 0;
        let r2 = 0;
        do {
          p = 2 * nextUnit(random) - 1;
          q = 2 * nextUnit(random) - 1;
          r2 = p * p + q * q;
        } while (r2 >= 1);
        const f = 2 * Math.sqrt(1 - r2);
        dx = p * f;
        dy = q * f;
        dz = 1 - 2 * r2;
        ix = dx !== 0 ? 1 / dx : Number.NEGATIVE_INFINITY;
        iy = dy !== 0 ? 1 / dy : Number.NEGATIVE_INFINITY;
        iz = dz !== 0 ? 1 / dz : Number.NEGATIVE_INFINITY;
        tau = -Math.log(nextUnit(random));
        mu = attenuation[medium * wavelengths + wavelength];
        light = 1;
        entered = true;
        closed = 0;
        dimmed = false;
        continue;
      }
      if (way < 0) {
        // Nothing ahead: light is in the surroundings for good.
        if (owner !== 0) break;
        if (lastFace < 0) fate = light === 0 ? MISSED_SLOT : -1;
        else if (!entered) fate = faceSlot[lastFace] + FACE_SLOT.reflectedAtEntry;
        else fate = faceSlot[lastFace] + FACE_SLOT.leftPump + light;
        break;
      }
      x += t * dx;
      y += t * dy;
      z += t * dz;
      tau -= depth;
      if (owner !== 0) {
        if (light === 0) pumpPath += t;
        else emittedPath += t;
      }

      // ---- what lies beyond
      const at = region * ways + way;
      let code = crossing[at];
      if (code < PASS) code = graph.resolve(region, way);
      if (code === PASS) {
        region = neighbour[at];
        continue;
      }
      closed++;
      if (closed > CLOSED_PATH && !dimmed) {
        fate = ownerSlot[owner] + OWNER_SLOT.trappedPump + light;
        break;
      }
      const detector = graph.detector[code];
      if (detector >= 0) {
        if (inAperture(scene, detector, way, x, y, z)) {
          ray[0] = x;
          ray[1] = y;
          ray[2] = z;
          ray[3] = dx;
          ray[4] = dy;
          ray[5] = dz;
          recordLight(scene, grown, detector, half, light, wavelength, ray);
          if (scene.detectorExit[detector] === 1) {
            fate = light === 0 ? EXIT_PUMP_SLOT : EXIT_EMITTED_SLOT;
            break;
          }
        }
        region = neighbour[at];
        continue;
      }

      // ---- reflected, transmitted or absorbed?
      const axis = way < 6 ? way >> 1 : -1;
      let gx = 0;
      let gy = 0;
      let gz = 0;
      let cosine: number;
      if (axis === 0) {
        gx = dx > 0 ? 1 : -1;
        cosine = gx * dx;
      } else if (axis === 1) {
        gy = dy > 0 ? 1 : -1;
        cosine = gy * dy;
      } else if (axis === 2) {
        gz = dz > 0 ? 1 : -1;
        cosine = gz * dz;
      } else {
        travelNormal(scene, way, x, y, z, dx, dy, dz, normal);
        gx = normal[0];
        gy = normal[1];
        gz = normal[2];
        cosine = gx * dx + gy * dy + gz * dz;
      }
      const faceIn = graph.faceIn[code];
      const faceOut = graph.faceOut[code];
      if (light === 0 && faceIn >= 0 && scene.faceRecorderArriving[faceIn] >= 0) {
        ray[0] = x;
        ray[1] = y;
        ray[2] = z;
        ray[3] = dx;
        ray[4] = dy;
        ray[5] = dz;
        recordLight(scene, grown, scene.faceRecorderArriving[faceIn], half, light, wavelength, ray);
      }
      const beyond = graph.mediumBeyond[code];
      const n1 = index[medium * wavelengths + wavelength];
      const n2 = index[beyond * wavelengths + wavelength];
      const finish = graph.finish[code];
      const split = finishSplit[finish];
      const ratio = n1 / n2;
      const sine2 = ratio * ratio * (1 - cosine * cosine);
      let reflected: number;
      let transmitted: number;
      if (split === SPLIT.spectral) {
        reflected = finishA[finish * wavelengths + wavelength];
        transmitted = finishB[finish * wavelengths + wavelength];
      } else if (split === SPLIT.fresnel) {
        reflected = n1 === n2 ? 0 : fresnelReflectance(n1, n2, cosine);
        transmitted = 1 - reflected;
      } else if (split === SPLIT.metal) {
        const n = finishA[finish * wavelengths + wavelength];
        reflected = metalReflectance(n1, n, finishB[finish * wavelengths + wavelength], cosine);
        transmitted = 0;
      } else {
        tableShares(scene, finish, wavelength, cosine, shares);
        reflected = shares[0];
        transmitted = shares[1];
      }
      const spread = scene.finishTransmitSpread[finish];
      // What a finish would pass cannot get out beyond the critical angle, unless a Lambertian diffuser forgets the angle.
      if (sine2 >= 1 && spread !== SPREAD.lambertian) {
        reflected += transmitted;
        transmitted = 0;
      }
      let reflects = true;
      if (reflected < 1) {
        if (reflected === 0 && transmitted === 1) reflects = false;
        else {
          closed = 0;
          dimmed = false;
          const unit = nextUnit(random);
          reflects = unit < reflected;
          if (!reflects && unit >= reflected + transmitted) {
            fate = faceSlot[graph.faceActing[code]] + FACE_SLOT.absorbedPump + light;
            break;
          }
        }
      }

      if (reflects) {
        if (!entered) lastFace = graph.faceActing[code];
        const reflectSpread = scene.finishReflectSpread[finish];
        if (reflectSpread === SPREAD.specular) {
          if (axis === 0) {
            dx = -dx;
            ix = -ix;
            continue;
          }
          if (axis === 1) {
            dy = -dy;
            iy = -iy;
            continue;
          }
          if (axis === 2) {
            dz = -dz;
            iz = -iz;
            continue;
          }
          dx -= 2 * cosine * gx;
          dy -= 2 * cosine * gy;
          dz -= 2 * cosine * gz;
        } else {
          closed = 0;
          dimmed = false;
          if (reflectSpread === SPREAD.lambertian) scatterLambertian(ray, -gx, -gy, -gz, random);
          else {
            ray[3] = dx - 2 * cosine * gx;
            ray[4] = dy - 2 * cosine * gy;
            ray[5] = dz - 2 * cosine * gz;
            scatterAbout(ray, reflectSpread, scene.finishWidth[finish], -gx, -gy, -gz, random);
          }
          dx = ray[3];
          dy = ray[4];
          dz = ray[5];
        }
      } else {
        if (spread === SPREAD.lambertian) {
          closed = 0;
          dimmed = false;
          scatterLambertian(ray, gx, gy, gz, random);
          dx = ray[3];
          dy = ray[4];
          dz = ray[5];
        } else {
          if (ratio !== 1) {
            const bend = Math.sqrt(1 - sine2) - ratio * cosine;
            dx = ratio * dx + bend * gx;
            dy = ratio * dy + bend * gy;
            dz = ratio * dz + bend * gz;
          }
          if (spread !== SPREAD.specular) {
            closed = 0;
            dimmed = false;
            ray[3] = dx;
            ray[4] = dy;
            ray[5] = dz;
            scatterAbout(ray, spread, scene.finishWidth[finish], gx, gy, gz, random);
            dx = ray[3];
            dy = ray[4];
            dz = ray[5];
          }
        }
        if (faceOut >= 0) {
          const recorder = scene.faceRecorderOut[faceOut];
          if (recorder >= 0) {
            ray[0] = x;
            ray[1] = y;
            ray[2] = z;
            ray[3] = dx;
            ray[4] = dy;
            ray[5] = dz;
            recordLight(scene, grown, recorder, half, light, wavelength, ray);
            if (scene.faceExit[faceOut] === 1) {
              fate = light === 0 ? EXIT_PUMP_SLOT : EXIT_EMITTED_SLOT;
              break;
            }
          }
          lastFace = faceOut;
        } else lastFace = faceIn;
        region = neighbour[at];
        medium = beyond;
        owner = graph.ownerBeyond[code];
        if (owner !== 0) entered = true;
        mu = attenuation[medium * wavelengths + wavelength];
      }
      ix = dx !== 0 ? 1 / dx : Number.NEGATIVE_INFINITY;
      iy = dy !== 0 ? 1 / dy : Number.NEGATIVE_INFINITY;
      iz = dz !== 0 ? 1 / dz : Number.NEGATIVE_INFINITY;
    }

    // ---- the end of the history
    if (fate < 0 || x !== x || dx !== dx) {
      defects++;
      continue;
    }
    const quanta = energyQuanta[wavelength];
    vector[2 * fate]++;
    vector[2 * fate + 1] += quanta;
    vector[figures + FIGURE.dyeAbsorptions] += absorptions;
    if (absorptions > 1) vector[figures + FIGURE.reabsorptions] += absorptions - 1;
    vector[figures + FIGURE.pumpPath] += pumpPath;
    vector[figures + FIGURE.emittedPath] += emittedPath;
    grown.absorptions[Math.min(absorptions, ABSORPTION_HISTOGRAM_CELLS - 1)]++;
    if (fate === EXIT_EMITTED_SLOT) {
      vector[figures + FIGURE.exitPhotons]++;
      vector[figures + FIGURE.exitEnergy] += quanta;
      vector[figures + FIGURE.exitX] += quanta * scene.observerX[wavelength];
      vector[figures + FIGURE.exitY] += quanta * scene.observerY[wavelength];
      vector[figures + FIGURE.exitZ] += quanta * scene.observerZ[wavelength];
      vector[figures + FIGURE.exitWavelength] += scene.wavelengthNm[wavelength];
      grown.exitReabsorptions[Math.min(absorptions - 1, ABSORPTION_HISTOGRAM_CELLS - 1)]++;
      const cell = Math.floor((pumpPath + emittedPath) / scene.pathHistogramStep);
      grown.exitPath[Math.min(cell, PATH_HISTOGRAM_CELLS - 1)]++;
    } else if (fate === EXIT_PUMP_SLOT) {
      vector[figures + FIGURE.leakPhotons]++;
      vector[figures + FIGURE.leakEnergy] += quanta;
    }
    if (++inGroup === GROUP_HISTORIES) {
      closeGroup(tally, inGroup);
      inGroup = 0;
    }
  }
  if (inGroup > 0) closeGroup(tally, inGroup);
  return defects;
}

/** Whether light crosses a free plane along its normal and within its outline. */
function inAperture(scene: Scene, recorder: number, way: number, x: number, y: number, z: number): boolean {
  const upwards = (way & 1) === 1 ? 1 : -1;
  if (upwards !== scene.detectorSign[recorder]) return false;
  const u = mapCoordinate(scene, recorder, 0, x, y, z) / scene.recorderCells[2 * recorder];
  const v = mapCoordinate(scene, recorder, 1, x, y, z) / scene.recorderCells[2 * recorder + 1];
  if (scene.detectorAperture[2 * recorder + 1] < 0) return (2 * u - 1) ** 2 + (2 * v - 1) ** 2 <= 1;
  return u >= 0 && u < 1 && v >= 0 && v < 1;
}
