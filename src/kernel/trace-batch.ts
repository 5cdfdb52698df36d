/**
 * The hot loop: one batch of histories, from pump to fate. Analog: every event of a photon is drawn as nature would, so both
 * ledgers are sums of whole numbers. Nothing is allocated; scalars live in locals; helpers take and fill typed arrays.
 */
import { BLOCK, fillUnits, nextUnit } from '../numerics/random-stream.js';
import { SOBOL_DIMENSIONS, sobolUnit, stepSobol } from '../numerics/sobol.js';
import { CROSSING, FLAG, INTERFACE, type RegionGraph } from '../scene/region-graph.js';
import { DYE_SLOT, FACE_SLOT, OWNER_SLOT, type Scene, SLOT, SPLIT, SPREAD } from '../scene/scene-layout.js';
import { type BatchTally, closeGroup, GROUP_HISTORIES } from '../tallies/batch-tally.js';
import { FIGURE_PLACE } from '../tallies/run-tallies.js';
import { closeHistory } from './close-history.js';
import { choosePump, LAUNCH, launchPump } from './launch-pump.js';
import { nearestOther, travelNormal } from './next-boundary.js';
import { depositVoxel, inAperture, recordCrossing } from './record-light.js';
import { scatterAbout, scatterLambertian } from './scatter.js';
import { SHARES, splitLight } from './split-light.js';

/**
 * After this many boundaries in a row at which nothing was left to chance, light goes round a closed path for good. Where
 * something on the path absorbs, that is its fate, as it would be after more turns; where nothing does within as many
 * boundaries again, it is `trapped`.
 */
enum LIMIT {
  closedPath = 20_000,
  /** An event takes at most this many numbers from the block. */
  draws = 8,
}

enum WALL {
  unknown = -1,
  slow = 0,
}

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
  const { energyQuanta, finishSplit, finishA, faceSlot, ownerSlot, dyeSlot } = scene;
  const { bound, neighbour, crossing, medium: regionMedium, owner: regionOwner } = graph;
  const { vector, grown } = tally;
  const { maps, spectra } = grown;
  const { spectrumKeep, spectrumOther } = scene;
  const figures = 2 * scene.slots;
  let interfaces = graph.interfaces;

  const ray = new Float64Array(6);
  const normal = new Float64Array(3);
  const hit = new Float64Array(2);
  const shares = new Float64Array(SHARES.COUNT);
  /** Reflectance of the six ways out of a region for the flight in hand; WALL.unknown, or WALL.slow for walls the short loop leaves alone. */
  const walls = new Float64Array(6);
  // The first point of a randomly shifted net is the shift itself.
  const points = new Int32Array(SOBOL_DIMENSIONS);
  for (let i = 0; i < SOBOL_DIMENSIONS; i++) points[i] = (nextUnit(random) * 2 ** 32) | 0;
  const startRegion = new Int32Array(scene.pumpCount).fill(-1);
  // Draws are made in blocks: a call for each one would box its result.
  const units = new Float64Array(BLOCK.draws);
  let draw: number = BLOCK.draws;
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

    vector[figures + FIGURE_PLACE.launchedPhotons]++;
    vector[figures + FIGURE_PLACE.launchedEnergy] += energyQuanta[wavelength];
    spectra[scene.spectrumLaunched + wavelength]++;

    for (;;) {
      if (draw > BLOCK.draws - LIMIT.draws) {
        fillUnits(random, units);
        draw = 0;
      }

      // ---- flight to the next boundary that matters
      const b = region * families2;
      let way = -1;
      let t = Number.POSITIVE_INFINITY;
      let wayX = dx > 0 ? 1 : 0;
      let wayY = dy > 0 ? 3 : 2;
      let wayZ = dz > 0 ? 5 : 4;
      let toX = (bound[b + wayX] - x) * ix;
      let toY = (bound[b + wayY] - y) * iy;
      let toZ = (bound[b + wayZ] - z) * iz;
      /** Number already drawn for the boundary ahead. */
      let unit = -1;
      let absorbed = false;
      if (others) {
        // A ray that lies in a plane has no distance to it (0 · ∞ is no number) and never wins.
        if (toX < t) {
          t = toX;
          way = wayX;
        }
        if (toY < t) {
          t = toY;
          way = wayY;
        }
        if (toZ < t) {
          t = toZ;
          way = wayZ;
        }
        hit[0] = t;
        hit[1] = way;
        ray[0] = x;
        ray[1] = y;
        ray[2] = z;
        ray[3] = dx;
        ray[4] = dy;
        ray[5] = dz;
        nearestOther(scene, graph, region, ray, hit);
        t = hit[0];
        way = hit[1];
        if (t < 0) t = 0;
        if (mu * t >= tau) {
          absorbed = true;
          t = tau / mu;
        }
        if (absorbed || way >= 0) {
          x += t * dx;
          y += t * dy;
          z += t * dz;
          tau -= mu * t;
          path += t * inside;
        }
      } else {
        // Between axis planes specular light keeps the sizes of its direction's components: the three distances are all it
        // needs, and the reflectance of each wall stays the same until something else happens to it.
        const acrossX = (bound[b + 1] - bound[b]) * Math.abs(ix);
        const acrossY = (bound[b + 3] - bound[b + 2]) * Math.abs(iy);
        const acrossZ = (bound[b + 5] - bound[b + 4]) * Math.abs(iz);
        let toEnd = mu > 0 ? tau / mu : Number.POSITIVE_INFINITY;
        let flown = 0;
        // Flown when a coordinate was last known exactly.
        let sinceX = 0;
        let sinceY = 0;
        let sinceZ = 0;
        walls[0] = WALL.unknown;
        walls[1] = WALL.unknown;
        walls[2] = WALL.unknown;
        walls[3] = WALL.unknown;
        walls[4] = WALL.unknown;
        walls[5] = WALL.unknown;
        for (;;) {
          t = toEnd;
          way = -1;
          if (toX < t) {
            t = toX;
            way = wayX;
          }
          if (toY < t) {
            t = toY;
            way = wayY;
          }
          if (toZ < t) {
            t = toZ;
            way = wayZ;
          }
          if (t === Number.POSITIVE_INFINITY) break;
          flown += t;
          toX -= t;
          toY -= t;
          toZ -= t;
          toEnd -= t;
          if (way < 0) {
            absorbed = true;
            break;
          }
          let wall = walls[way];
          if (wall < 0) {
            let record = crossing[region * ways + way];
            if (record < CROSSING.pass) {
              record = graph.resolve(region, way);
              interfaces = graph.interfaces;
            }
            wall = WALL.slow;
            if (record >= 0 && entered) {
              const flags = interfaces[record + INTERFACE.flags];
              if (flags === 0 || (flags === FLAG.recordsArrival && light === 1)) {
                const finish = interfaces[record + INTERFACE.finish];
                if (finishSplit[finish] === SPLIT.spectral) {
                  // Total reflection of what it would pass is left to the long way.
                  wall = finishA[finish * wavelengths + wavelength];
                } else {
                  shares[SHARES.index] = n1;
                  shares[SHARES.cosine] = Math.abs(way < 2 ? dx : way < 4 ? dy : dz);
                  splitLight(scene, interfaces, record, wavelength, shares);
                  wall = shares[SHARES.reflected];
                }
              }
            }
            walls[way] = wall;
          }
          if (wall < 1) {
            if (wall === WALL.slow) break;
            closed = 0;
            unit = units[draw++];
            if (unit >= wall) break;
            unit = -1;
            if (draw > BLOCK.draws - LIMIT.draws) {
              fillUnits(random, units);
              draw = 0;
            }
          } else if (++closed > LIMIT.closedPath) break;
          if (way < 2) {
            wayX ^= 1;
            toX = acrossX;
            x = bound[b + way];
            dx = -dx;
            ix = -ix;
            sinceX = flown;
          } else if (way < 4) {
            wayY ^= 1;
            toY = acrossY;
            y = bound[b + way];
            dy = -dy;
            iy = -iy;
            sinceY = flown;
          } else {
            wayZ ^= 1;
            toZ = acrossZ;
            z = bound[b + way];
            dz = -dz;
            iz = -iz;
            sinceZ = flown;
          }
        }
        if (t !== Number.POSITIVE_INFINITY) {
          path += flown * inside;
          if (mu > 0) tau = toEnd * mu;
          x += (flown - sinceX) * dx;
          y += (flown - sinceY) * dy;
          z += (flown - sinceZ) * dz;
        }
      }

      // ---- absorbed on the way?
      if (absorbed) {
        const quanta = energyQuanta[wavelength];
        ray[0] = x;
        ray[1] = y;
        ray[2] = z;
        depositVoxel(scene, maps, half, light, wavelength, ray);
        const count = absorberCount[medium];
        let absorber = 0;
        if (count > 1) {
          const pick = units[draw++];
          const row = medium * maxAbsorbers;
          while (absorber < count - 1 && pick >= absorberShare[(row + absorber) * wavelengths + wavelength]) absorber++;
        }
        if (absorber === 0) {
          fate = ownerSlot[owner] + OWNER_SLOT.bulkPump + light;
          break;
        }
        absorptions++;
        if (light === 0) {
          vector[figures + FIGURE_PLACE.pumpAbsorbed]++;
          spectra[scene.spectrumAbsorbedPump + wavelength]++;
          pumpPath = path;
          path = 0;
        }
        const dye = medium * maxAbsorbers + absorber;
        const slot = dyeSlot[owner * maxAbsorbers + absorber];
        if (units[draw++] >= dyeYield[dye]) {
          fate = slot + DYE_SLOT.lostPump + light;
          break;
        }
        // Alias table (drawIndex, written out).
        const table = dyeSpectrum[dye] * wavelengths;
        const scaled = units[draw++] * wavelengths;
        const cell = scaled | 0;
        wavelength = scaled - cell < spectrumKeep[table + cell] ? cell : spectrumOther[table + cell];
        vector[2 * (slot + DYE_SLOT.stokesPump + light) + 1] += quanta - energyQuanta[wavelength];
        vector[figures + FIGURE_PLACE.emissions]++;
        spectra[scene.spectrumEmitted + wavelength]++;
        // Isotropic: Marsaglia, Ann. Math. Stat. 43 645 (1972).
        let p = 0;
        let q = 0;
        let r2 = 0;
        do {
          if (draw > BLOCK.draws - LIMIT.draws) {
            fillUnits(random, units);
            draw = 0;
          }
          p = 2 * units[draw++] - 1;
          q = 2 * units[draw++] - 1;
          r2 = p * p + q * q;
        } while (r2 >= 1);
        const f = 2 * Math.sqrt(1 - r2);
        dx = p * f;
        dy = q * f;
        dz = 1 - 2 * r2;
        ix = dx !== 0 ? 1 / dx : Number.NEGATIVE_INFINITY;
        iy = dy !== 0 ? 1 / dy : Number.NEGATIVE_INFINITY;
        iz = dz !== 0 ? 1 / dz : Number.NEGATIVE_INFINITY;
        tau = -Math.log(units[draw++]);
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
        if (lastFace < 0) fate = light === 0 ? SLOT.missed : -1;
        else if (!entered) fate = faceSlot[lastFace] + FACE_SLOT.reflectedAtEntry;
        else fate = faceSlot[lastFace] + FACE_SLOT.leftPump + light;
        break;
      }
      // ---- what lies beyond
      const at = region * ways + way;
      let record = crossing[at];
      if (record < 0) {
        if (record !== CROSSING.pass) {
          record = graph.resolve(region, way);
          interfaces = graph.interfaces;
        }
        if (record === CROSSING.pass) {
          region = neighbour[at];
          continue;
        }
      }
      if (++closed > LIMIT.closedPath) {
        if (mu > 0) tau = 0;
        else if (closed > 2 * LIMIT.closedPath) {
          fate = ownerSlot[owner] + OWNER_SLOT.trappedPump + light;
          break;
        }
      }
      const flags = interfaces[record + INTERFACE.flags];
      if ((flags & FLAG.freePlane) !== 0) {
        const recorder = interfaces[record + INTERFACE.recorder];
        ray[0] = x;
        ray[1] = y;
        ray[2] = z;
        ray[3] = dx;
        ray[4] = dy;
        ray[5] = dz;
        if (inAperture(scene, recorder, way, ray)) {
          recordCrossing(scene, grown, recorder, half, light, wavelength, ray);
          if (scene.detectorExit[recorder] === 1) {
            fate = light === 0 ? SLOT.exitPump : SLOT.exitEmitted;
            break;
          }
        }
        region = neighbour[at];
        continue;
      }
      if ((flags & FLAG.recordsArrival) !== 0 && light === 0) {
        ray[0] = x;
        ray[1] = y;
        ray[2] = z;
        ray[3] = dx;
        ray[4] = dy;
        ray[5] = dz;
        recordCrossing(scene, grown, interfaces[record + INTERFACE.recorder], half, light, wavelength, ray);
      }

      // ---- reflected, transmitted or absorbed?
      const axis = way < 6 ? way >> 1 : 3;
      let cosine: number;
      if (axis === 0) cosine = Math.abs(dx);
      else if (axis === 1) cosine = Math.abs(dy);
      else if (axis === 2) cosine = Math.abs(dz);
      else {
        ray[0] = x;
        ray[1] = y;
        ray[2] = z;
        ray[3] = dx;
        ray[4] = dy;
        ray[5] = dz;
        travelNormal(scene, way, ray, normal);
        cosine = normal[0] * dx + normal[1] * dy + normal[2] * dz;
      }
      shares[SHARES.index] = n1;
      shares[SHARES.cosine] = cosine;
      splitLight(scene, interfaces, record, wavelength, shares);
      const reflected = shares[SHARES.reflected];
      const transmitted = shares[SHARES.transmitted];
      const n2 = shares[SHARES.indexBeyond];
      let reflects = true;
      // Nothing is left to chance at a perfect reflector or a finish that passes everything.
      if (reflected < 1) {
        if (reflected === 0 && transmitted === 1) reflects = false;
        else {
          closed = 0;
          if (unit < 0) unit = units[draw++];
          reflects = unit < reflected;
          if (!reflects && unit >= reflected + transmitted) {
            fate = faceSlot[interfaces[record + INTERFACE.faceActing]] + FACE_SLOT.absorbedPump + light;
            break;
          }
        }
      }
      const finish = interfaces[record + INTERFACE.finish];

      if (reflects) {
        if (!entered) lastFace = interfaces[record + INTERFACE.faceActing];
        if ((flags & FLAG.spreads) === 0) {
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
      let gx = 0;
      let gy = 0;
      let gz = 0;
      if (axis === 0) gx = dx > 0 ? 1 : -1;
      else if (axis === 1) gy = dy > 0 ? 1 : -1;
      else if (axis === 2) gz = dz > 0 ? 1 : -1;
      else {
        gx = normal[0];
        gy = normal[1];
        gz = normal[2];
      }
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
        ray[0] = x;
        ray[1] = y;
        ray[2] = z;
        ray[3] = dx;
        ray[4] = dy;
        ray[5] = dz;
        recordCrossing(scene, grown, scene.faceRecorderOut[faceOut], half, light, wavelength, ray);
        if (scene.faceExit[faceOut] === 1) {
          fate = light === 0 ? SLOT.exitPump : SLOT.exitEmitted;
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
