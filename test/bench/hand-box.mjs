/**
 * The yardstick: a tracer written by hand for the one box of box-cell.mjs, with the tallies the general kernel keeps.
 *
 * In a box with specular walls a ray keeps the sizes ax, ay, az of its direction's components; only their signs sx, sy, sz change.
 * So three lengths of path tx, ty, tz are kept, at which it meets its next wall along x, y, z; a reflection adds one period to one of
 * them, and a position is worked out only where light is absorbed: x = sx · (half width − (tx − path) · ax). The same in the lid, where
 * light turns back or leaves. Analog, like the general kernel.
 */
import { closeGroup, emptyTally, spectralTables } from './hand-box-tallies.mjs';

/** Histories of one random stream. */
export const BATCH = 1024;

/** Reflectance of unpolarised light (Fresnel) from index n1 into n2, cosines c1 and c2. */
function fresnel(n1, c1, n2, c2) {
  const s = (n1 * c1 - n2 * c2) / (n1 * c1 + n2 * c2);
  const p = (n2 * c1 - n1 * c2) / (n2 * c1 + n1 * c2);
  return 0.5 * (s * s + p * p);
}

/** Traces one batch. Stands on nothing but its arguments, so that `writeOutDraws` may rewrite its text. */
function traceBox({ tables, tally, closeGroup, fresnel }, state, half, histories) {
  const LIQUID = 1.364;
  const GLASS = 1.52;
  const HX = 10;
  const HY = 4;
  const HZ = 4;
  const LID = 1;
  const TO_GLASS = LIQUID / GLASS;
  const TO_UNIT = 1 / 4294967296;
  // bits() is below P with the probability named.
  const P95 = (0.95 * 4294967296 - 2147483648) | 0;
  const P98 = (0.98 * 4294967296 - 2147483648) | 0;
  const P05 = (0.05 * 4294967296 - 2147483648) | 0;
  // Cells per mm, a hair less, so that a point on the far edge falls into the last cell.
  const PER_X = (40 - 1e-9) / 20;
  const PER_YZ = (16 - 1e-9) / 8;
  const { nm, freePath, energy, observerX, observerY, observerZ, keep, other } = tables;
  const { vector, launched, absorbedPump, emitted, exitSpectrum, angles } = tally;
  const { exitMap, arrivingMap, pumpVoxels, allVoxels } = tally.halves[half];
  // Fates, two counters each: 0 exit; pump left by 1 front, 2 back; emitted left by 3 front, 4 back; pump reflected at 5 front, 6 back;
  // absorbed at 7 left, 8 right, 9 bottom; left by the lid's 10 left, 11 right, 12 front, 13 back; lost in the dye 14 pump, 15 emitted;
  // Stokes heat of 16 pump, 17 emitted light. Then 16 figure sums, in the order of the general kernel.
  const FIG = 36;
  let inGroup = 0;
  let a = state[0];
  let b = state[1];
  let c = state[2];
  let n = state[3];
  let r = 0;
  // sfc32 as one expression.
  // biome-ignore format: it stays on a line
  // biome-ignore lint/complexity/noCommaOperator: so that it can stand in the place of each call
  // biome-ignore lint/suspicious/noAssignInExpressions: the same
  const bits = () => (r = (a + b + n) | 0, n = (n + 1) | 0, a = b ^ (b >>> 9), b = (c + (c << 3)) | 0, c = (((c << 21) | (c >>> 11)) + r) | 0, r);

  for (let history = 0; history < histories; history++) {
    let w = 0;
    let fate = 0;
    let absorptions = 0;
    let pumpPath = 0;
    let emittedPath = 0;
    let quanta = energy[0];
    // biome-ignore lint/suspicious/noConfusingLabels: the one place every fate leads to
    ended: {
      // ---- pump: along ±y at normal incidence, over 12 mm × 5 mm
      const back = bits() < 0 ? 1 : 0;
      let x = (bits() + 0.5) * (2 * TO_UNIT * 6);
      let z = (bits() + 0.5) * (2 * TO_UNIT * 2.5);
      let sy = back === 1 ? -1 : 1;
      vector[FIG]++;
      vector[FIG + 1] += quanta;
      launched[0]++;
      arrivingMap[640 * back + (((x + HX) * PER_X) | 0) + 40 * (((z + HZ) * PER_YZ) | 0)] += quanta;
      if (bits() >= P95) {
        fate = 5 + back;
        break ended;
      }
      let s = -Math.log(((bits() >>> 0) + 0.5) * TO_UNIT) * freePath[0];
      while (s >= 2 * HY) {
        s -= 2 * HY;
        pumpPath += 2 * HY;
        if (bits() >= P05) {
          fate = sy > 0 ? 2 : 1;
          break ended;
        }
        sy = -sy;
      }
      pumpPath += s;
      let y = sy * (s - HY);
      const voxel = (((x + HX) * PER_X) | 0) + 40 * ((((y + HY) * PER_YZ) | 0) + 16 * (((z + HZ) * PER_YZ) | 0));
      allVoxels[voxel] += quanta;
      pumpVoxels[voxel] += quanta;
      vector[FIG + 14]++;
      absorbedPump[0]++;
      absorptions = 1;
      if (bits() >= P95) {
        fate = 14;
        break ended;
      }

      for (let stokes = 16; ; stokes = 17) {
        // ---- emission: wavelength, direction (Marsaglia, Ann. Math. Stat. 43 645, 1972), path in the liquid up to the dye
        const u = ((bits() >>> 0) + 0.5) * (TO_UNIT * 351);
        const drawn = u | 0;
        w = u - drawn < keep[drawn] ? drawn : other[drawn];
        vector[2 * stokes + 1] += quanta - energy[w];
        quanta = energy[w];
        vector[FIG + 15]++;
        emitted[w]++;
        let p = 0;
        let q = 0;
        let r2 = 0;
        do {
          p = (bits() + 0.5) * (2 * TO_UNIT);
          q = (bits() + 0.5) * (2 * TO_UNIT);
          r2 = p * p + q * q;
        } while (r2 >= 1);
        const f = 2 * Math.sqrt(1 - r2);
        let sx = p < 0 ? -1 : 1;
        let sz = r2 > 0.5 ? -1 : 1;
        sy = q < 0 ? -1 : 1;
        const ax = Math.abs(p * f);
        const ay = Math.abs(q * f);
        const az = Math.abs(1 - 2 * r2) + 1e-12;
        const ix = 1 / ax;
        const iy = 1 / ay;
        const iz = 1 / az;
        let tx = (HX - sx * x) * ix;
        let ty = (HY - sy * y) * iy;
        let tz = (HZ - sz * z) * iz;
        const stop = -Math.log(((bits() >>> 0) + 0.5) * TO_UNIT) * freePath[w];
        const guidedY = LIQUID * LIQUID * (1 - ay * ay) >= 1; // beyond the critical angle of front and back
        let lidPath = 0;
        let azGlass = 0; // filled in at the first hit of the top
        let rTop = 0;

        for (;;) {
          if (tz < tx && tz < ty) {
            if (stop <= tz) break;
            if (sz < 0) {
              if (bits() >= P95) {
                emittedPath += tz + lidPath;
                fate = 9;
                break ended;
              }
              sz = 1;
              tz += 2 * HZ * iz;
              continue;
            }
            if (azGlass === 0) {
              azGlass = Math.sqrt(1 - TO_GLASS * TO_GLASS * (1 - az * az));
              rTop = fresnel(LIQUID, az, GLASS, azGlass); // the same from both sides
            }
            sz = -1;
            if (((bits() >>> 0) + 0.5) * TO_UNIT < rTop) {
              tz += 2 * HZ * iz;
              continue;
            }
            // ---- in the lid: lengths gx, gy, gz of path in glass
            const sine2 = LIQUID * LIQUID * (1 - az * az);
            const azAir = sine2 >= 1 ? 0 : Math.sqrt(1 - sine2);
            const rAir = sine2 >= 1 ? 2 : fresnel(GLASS, azGlass, 1, azAir);
            const axGlass = ax * TO_GLASS;
            const ayGlass = ay * TO_GLASS;
            const up = LID / azGlass;
            let gx = (tx - tz) / TO_GLASS;
            let gy = (ty - tz) / TO_GLASS;
            let gz = up;
            let rising = true;
            let rX = -1;
            let rY = -1;
            for (;;) {
              if (gz <= gx && gz <= gy) {
                if (rising) {
                  if (rAir < 1 && ((bits() >>> 0) + 0.5) * TO_UNIT >= rAir) {
                    fate = 0;
                    emittedPath += tz + lidPath + gz;
                    x = sx * (HX - (gx - gz) * axGlass);
                    y = sy * (HY - (gy - gz) * ayGlass);
                    exitMap[(((x + HX) * PER_X) | 0) + 40 * (((y + HY) * PER_YZ) | 0)] += quanta;
                    const turn = Math.atan2(sy * ay, sx * ax) / (2 * Math.PI);
                    const row = (Math.acos(Math.min(1, azAir)) * (45 / (Math.PI / 2 + 1e-9))) | 0;
                    angles[row * 72 + (((turn < 0 ? turn + 1 : turn) * (72 - 1e-9)) | 0)] += quanta;
                    exitSpectrum[w]++;
                    break ended;
                  }
                  rising = false;
                } else if (((bits() >>> 0) + 0.5) * TO_UNIT < rTop) rising = true;
                else break; // back into the liquid
                gz += up;
              } else if (gx < gy) {
                if (rX < 0) {
                  const beyond2 = GLASS * GLASS * (1 - axGlass * axGlass);
                  rX = beyond2 >= 1 ? 2 : fresnel(GLASS, axGlass, 1, Math.sqrt(1 - beyond2));
                }
                if (rX < 1 && ((bits() >>> 0) + 0.5) * TO_UNIT >= rX) {
                  emittedPath += tz + lidPath + gx;
                  fate = sx > 0 ? 11 : 10;
                  break ended;
                }
                gx += ((2 * HX) / TO_GLASS) * ix;
                sx = -sx;
              } else {
                if (rY < 0) {
                  const beyond2 = GLASS * GLASS * (1 - ayGlass * ayGlass);
                  rY = beyond2 >= 1 ? 2 : fresnel(GLASS, ayGlass, 1, Math.sqrt(1 - beyond2));
                }
                if (rY < 1 && ((bits() >>> 0) + 0.5) * TO_UNIT >= rY) {
                  emittedPath += tz + lidPath + gy;
                  fate = sy > 0 ? 13 : 12;
                  break ended;
                }
                gy += ((2 * HY) / TO_GLASS) * iy;
                sy = -sy;
              }
            }
            lidPath += gz;
            tx = tz + (gx - gz) * TO_GLASS;
            ty = tz + (gy - gz) * TO_GLASS;
            tz += 2 * HZ * iz;
          } else if (ty < tx) {
            if (stop <= ty) break;
            if (!guidedY && bits() >= P98) {
              emittedPath += ty + lidPath;
              fate = sy > 0 ? 4 : 3;
              break ended;
            }
            sy = -sy;
            ty += 2 * HY * iy;
          } else {
            if (stop <= tx) break;
            if (bits() >= P95) {
              emittedPath += tx + lidPath;
              fate = sx > 0 ? 8 : 7;
              break ended;
            }
            sx = -sx;
            tx += 2 * HX * ix;
          }
        }

        // ---- absorbed by the dye
        emittedPath += stop + lidPath;
        x = sx * (HX - (tx - stop) * ax);
        y = sy * (HY - (ty - stop) * ay);
        z = sz * (HZ - (tz - stop) * az);
        const voxel = (((x + HX) * PER_X) | 0) + 40 * ((((y + HY) * PER_YZ) | 0) + 16 * (((z + HZ) * PER_YZ) | 0));
        allVoxels[voxel] += quanta;
        absorptions++;
        if (bits() >= P95) {
          fate = 15;
          break ended;
        }
      }
    }

    // ---- the end of the history
    vector[2 * fate]++;
    vector[2 * fate + 1] += quanta;
    vector[FIG + 10] += absorptions;
    if (absorptions > 1) vector[FIG + 11] += absorptions - 1;
    vector[FIG + 12] += pumpPath;
    vector[FIG + 13] += emittedPath;
    tally.absorptionCounts[Math.min(absorptions, 63)]++;
    if (fate === 0) {
      vector[FIG + 2]++;
      vector[FIG + 3] += quanta;
      vector[FIG + 4] += quanta * observerX[w];
      vector[FIG + 5] += quanta * observerY[w];
      vector[FIG + 6] += quanta * observerZ[w];
      vector[FIG + 7] += nm[w];
      tally.reabsorptionCounts[Math.min(absorptions - 1, 63)]++;
      tally.pathCounts[Math.min(99, ((pumpPath + emittedPath) * 0.5) | 0)]++;
    }
    if (++inGroup === 64) {
      closeGroup(tally, inGroup);
      inGroup = 0;
    }
  }
  if (inGroup > 0) closeGroup(tally, inGroup);
}

/** Puts the text of the generator in the place of every `bits()`: called, it would keep its state in memory instead of registers. */
function writeOutDraws(tracer) {
  const text = tracer.toString();
  const generator = /const bits = \(\) => (\(.*\));\n/.exec(text);
  if (generator === null) throw new Error('the generator was not found in the text of the tracer');
  return new Function(`return ${text.replace(generator[0], '').replaceAll('bits()', generator[1])}`)();
}

/** @returns a function that traces batch `batch` of BATCH histories and gives back how many photons left through the exit. */
export function createHandBox() {
  const box = { tables: spectralTables(), tally: emptyTally(), closeGroup, fresnel };
  const trace = writeOutDraws(traceBox);
  return (batch) => {
    box.tally.vector.fill(0);
    box.tally.before.fill(0);
    trace(box, batchState(batch), batch & 1, BATCH);
    return box.tally.vector[0];
  };
}

/** State of the generator for a batch: its number, stirred (finaliser of MurmurHash3, Appleby, public domain). */
function batchState(batch) {
  return Int32Array.from({ length: 4 }, (_, i) => {
    let h = Math.imul(4 * batch + i + 1, 0x9e3779b1);
    h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
    h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
    return h ^ (h >>> 16);
  });
}
