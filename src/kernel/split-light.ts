/** How an interface divides light. */
import { fresnelReflectance } from '../optics/fresnel.js';
import { metalReflectance } from '../optics/metal-reflectance.js';
import { INTERFACE } from '../scene/region-graph.js';
import { FILM, type Scene, SPLIT, SPREAD } from '../scene/scene-layout.js';

/** Slots of the array `splitLight` reads and fills. */
export const enum SHARES {
  reflected = 0,
  transmitted = 1,
  index = 2,
  cosine = 3,
  indexBeyond = 4,
  // Polarised light only: shares of s and p, and the product of one amplitude with the other's conjugate.
  reflectedS = 5,
  reflectedP = 6,
  reflectedReal = 7,
  reflectedImaginary = 8,
  transmittedS = 9,
  transmittedP = 10,
  transmittedReal = 11,
  transmittedImaginary = 12,
  COUNT = 13,
}

/**
 * Reflected and transmitted share at the interface whose record starts at `record`; what is missing to 1 is absorbed there. Takes the
 * index and the cosine of incidence from `shares` and fills in the rest. Beyond the critical angle nothing gets out: what a finish would
 * pass is reflected, unless it is a Lambertian diffuser or a table of scatter, which make light forget its angle.
 */
export function splitLight(
  scene: Scene,
  interfaces: Int32Array,
  record: number,
  wavelength: number,
  shares: Float64Array,
): void {
  const { wavelengths } = scene;
  const index = shares[SHARES.index];
  const cosine = shares[SHARES.cosine];
  const beyond = scene.index[interfaces[record + INTERFACE.mediumBeyond] * wavelengths + wavelength];
  shares[SHARES.indexBeyond] = beyond;
  const finish = interfaces[record + INTERFACE.finish];
  const split = scene.finishSplit[finish];
  if (split === SPLIT.fresnel) {
    const reflected = index === beyond ? 0 : fresnelReflectance(index, beyond, cosine);
    shares[SHARES.reflected] = reflected;
    shares[SHARES.transmitted] = 1 - reflected;
    return;
  }
  if (split === SPLIT.stack) {
    stackShares(scene, interfaces[record + INTERFACE.film], wavelength, shares);
    return;
  }
  const row = finish * wavelengths + wavelength;
  if (split === SPLIT.spectral) {
    shares[SHARES.reflected] = scene.finishA[row];
    shares[SHARES.transmitted] = scene.finishB[row];
  } else if (split === SPLIT.metal) {
    shares[SHARES.reflected] = metalReflectance(index, scene.finishA[row], scene.finishB[row], cosine);
    shares[SHARES.transmitted] = 0;
  } else tableShares(scene, finish, wavelength, cosine, shares);
  const ratio = index / beyond;
  if (ratio > 1 && ratio * ratio * (1 - cosine * cosine) >= 1) {
    const spread = scene.finishTransmitSpread[finish];
    if (spread === SPREAD.lambertian || spread === SPREAD.table) return;
    const reflected = shares[SHARES.reflected] + shares[SHARES.transmitted];
    // Shares that miss 1 by a rounding absorb nothing.
    shares[SHARES.reflected] = reflected > 1 - 1e-12 ? 1 : reflected;
    shares[SHARES.transmitted] = 0;
  }
}

/** Linear between the whole degrees of a tabulated finish. */
function tableShares(scene: Scene, finish: number, wavelength: number, cosine: number, shares: Float64Array): void {
  const last = scene.tableAngles - 1;
  const position = (Math.acos(cosine < 1 ? cosine : 1) / (Math.PI / 2)) * last;
  const angle = Math.min(last - 1, Math.floor(position));
  const share = position - angle;
  const at = (scene.finishTable[finish] + wavelength) * scene.tableAngles + angle;
  shares[SHARES.reflected] = scene.tableReflectance[at] * (1 - share) + scene.tableReflectance[at + 1] * share;
  shares[SHARES.transmitted] = scene.tableTransmittance[at] * (1 - share) + scene.tableTransmittance[at + 1] * share;
}

/** Cubic between the nodes of a stack's table (scene/film-table.ts). Total reflection is the stack's own. */
function stackShares(scene: Scene, film: number, wavelength: number, shares: Float64Array): void {
  const { filmCells, filmNodes } = scene;
  const cosine = shares[SHARES.cosine] < 1 ? shares[SHARES.cosine] : 1;
  const ratio = shares[SHARES.index] / shares[SHARES.indexBeyond];
  const sine2 = ratio * ratio * (1 - cosine * cosine);
  const total = ratio > 1 && sine2 >= 1;
  let first = scene.filmBlock[film];
  let along = cosine;
  if (total) {
    first = scene.filmBeyond[film];
    if (first < 0) {
      shares[SHARES.reflected] = 1;
      shares[SHARES.transmitted] = 0;
      return;
    }
    // cos θ = cos θc · sin φ
    const sine = cosine / Math.sqrt(1 - 1 / (ratio * ratio));
    along = Math.asin(sine < 1 ? sine : 1) / (Math.PI / 2);
  } else if (ratio > 1) along = Math.sqrt(1 - sine2);
  const scaled = along * FILM.blocks;
  const block = scaled < FILM.blocks - 1 ? Math.floor(scaled) : FILM.blocks - 1;
  const group = Math.floor(wavelength / FILM.group);
  const entry = first + group * FILM.blocks + block;
  const cells = filmCells[entry];
  const place = (scaled - block) * cells;
  const node = Math.min(Math.max(0, Math.floor(place) - 1), cells - 3);
  const at = scene.filmStart[entry] + 2 * ((wavelength - group * FILM.group) * (cells + 1) + node);
  const t = place - node;
  const a = t - 1;
  const b = t - 2;
  const c = t - 3;
  const w0 = (-a * b * c) / 6;
  const w1 = 0.5 * t * b * c;
  const w2 = -0.5 * t * a * c;
  const w3 = (t * a * b) / 6;
  const passed = w0 * filmNodes[at] + w1 * filmNodes[at + 2] + w2 * filmNodes[at + 4] + w3 * filmNodes[at + 6];
  const taken = w0 * filmNodes[at + 1] + w1 * filmNodes[at + 3] + w2 * filmNodes[at + 5] + w3 * filmNodes[at + 7];
  const absorbed = taken < 0 ? 0 : taken > 1 ? 1 : taken;
  const most = 1 - absorbed;
  const transmitted = total || passed < 0 ? 0 : passed > most ? most : passed;
  shares[SHARES.transmitted] = transmitted;
  shares[SHARES.reflected] = most - transmitted;
}
