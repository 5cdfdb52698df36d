/**
 * The hot loop: light between axis planes from one event that needs help to the next. It calls nothing and keeps what it needs in locals,
 * so that the machine code has registers to spare; integer sums end in `| 0`, which spares it overflow checks.
 * That is why this file is long: split into functions, the loop spills its locals at every call and fractions are boxed on the way (DEVELOPERS.md, D7).
 */
import { BLOCK } from '../numerics/random-stream.js';
import { CROSSING, FLAG, INTERFACE, type RegionGraph } from '../scene/region-graph.js';
import { DYE_SLOT, FACE_SLOT, OWNER_SLOT, PHASE, type Scene, SLOT, SPLIT } from '../scene/scene-layout.js';
import { FIGURE_COUNT, FIGURE_PLACE } from '../tallies/run-tallies.js';
import { NOW, RAY } from './photon.js';
import { REFLECTED, WALL } from './wall.js';

/** Why a flight stops, where no fate is the reason. */
export const enum STOP {
  /** Light is at an interface (`now`: way) that `meetInterface` must see to. */
  boundary = -1,
  /** The wall ahead is of a kind that is worked out elsewhere. */
  wall = -2,
  /** A block of random numbers is used up, or that of deposits is full. */
  block = -3,
  /** Among other surfaces than axis planes: the next boundary is wanted. */
  again = -4,
  /** Light has come to a region whose ways out are to be resolved. Nothing has changed: results must not tell who was there first. */
  region = -5,
  /** Something is wrong with the program. */
  defect = -6,
}

/**
 * After this many boundaries in a row at which nothing was left to chance, light goes round a closed path for good. Where
 * something on the path absorbs, that is its fate, as it would be after more turns; where nothing does within as many
 * boundaries again, it is `trapped`.
 */
export const enum LIMIT {
  closedPath = 20_000,
  /** Draws are made in blocks of BLOCK.draws; an event begins on this number of one at the latest. */
  lastDraw = 448,
  lastDeposit = 500,
}

/** What a flight reads and writes besides scene and regions. It outlives tallies, so that a run's machine code may take it for fixed. */
export interface FlightDesk {
  /** Photon in hand. */
  readonly ray: Float64Array;
  readonly now: Int32Array;
  /** Blocks of random numbers. */
  readonly units: Float64Array;
  readonly exponentials: Float64Array;
  /** Counts since the last group was closed, laid out as in a batch's tally. */
  readonly vector: Float64Array;
  readonly spectra: Float64Array;
  /** Energy absorbed, quanta, and its place in the maps: `now[NOW.deposits]` of them. */
  readonly depositCell: Int32Array;
  readonly depositQuanta: Float64Array;
}

export function createFlightDesk(scene: Scene): FlightDesk {
  return {
    ray: new Float64Array(RAY.COUNT),
    now: new Int32Array(NOW.COUNT),
    units: new Float64Array(BLOCK.draws),
    exponentials: new Float64Array(BLOCK.draws),
    vector: new Float64Array(2 * scene.slots + FIGURE_COUNT),
    spectra: new Float64Array(scene.spectrumCells),
    depositCell: new Int32Array(BLOCK.draws),
    depositQuanta: new Float64Array(BLOCK.draws),
  };
}

/** @returns a function that flies the photon at the desk on; what it returns is a fate's slot, or one of STOP. */
export function createFlight(scene: Scene, graph: RegionGraph, desk: FlightDesk): () => number {
  const wavelengths = scene.wavelengths;
  const families2 = 2 * scene.families;
  const ways = graph.ways;
  const others = graph.stepwise;
  const maxAbsorbers = scene.maxAbsorbers;
  const { index, attenuation, absorberCount, absorberShare, dyeYield, diluteYield, dyeSpectrum } = scene;
  const { energyQuanta, faceSlot, ownerSlot, dyeSlot, faceRecorderOut } = scene;
  /** Where nothing scatters, nothing is asked. */
  const turbid = scene.maxScatterers > 0;
  const { maxScatterers, scatterShare, scattererCount, scattererShare, phaseTable, phaseValue, phaseCosine } = scene;
  const { finishSplit, finishA, finishB, spectrumKeep, spectrumOther } = scene;
  const { bound, neighbour, crossing, walls, wallsSince } = graph;
  const { ray, now, units, exponentials, vector, spectra, depositCell, depositQuanta } = desk;
  const figures = 2 * scene.slots;
  // The voxel maps show what holds dye; where nothing does, everything.
  const leastAbsorbers = scene.maxAbsorbers > 1 ? 1 : 0;
  const { spectrumAbsorbedPump, spectrumEmitted, voxelPumpMap, voxelEmittedMap } = scene;
  const [voxelX, voxelY, voxelZ] = scene.voxelOrigin;
  const [perVoxelX, perVoxelY, perVoxelZ] = scene.voxelScale;
  const [voxelsX, voxelsY, voxelsZ] = scene.voxelCells;

  return function fly(): number {
    const interfaces = graph.interfaces;
    let wavelength = now[NOW.wavelength];
    let region = now[NOW.region];
    let medium = now[NOW.medium];
    let owner = now[NOW.owner];
    let light = now[NOW.light];
    let entered = now[NOW.entered];
    let lastFace = now[NOW.lastFace];
    let closed = now[NOW.closed];
    let absorptions = now[NOW.absorptions];
    let draw = now[NOW.draw];
    let exponential = now[NOW.exponential];
    let era = now[NOW.era];
    let deposits = now[NOW.deposits];
    let bentAxis = now[NOW.bentAxis];
    let x = ray[RAY.x];
    let y = ray[RAY.y];
    let z = ray[RAY.z];
    let dx = ray[RAY.dx];
    let dy = ray[RAY.dy];
    let dz = ray[RAY.dz];
    let tau = ray[RAY.depth];
    let path = ray[RAY.path];
    let ix = ray[RAY.perDx];
    let iy = ray[RAY.perDy];
    let iz = ray[RAY.perDz];
    /** Way out that lies ahead on each axis. */
    let wayX = dx >= 0 ? 1 : 0;
    let wayY = dy >= 0 ? 3 : 2;
    let wayZ = dz >= 0 ? 5 : 4;
    let mu = attenuation[(Math.imul(medium, wavelengths) + wavelength) | 0];
    let n1 = index[(Math.imul(medium, wavelengths) + wavelength) | 0];
    let way = -1;
    /** Number drawn for the boundary ahead. */
    let unit = -1;
    /** A fate, or why the flight stops. */
    let end: number = STOP.defect;
    let fresh = true;

    for (;;) {
      // ---- flight to the next boundary that matters
      let absorbed = false;
      if (others) {
        if (!fresh) {
          end = STOP.again;
          break;
        }
        fresh = false;
        let t = ray[RAY.ahead];
        way = now[NOW.way];
        if (mu * t >= tau) {
          absorbed = true;
          t = tau / mu;
        }
        if (absorbed || way >= 0) {
          x += t * dx;
          y += t * dy;
          z += t * dz;
          tau -= mu * t;
          if (owner !== 0) path += t;
        }
      } else {
        // Between axis planes specular light keeps the sizes of its direction's components: the three distances are all it
        // needs, and each wall does the same to it every time.
        const since = wallsSince[region];
        if (since < 0) {
          end = STOP.region;
          break;
        }
        if (draw > LIMIT.lastDraw) {
          end = STOP.block;
          break;
        }
        const b = Math.imul(region, families2);
        const ownWalls = Math.imul(region, 6 * WALL.STRIDE);
        let toX = (bound[(b + wayX) | 0] - x) * ix;
        let toY = (bound[(b + wayY) | 0] - y) * iy;
        let toZ = (bound[(b + wayZ) | 0] - z) * iz;
        if (since !== era) {
          wallsSince[region] = era;
          walls[ownWalls] = REFLECTED.unknown;
          walls[(ownWalls + WALL.STRIDE) | 0] = REFLECTED.unknown;
          walls[(ownWalls + 2 * WALL.STRIDE) | 0] = REFLECTED.unknown;
          walls[(ownWalls + 3 * WALL.STRIDE) | 0] = REFLECTED.unknown;
          walls[(ownWalls + 4 * WALL.STRIDE) | 0] = REFLECTED.unknown;
          walls[(ownWalls + 5 * WALL.STRIDE) | 0] = REFLECTED.unknown;
        }
        let toEnd = mu > 0 ? tau / mu : Number.POSITIVE_INFINITY;
        let flown = 0;
        // Flown when a coordinate was last known exactly.
        let sinceX = 0;
        let sinceY = 0;
        let sinceZ = 0;
        let w = 0;
        let t = 0;
        end = 0;
        unit = -1;
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
          if (way < 0) {
            if (t === Number.POSITIVE_INFINITY) break;
            flown += t;
            toEnd = 0;
            absorbed = true;
            break;
          }
          w = (ownWalls + Math.imul(way, WALL.STRIDE)) | 0;
          let wall = walls[w];
          if (wall < 0) {
            const record = crossing[(Math.imul(region, 6) + way) | 0];
            wall = REFLECTED.slow;
            walls[w] = REFLECTED.slow;
            if (record >= 0) {
              const flags = interfaces[(record + INTERFACE.flags) | 0];
              const finish = interfaces[(record + INTERFACE.finish) | 0];
              if (entered === 1 && (flags === 0 || (flags === FLAG.recordsArrival && light === 1))) {
                const split = finishSplit[finish];
                if (split > SPLIT.spectral) {
                  walls[w] = REFLECTED.unknown;
                  end = STOP.wall;
                  break;
                }
                let passes = 1;
                if (split === SPLIT.spectral) {
                  const entry = (Math.imul(finish, wavelengths) + wavelength) | 0;
                  wall = finishA[entry];
                  passes = finishB[entry];
                }
                let ratio = 0;
                let cosine2 = 0;
                if (passes > 0) {
                  const n2 =
                    index[(Math.imul(interfaces[(record + INTERFACE.mediumBeyond) | 0], wavelengths) + wavelength) | 0];
                  const cosine1 = Math.abs(way < 2 ? dx : way < 4 ? dy : dz);
                  ratio = n1 / n2;
                  const sine2 = ratio * ratio * (1 - cosine1 * cosine1);
                  if (sine2 >= 1) {
                    // Beyond the critical angle nothing gets out: what a finish would pass is reflected.
                    wall += passes;
                    passes = 0;
                  } else {
                    cosine2 = Math.sqrt(1 - sine2);
                    if (split === SPLIT.fresnel && n1 !== n2) {
                      // Fresnel's equations (fresnelReflectance) over one denominator.
                      const across = n1 * cosine1;
                      const acrossBeyond = n2 * cosine2;
                      const along = n1 * cosine2;
                      const alongBeyond = n2 * cosine1;
                      const s = (across - acrossBeyond) * (alongBeyond + along);
                      const p = (alongBeyond - along) * (across + acrossBeyond);
                      const q = (across + acrossBeyond) * (alongBeyond + along);
                      wall = (0.5 * (s * s + p * p)) / (q * q);
                      passes = 1 - wall;
                    }
                  }
                }
                walls[w] = wall;
                walls[(w + WALL.reach) | 0] = wall + passes;
                walls[(w + WALL.cosine) | 0] = cosine2;
                const faceOut = interfaces[(record + INTERFACE.faceOut) | 0];
                walls[(w + WALL.bend) | 0] = passes > 0 && (faceOut < 0 || faceRecorderOut[faceOut] < 0) ? ratio : 0;
              }
            }
          }
          flown += t;
          toX -= t;
          toY -= t;
          toZ -= t;
          toEnd -= t;
          if (wall < 1) {
            if (wall === REFLECTED.slow) break;
            closed = 0;
            unit = units[draw];
            draw = (draw + 1) | 0;
            if (unit >= wall) break;
            unit = -1;
          } else closed = (closed + 1) | 0;
          if (closed > LIMIT.closedPath) break;
          if (way < 2) {
            wayX ^= 1;
            toX = (bound[(b + 1) | 0] - bound[b]) * Math.abs(ix);
            x = bound[(b + way) | 0];
            dx = -dx;
            ix = -ix;
            sinceX = flown;
          } else if (way < 4) {
            wayY ^= 1;
            toY = (bound[(b + 3) | 0] - bound[(b + 2) | 0]) * Math.abs(iy);
            y = bound[(b + way) | 0];
            dy = -dy;
            iy = -iy;
            sinceY = flown;
          } else {
            wayZ ^= 1;
            toZ = (bound[(b + 5) | 0] - bound[(b + 4) | 0]) * Math.abs(iz);
            z = bound[(b + way) | 0];
            dz = -dz;
            iz = -iz;
            sinceZ = flown;
          }
          if (draw > LIMIT.lastDraw) {
            end = STOP.block;
            break;
          }
        }
        if (owner !== 0) path += flown;
        if (mu > 0) tau = toEnd * mu;
        x += (flown - sinceX) * dx;
        y += (flown - sinceY) * dy;
        z += (flown - sinceZ) * dz;
        if (end < 0) break;
        if (unit >= 0) {
          // Through the wall, or absorbed in it.
          const at = (Math.imul(region, 6) + way) | 0;
          const record = crossing[at];
          if (unit >= walls[(w + WALL.reach) | 0]) {
            end = faceSlot[interfaces[(record + INTERFACE.faceActing) | 0]] + FACE_SLOT.absorbedPump + light;
            break;
          }
          const bend = walls[(w + WALL.bend) | 0];
          if (bend > 0) {
            if (bend !== 1) {
              const cosine = walls[(w + WALL.cosine) | 0];
              const unbend = 1 / bend;
              const perCosine = 1 / cosine;
              dx *= bend;
              dy *= bend;
              dz *= bend;
              ix *= unbend;
              iy *= unbend;
              iz *= unbend;
              const axis = way >> 1;
              const sign = 2 * (way & 1) - 1;
              if (axis === 0) {
                dx = sign * cosine;
                ix = sign * perCosine;
              } else if (axis === 1) {
                dy = sign * cosine;
                iy = sign * perCosine;
              } else {
                dz = sign * cosine;
                iz = sign * perCosine;
              }
              if (bentAxis < 0) bentAxis = axis;
              else if (bentAxis !== axis) {
                era = (era + 1) | 0;
                bentAxis = -1;
              }
            }
            region = neighbour[at];
            medium = interfaces[(record + INTERFACE.mediumBeyond) | 0];
            owner = interfaces[(record + INTERFACE.ownerBeyond) | 0];
            const faceOut = interfaces[(record + INTERFACE.faceOut) | 0];
            lastFace = faceOut >= 0 ? faceOut : interfaces[(record + INTERFACE.faceIn) | 0];
            const row = (Math.imul(medium, wavelengths) + wavelength) | 0;
            mu = attenuation[row];
            n1 = index[row];
            continue;
          }
        }
      }

      if (absorbed && turbid) {
        const scatters = scatterShare[(Math.imul(medium, wavelengths) + wavelength) | 0];
        if (scatters > 0) {
          const pick = units[draw];
          draw = (draw + 1) | 0;
          if (pick < scatters) {
            // Turned aside: still the same light.
            let row = (Math.imul(Math.imul(medium, maxScatterers), wavelengths) + wavelength) | 0;
            if (scattererCount[medium] > 1) {
              const which = units[draw];
              draw = (draw + 1) | 0;
              while (which >= scattererShare[row]) row = (row + wavelengths) | 0;
            }
            const value = phaseValue[row];
            const unit1 = units[draw];
            draw = (draw + 1) | 0;
            let table = phaseTable[row];
            let cosine = 2 * unit1 - 1;
            if (table === PHASE.henyeyGreenstein) {
              // Henyey & Greenstein, Astrophys. J. 93 70 (1941), inverted; near 0 the closed form divides 0 by 0.
              if (value > 1e-6 || value < -1e-6) {
                const lean = (1 - value * value) / (1 + value * cosine);
                cosine = (1 + value * value - lean * lean) / (2 * value);
              }
            } else {
              if (units[draw] < value) table = (table + PHASE.cells + 1) | 0;
              draw = (draw + 1) | 0;
              const place = unit1 * PHASE.cells;
              const cell = place | 0;
              const low = phaseCosine[(table + cell) | 0];
              cosine = low + (place - cell) * (phaseCosine[(table + cell + 1) | 0] - low);
            }
            let sideP = 0;
            let sideQ = 0;
            let side2 = 0;
            do {
              sideP = 2 * units[draw] - 1;
              sideQ = 2 * units[(draw + 1) | 0] - 1;
              draw = (draw + 2) | 0;
              side2 = sideP * sideP + sideQ * sideQ;
            } while (side2 >= 1);
            // About the direction so far, in the frame of Duff et al., J. Comput. Graph. Tech. 6 1 (2017).
            const across = Math.sqrt(Math.max(0, 1 - cosine * cosine) / side2);
            const a = across * sideP;
            const c = across * sideQ;
            const sign = dz >= 0 ? 1 : -1;
            const f = -1 / (sign + dz);
            const g = dx * dy * f;
            const nx = a * (1 + sign * dx * dx * f) + c * g + cosine * dx;
            const ny = a * sign * g + c * (sign + dy * dy * f) + cosine * dy;
            const nz = -a * sign * dx - c * dy + cosine * dz;
            const norm = 1 / Math.sqrt(nx * nx + ny * ny + nz * nz);
            dx = nx * norm;
            dy = ny * norm;
            dz = nz * norm;
            ix = dx !== 0 ? 1 / dx : Number.POSITIVE_INFINITY;
            iy = dy !== 0 ? 1 / dy : Number.POSITIVE_INFINITY;
            iz = dz !== 0 ? 1 / dz : Number.POSITIVE_INFINITY;
            wayX = dx >= 0 ? 1 : 0;
            wayY = dy >= 0 ? 3 : 2;
            wayZ = dz >= 0 ? 5 : 4;
            tau = exponentials[exponential];
            exponential = (exponential + 1) | 0;
            closed = 0;
            bentAxis = -1;
            era = (era + 1) | 0;
            if (draw > LIMIT.lastDraw || exponential === BLOCK.draws) {
              end = STOP.block;
              break;
            }
            continue;
          }
        }
      }
      if (absorbed) {
        const quanta = energyQuanta[wavelength];
        const u = (x - voxelX) * perVoxelX;
        const v = (y - voxelY) * perVoxelY;
        const s = (z - voxelZ) * perVoxelZ;
        const mapped = absorberCount[medium] > leastAbsorbers;
        if (mapped && u >= 0 && v >= 0 && s >= 0 && u < voxelsX && v < voxelsY && s < voxelsZ) {
          const row = Math.imul(voxelsX, ((v | 0) + Math.imul(voxelsY, s | 0)) | 0);
          depositCell[deposits] = ((light === 0 ? voxelPumpMap : voxelEmittedMap) + row + (u | 0)) | 0;
          depositQuanta[deposits] = quanta;
          deposits = (deposits + 1) | 0;
        }
        const count = absorberCount[medium];
        const dyes = Math.imul(medium, maxAbsorbers);
        let absorber = 0;
        if (count > 1) {
          const pick = units[draw];
          draw = (draw + 1) | 0;
          while (
            absorber < count - 1 &&
            pick >= absorberShare[(Math.imul((dyes + absorber) | 0, wavelengths) + wavelength) | 0]
          ) {
            absorber = (absorber + 1) | 0;
          }
        }
        if (absorber === 0) {
          end = ownerSlot[owner] + OWNER_SLOT.bulkPump + light;
          break;
        }
        absorptions = (absorptions + 1) | 0;
        if (light === 0) {
          vector[figures + FIGURE_PLACE.pumpAbsorbed]++;
          spectra[(spectrumAbsorbedPump + wavelength) | 0]++;
          ray[RAY.pumpPath] = path;
          path = 0;
        }
        const dye = (dyes + absorber) | 0;
        const slot = dyeSlot[(Math.imul(owner, maxAbsorbers) + absorber) | 0];
        const survival = units[draw];
        draw = (draw + 1) | 0;
        if (survival >= dyeYield[dye]) {
          end = (survival < diluteYield[dye] ? slot + DYE_SLOT.quenchedPump : slot + DYE_SLOT.lostPump) + light;
          break;
        }
        // Alias table (drawIndex); cell or other, by arithmetic: a comparison would often be guessed wrong.
        const table = Math.imul(dyeSpectrum[dye], wavelengths);
        const scaled = units[draw] * wavelengths;
        draw = (draw + 1) | 0;
        const cell = scaled | 0;
        const other = (1 + (scaled - cell - spectrumKeep[(table + cell) | 0])) | 0;
        wavelength = (cell + Math.imul(other, (spectrumOther[(table + cell) | 0] - cell) | 0)) | 0;
        vector[(2 * (slot + DYE_SLOT.stokesPump + light) + 1) | 0] += quanta - energyQuanta[wavelength];
        vector[figures + FIGURE_PLACE.emissions]++;
        spectra[(spectrumEmitted + wavelength) | 0]++;
        // Isotropic: Marsaglia, Ann. Math. Stat. 43 645 (1972).
        let unitP = 0;
        let unitQ = 0;
        let p = 0;
        let q = 0;
        let r2 = 0;
        do {
          // The end of the block is for these: it lasts but once in 10^19.
          unitP = 2 * units[draw];
          unitQ = 2 * units[(draw + 1) | 0];
          draw = (draw + 2) | 0;
          p = unitP - 1;
          q = unitQ - 1;
          r2 = p * p + q * q;
        } while (r2 >= 1);
        const f = 2 * Math.sqrt(1 - r2);
        dx = p * f;
        dy = q * f;
        dz = 1 - 2 * r2;
        // Neither p nor q is ever 0. The signs as whole numbers: a comparison would be guessed wrong every other time.
        ix = 1 / dx;
        iy = 1 / dy;
        iz = dz !== 0 ? 1 / dz : Number.POSITIVE_INFINITY;
        wayX = unitP | 0;
        wayY = (2 + (unitQ | 0)) | 0;
        wayZ = dz !== 0 ? (5 - ((2 * r2) | 0)) | 0 : 5;
        tau = exponentials[exponential];
        exponential = (exponential + 1) | 0;
        const row = (Math.imul(medium, wavelengths) + wavelength) | 0;
        mu = attenuation[row];
        n1 = index[row];
        light = 1;
        entered = 1;
        closed = 0;
        bentAxis = -1;
        era = (era + 1) | 0;
        if (draw > LIMIT.lastDraw || exponential === BLOCK.draws || deposits > LIMIT.lastDeposit) {
          end = STOP.block;
          break;
        }
        continue;
      }
      if (way < 0) {
        // Nothing ahead: light is in the surroundings for good.
        if (owner !== 0 || Number.isNaN(dx)) end = STOP.defect;
        else if (lastFace < 0) end = light === 0 ? SLOT.missed : STOP.defect;
        else if (entered === 0) end = faceSlot[lastFace] + FACE_SLOT.reflectedAtEntry;
        else end = faceSlot[lastFace] + FACE_SLOT.leftPump + light;
        break;
      }
      const at = (Math.imul(region, ways) + way) | 0;
      if (crossing[at] === CROSSING.pass) {
        region = neighbour[at];
        continue;
      }
      closed = (closed + 1) | 0;
      if (closed > LIMIT.closedPath) {
        if (mu > 0) tau = 0;
        else if (closed > 2 * LIMIT.closedPath) {
          end = ownerSlot[owner] + OWNER_SLOT.trappedPump + light;
          break;
        }
      }
      if (unit < 0) {
        unit = units[draw];
        draw = (draw + 1) | 0;
      }
      end = STOP.boundary;
      break;
    }

    now[NOW.wavelength] = wavelength;
    now[NOW.region] = region;
    now[NOW.medium] = medium;
    now[NOW.owner] = owner;
    now[NOW.light] = light;
    now[NOW.entered] = entered;
    now[NOW.lastFace] = lastFace;
    now[NOW.closed] = closed;
    now[NOW.absorptions] = absorptions;
    now[NOW.draw] = draw;
    now[NOW.exponential] = exponential;
    now[NOW.era] = era;
    now[NOW.deposits] = deposits;
    now[NOW.bentAxis] = bentAxis;
    now[NOW.way] = way;
    ray[RAY.x] = x;
    ray[RAY.y] = y;
    ray[RAY.z] = z;
    ray[RAY.dx] = dx;
    ray[RAY.dy] = dy;
    ray[RAY.dz] = dz;
    ray[RAY.perDx] = ix;
    ray[RAY.perDy] = iy;
    ray[RAY.perDz] = iz;
    ray[RAY.depth] = tau;
    ray[RAY.path] = path;
    ray[RAY.index] = n1;
    ray[RAY.unit] = unit;
    return end;
  };
}
