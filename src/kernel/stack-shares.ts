/** How a stack of thin films divides light, read from its table (scene/film-table.ts). */
import { FILM, POLARISED_FILM, type Scene } from '../scene/scene-layout.js';
import { SHARES } from './shares.js';
import { workOutStack } from './work-out-stack.js';

/**
 * Finds the four nodes about the angle, and their weights for a cubic through them. Total reflection is the stack's own.
 * @param channels numbers at each node
 * @returns place of the first of the nodes; −1 where all is reflected and no table says more, −2 where the table is too coarse
 */
function findNodes(scene: Scene, film: number, wavelength: number, channels: number, shares: Float64Array): number {
  const cosine = shares[SHARES.cosine] < 1 ? shares[SHARES.cosine] : 1;
  const ratio = shares[SHARES.index] / shares[SHARES.indexBeyond];
  const sine2 = ratio * ratio * (1 - cosine * cosine);
  let first = scene.filmBlock[film];
  let along = cosine;
  if (ratio > 1 && sine2 >= 1) {
    first = scene.filmBeyond[film];
    if (first < 0) return -1;
    // cos θ = cos θc · sin φ
    const sine = cosine / Math.sqrt(1 - 1 / (ratio * ratio));
    along = Math.asin(sine < 1 ? sine : 1) / (Math.PI / 2);
  } else if (ratio > 1) along = Math.sqrt(1 - sine2);
  const scaled = along * FILM.blocks;
  const block = scaled < FILM.blocks - 1 ? Math.floor(scaled) : FILM.blocks - 1;
  const group = Math.floor(wavelength / FILM.group);
  const entry = first + group * FILM.blocks + block;
  const cells = scene.filmCells[entry];
  if (cells === 0) return -2;
  const place = (scaled - block) * cells;
  const node = Math.min(Math.max(0, Math.floor(place) - 1), cells - 3);
  const t = place - node;
  const a = t - 1;
  const b = t - 2;
  const c = t - 3;
  shares[SHARES.weight] = (-a * b * c) / 6;
  shares[SHARES.weight + 1] = 0.5 * t * b * c;
  shares[SHARES.weight + 2] = -0.5 * t * a * c;
  shares[SHARES.weight + 3] = (t * a * b) / 6;
  return scene.filmStart[entry] + channels * ((wavelength - group * FILM.group) * (cells + 1) + node);
}

/** Of unpolarised light. Beyond the critical angle the table says that nothing passes. */
export function stackShares(scene: Scene, film: number, wavelength: number, shares: Float64Array): void {
  const at = findNodes(scene, film, wavelength, FILM.channels, shares);
  if (at < 0) {
    shares[SHARES.reflected] = 1;
    shares[SHARES.transmitted] = 0;
    return;
  }
  const { filmNodes } = scene;
  const w0 = shares[SHARES.weight];
  const w1 = shares[SHARES.weight + 1];
  const w2 = shares[SHARES.weight + 2];
  const w3 = shares[SHARES.weight + 3];
  const passed = w0 * filmNodes[at] + w1 * filmNodes[at + 2] + w2 * filmNodes[at + 4] + w3 * filmNodes[at + 6];
  const taken = w0 * filmNodes[at + 1] + w1 * filmNodes[at + 3] + w2 * filmNodes[at + 5] + w3 * filmNodes[at + 7];
  const absorbed = taken < 0 ? 0 : taken > 1 ? 1 : taken;
  const most = 1 - absorbed;
  const transmitted = passed < 0 ? 0 : passed > most ? most : passed;
  shares[SHARES.transmitted] = transmitted;
  shares[SHARES.reflected] = most - transmitted;
}

/** Of s and p light with their cross products, and the mean of both. */
export function polarisedStackShares(scene: Scene, film: number, wavelength: number, shares: Float64Array): void {
  const at = findNodes(scene, film, wavelength, POLARISED_FILM.COUNT, shares);
  if (at < 0) {
    workOutStack(scene, film, wavelength, shares);
    return;
  }
  shareOut(scene.filmNodes, at + POLARISED_FILM.transmittedS, shares, SHARES.reflectedS, SHARES.transmittedS);
  shareOut(scene.filmNodes, at + POLARISED_FILM.transmittedP, shares, SHARES.reflectedP, SHARES.transmittedP);
  blend(scene.filmNodes, at + POLARISED_FILM.reflectedReal, shares, SHARES.reflectedReal);
  blend(scene.filmNodes, at + POLARISED_FILM.reflectedImaginary, shares, SHARES.reflectedImaginary);
  blend(scene.filmNodes, at + POLARISED_FILM.transmittedReal, shares, SHARES.transmittedReal);
  blend(scene.filmNodes, at + POLARISED_FILM.transmittedImaginary, shares, SHARES.transmittedImaginary);
  shares[SHARES.reflected] = 0.5 * (shares[SHARES.reflectedS] + shares[SHARES.reflectedP]);
  shares[SHARES.transmitted] = 0.5 * (shares[SHARES.transmittedS] + shares[SHARES.transmittedP]);
}

/** Shares of s or of p, whose transmitted share lies at `at` and whose absorbed one two further. What is neither is reflected. */
function shareOut(nodes: Float32Array, at: number, shares: Float64Array, reflected: number, transmitted: number): void {
  blend(nodes, at, shares, transmitted);
  blend(nodes, at + POLARISED_FILM.absorbedS - POLARISED_FILM.transmittedS, shares, reflected);
  const taken = shares[reflected];
  const passed = shares[transmitted];
  const most = 1 - (taken < 0 ? 0 : taken > 1 ? 1 : taken);
  const passes = passed < 0 ? 0 : passed > most ? most : passed;
  shares[transmitted] = passes;
  shares[reflected] = most - passes;
}

/** One channel of the four nodes by their weights, into `slot`. */
function blend(nodes: Float32Array, at: number, shares: Float64Array, slot: number): void {
  shares[slot] =
    shares[SHARES.weight] * nodes[at] +
    shares[SHARES.weight + 1] * nodes[at + POLARISED_FILM.COUNT] +
    shares[SHARES.weight + 2] * nodes[at + 2 * POLARISED_FILM.COUNT] +
    shares[SHARES.weight + 3] * nodes[at + 3 * POLARISED_FILM.COUNT];
}
