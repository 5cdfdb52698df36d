/**
 * The hot loop: one batch of histories, from pump to fate. Analog: every event of a photon is drawn as nature would, so both
 * ledgers are sums of whole numbers. Nothing is allocated; scalars live in locals; helpers take and fill typed arrays.
 */
import { nextUnit } from '../numerics/random-stream.js';
import { drawIndex } from '../numerics/sample-table.js';
import { SOBOL_DIMENSIONS, sobolUnit, stepSobol } from '../numerics/sobol.js';
import { fresnelReflectance } from '../optics/fresnel.js';
import { metalReflectance } from '../optics/metal-reflectance.js';
import { FREE_PLANE, INTERFACE, PASS, RECORDS_ARRIVAL, type RegionGraph, SPREADS } from '../scene/region-graph.js';
import {
  DYE_SLOT,
  EXIT_EMITTED_SLOT,
  EXIT_PUMP_SLOT,
  FACE_SLOT,
  MISSED_SLOT,
  OWNER_SLOT,
  type Scene,
  SPLIT,
  SPREAD,
} from '../scene/scene-layout.js';
import { type BatchTally, closeGroup, GROUP_HISTORIES } from '../tallies/batch-tally.js';
import { FIGURE } from '../tallies/run-tallies.js';
import { closeHistory } from './close-history.js';
import { choosePump, LAUNCH, launchPump } from './launch-pump.js';
import { nearestOther, travelNormal } from './next-boundary.js';
import { depositVoxel, inAperture, recordCrossing } from './record-light.js';
import { scatterAbout, scatterLambertian } from './scatter.js';
import { tableShares } from './table-shares.js';

/**
 * After this many boundaries in a row at which nothing was left to chance, light goes round a closed path for good. Where
 * something on the path absorbs, that is its fate, as it would be after more turns; where nothing does within as many
 * boundaries again, it is `trapped`.
 */
const CLOSED_PATH = 20_000;

/** @returns how many histories ended in no fate: 0, or the program is at fault. */
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
  let interfaces = graph.interfaces;

  const ray = new Float64Array(6);
  const normal = new Float64Array(3);
  const hit = new Float64Array(2);
  const shares = new Float64Array(2);
  // The first point of a randomly shifted net is the shift itself.
  const points = new Int32Array(SOBOL_DIMENSIONS);
  for (let i = 0; i < SOBOL_DIMENSIONS; i++) points[i] = (nextUnit(random) * 2 ** 32) | 0;
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
    // −∞ for a zero component makes both its distances +∞.
    let ix = dx !== 0 ? 1 / dx : Number.NEGATIVE_INFINITY;
    let iy = dy !== 0 ? 1 / dy : Number.NEGATIVE_INFINITY;
    let iz = dz !== 0 ? 1 / dz : Number.NEGATIVE_INFINITY;
    let medium = regionMedium[region];
    let owner = regionOwner[region];
    /** 1 inside a part: only there path length counts. */
    let inside = owner !== 0 ? 1 : 0;
    let mu = attenuation[medium * wavelengths + wavelength];
    let n1 = index[medium * wavelengths + wavelength];
    let light = 0;
    let entered = owner !== 0;
    let lastFace = -1;
    let absorptions = 0;
    let pumpPath = 0;
    let path = 0;
    let closed = 0;
    /** Slot of the fate, −1 while under way. */
    let fate = -1;

    vector[figures + FIGURE.launchedPhotons]++;
    vector[figures + FIGURE.launchedEnergy] += energyQuanta[wavelength];
    spectra[scene.spectrumLaunched + wavelength]++;

    for (;;) {
      // ---- nearest way out of the region
      const b = region * families2;
      let way = -1;
      let t = Number.POSITIVE_INFINITY;
      const wayX = dx > 0 ? 1 : 0;
      const wayY = dy > 0 ? 3 : 2;
      const wayZ = dz > 0 ? 5 : 4;
      const tX = (bound[b + wayX] - x) * ix;
      const tY = (bound[b + wayY] - y) * iy;
      const tZ = (bound[b + wayZ] - z) * iz;
      // A ray that lies in a plane has no distance to it (0 · ∞ is no number) and never wins.
      if (tX < t) {
        t = tX;
        way = wayX;
      }
      if (tY < t) {
        t = tY;
        way = wayY;
      }
      if (tZ < t) {
        t = tZ;
        way = wayZ;
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
      const depth = mu * t;
      if (depth >= tau) {
        const s = tau / mu;
        x += s * dx;
        y += s * dy;
        z += s * dz;
        path += s * inside;
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
          pumpPath = path;
          path = 0;
        }
        const dye = medium * maxAbsorbers + absorber;
        const slot = dyeSlot[owner * maxAbsorbers + absorber];
        if (nextUnit(random) >= dyeYield[dye]) {
          fate = slot + DYE_SLOT.lostPump + light;
          break;
        }
        const unit = nextUnit(random);
        const table = dyeSpectrum[dye] * wavelengths;
        wavelength = drawIndex(scene.spectrumKeep, scene.spectrumOther, table, wavelengths, unit);
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
        n1 = index[medium * wavelengths + wavelength];
        light = 1;
        entered = true;
        closed = 0;
        continue;
      }
      if (way < 0) {
        // Nothing ahead: light is in the surroundings for good.
        if (owner !== 0 || dx !== dx) break;
        if (lastFace < 0) fate = light === 0 ? MISSED_SLOT : -1;
        else if (!entered) fate = faceSlot[lastFace] + FACE_SLOT.reflectedAtEntry;
        else fate = faceSlot[lastFace] + FACE_SLOT.leftPump + light;
        break;
      }
      x += t * dx;
      y += t * dy;
      z += t * dz;
      tau -= depth;
      path += t * inside;

      // ---- what lies beyond
      const at = region * ways + way;
      let record = crossing[at];
      if (record < 0) {
        if (record !== PASS) {
          record = graph.resolve(region, way);
          interfaces = graph.interfaces;
        }
        if (record === PASS) {
          region = neighbour[at];
          continue;
        }
      }
      if (++closed > CLOSED_PATH) {
        if (mu > 0) tau = 0;
        else if (closed > 2 * CLOSED_PATH) {
          fate = ownerSlot[owner] + OWNER_SLOT.trappedPump + light;
          break;
        }
      }
      const flags = interfaces[record + INTERFACE.flags];
      if ((flags & FREE_PLANE) !== 0) {
        const recorder = interfaces[record + INTERFACE.recorder];
        if (inAperture(scene, recorder, way, x, y, z)) {
          recordCrossing(scene, grown, recorder, half, light, wavelength, x, y, z, dx, dy, dz);
          if (scene.detectorExit[recorder] === 1) {
            fate = light === 0 ? EXIT_PUMP_SLOT : EXIT_EMITTED_SLOT;
            break;
          }
        }
        region = neighbour[at];
        continue;
      }
      if ((flags & RECORDS_ARRIVAL) !== 0 && light === 0) {
        const recorder = interfaces[record + INTERFACE.recorder];
        recordCrossing(scene, grown, recorder, half, light, wavelength, x, y, z, dx, dy, dz);
      }

      // ---- reflected, transmitted or absorbed?
      const axis = way < 6 ? way >> 1 : 3;
      let cosine: number;
      if (axis === 0) cosine = Math.abs(dx);
      else if (axis === 1) cosine = Math.abs(dy);
      else if (axis === 2) cosine = Math.abs(dz);
      else {
        travelNormal(scene, way, x, y, z, dx, dy, dz, normal);
        cosine = normal[0] * dx + normal[1] * dy + normal[2] * dz;
      }
      const finish = interfaces[record + INTERFACE.finish];
      const split = finishSplit[finish];
      let reflects = true;
      let n2 = n1;
      if (split === SPLIT.fresnel) {
        n2 = index[interfaces[record + INTERFACE.mediumBeyond] * wavelengths + wavelength];
        if (n1 === n2) reflects = false;
        else {
          const reflected = fresnelReflectance(n1, n2, cosine);
          if (reflected < 1) {
            closed = 0;
            reflects = nextUnit(random) < reflected;
          }
        }
      } else {
        let reflected = 0;
        let transmitted = 0;
        if (split === SPLIT.spectral) {
          reflected = finishA[finish * wavelengths + wavelength];
          transmitted = finishB[finish * wavelengths + wavelength];
        } else if (split === SPLIT.metal) {
          const row = finish * wavelengths + wavelength;
          reflected = metalReflectance(n1, finishA[row], finishB[row], cosine);
        } else {
          tableShares(scene, finish, wavelength, cosine, shares);
          reflected = shares[0];
          transmitted = shares[1];
        }
        let unit = 0;
        // Nothing is left to chance at a perfect reflector or a finish that passes everything.
        if (reflected < 1 && transmitted < 1) {
          closed = 0;
          unit = nextUnit(random);
        }
        if (unit >= reflected) {
          if (unit >= reflected + transmitted) {
            fate = faceSlot[interfaces[record + INTERFACE.faceActing]] + FACE_SLOT.absorbedPump + light;
            break;
          }
          n2 = index[interfaces[record + INTERFACE.mediumBeyond] * wavelengths + wavelength];
          const ratio = n1 / n2;
          // Beyond the critical angle nothing gets out, unless a Lambertian diffuser makes light forget its angle.
          reflects =
            ratio * ratio * (1 - cosine * cosine) >= 1 && scene.finishTransmitSpread[finish] !== SPREAD.lambertian;
        }
      }

      if (reflects) {
        if (!entered) lastFace = interfaces[record + INTERFACE.faceActing];
        if ((flags & SPREADS) === 0) {
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
        }
      } else {
        region = neighbour[at];
        medium = interfaces[record + INTERFACE.mediumBeyond];
      }

      // ---- a new direction
      if (axis < 3) travelNormal(scene, way, x, y, z, dx, dy, dz, normal);
      const gx = normal[0];
      const gy = normal[1];
      const gz = normal[2];
      const spread = reflects ? scene.finishReflectSpread[finish] : scene.finishTransmitSpread[finish];
      const sign = reflects ? -1 : 1;
      if (spread === SPREAD.lambertian) {
        closed = 0;
        scatterLambertian(ray, sign * gx, sign * gy, sign * gz, random);
        dx = ray[3];
        dy = ray[4];
        dz = ray[5];
      } else {
        if (reflects) {
          dx -= 2 * cosine * gx;
          dy -= 2 * cosine * gy;
          dz -= 2 * cosine * gz;
        } else if (n1 !== n2) {
          const ratio = n1 / n2;
          const bend = Math.sqrt(1 - ratio * ratio * (1 - cosine * cosine)) - ratio * cosine;
          dx = ratio * dx + bend * gx;
          dy = ratio * dy + bend * gy;
          dz = ratio * dz + bend * gz;
        }
        if (spread !== SPREAD.specular) {
          closed = 0;
          ray[3] = dx;
          ray[4] = dy;
          ray[5] = dz;
          scatterAbout(ray, spread, scene.finishWidth[finish], sign * gx, sign * gy, sign * gz, random);
          dx = ray[3];
          dy = ray[4];
          dz = ray[5];
        }
      }
      ix = dx !== 0 ? 1 / dx : Number.NEGATIVE_INFINITY;
      iy = dy !== 0 ? 1 / dy : Number.NEGATIVE_INFINITY;
      iz = dz !== 0 ? 1 / dz : Number.NEGATIVE_INFINITY;
      if (reflects) continue;

      // ---- through: another medium, another owner
      n1 = n2;
      owner = interfaces[record + INTERFACE.ownerBeyond];
      inside = owner !== 0 ? 1 : 0;
      if (owner !== 0) entered = true;
      mu = attenuation[medium * wavelengths + wavelength];
      const faceOut = interfaces[record + INTERFACE.faceOut];
      lastFace = faceOut >= 0 ? faceOut : interfaces[record + INTERFACE.faceIn];
      if (faceOut >= 0 && scene.faceRecorderOut[faceOut] >= 0) {
        const recorder = scene.faceRecorderOut[faceOut];
        recordCrossing(scene, grown, recorder, half, light, wavelength, x, y, z, dx, dy, dz);
        if (scene.faceExit[faceOut] === 1) {
          fate = light === 0 ? EXIT_PUMP_SLOT : EXIT_EMITTED_SLOT;
          break;
        }
      }
    }

    // ---- the end of the history
    if (fate < 0) {
      defects++;
      continue;
    }
    if (light === 0) {
      pumpPath = path;
      path = 0;
    }
    closeHistory(scene, tally, fate, wavelength, absorptions, pumpPath, path);
    if (++inGroup === GROUP_HISTORIES) {
      closeGroup(tally, inGroup);
      inGroup = 0;
    }
  }
  if (inGroup > 0) closeGroup(tally, inGroup);
  return defects;
}
