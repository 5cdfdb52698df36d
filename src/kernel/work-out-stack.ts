/** A stack of thin films worked out where light meets it, for angles in which no table is fine enough. */
import { PRODUCTS, stackProducts } from '../optics/stack-products.js';
import { AMPLITUDES, amplitudesAt } from '../optics/thin-film-stack.js';
import type { Scene } from '../scene/scene-layout.js';
import { SHARES } from './shares.js';

const amplitudes = new Float64Array(AMPLITUDES.COUNT);
const products = new Float64Array(PRODUCTS.COUNT);
let films = room(32);

function room(layers: number) {
  return {
    count: 0,
    squareReal: new Float64Array(layers),
    squareImaginary: new Float64Array(layers),
    turns: new Float64Array(layers),
    absorbing: false,
  };
}

/** As `polarisedStackShares`. */
export function workOutStack(scene: Scene, film: number, wavelength: number, shares: Float64Array): void {
  takeLayers(scene, film, wavelength);
  const index = shares[SHARES.index];
  const beyond = shares[SHARES.indexBeyond];
  const cosine = shares[SHARES.cosine] < 1 ? shares[SHARES.cosine] : 1;
  amplitudesAt(films, index, beyond, cosine, amplitudes);
  const ratio = index / beyond;
  const total = ratio > 1 && ratio * ratio * (1 - cosine * cosine) >= 1;
  for (let p = 0; p < 2; p++) {
    const reflectance = amplitudes[AMPLITUDES.reflectanceS + p];
    const transmittance = amplitudes[AMPLITUDES.transmittanceS + p];
    // The two ways to ask whether it is total may differ in the last digit.
    shares[SHARES.reflectedS + p] = total ? reflectance + transmittance : reflectance;
    shares[SHARES.transmittedS + p] = total ? 0 : transmittance;
  }
  stackProducts(amplitudes, beyond / index, products);
  shares[SHARES.reflectedReal] = products[PRODUCTS.reflectedReal];
  shares[SHARES.reflectedImaginary] = products[PRODUCTS.reflectedImaginary];
  shares[SHARES.transmittedReal] = total ? 0 : products[PRODUCTS.transmittedReal];
  shares[SHARES.transmittedImaginary] = total ? 0 : products[PRODUCTS.transmittedImaginary];
  shares[SHARES.reflected] = 0.5 * (shares[SHARES.reflectedS] + shares[SHARES.reflectedP]);
  shares[SHARES.transmitted] = 0.5 * (shares[SHARES.transmittedS] + shares[SHARES.transmittedP]);
}

function takeLayers({ filmLayerStart, filmLayers, wavelengths }: Scene, film: number, wavelength: number): void {
  const first = filmLayerStart[film];
  const count = (filmLayerStart[film + 1] - first) / (3 * wavelengths);
  if (films.turns.length < count) films = room(count);
  films.count = count;
  films.absorbing = false;
  let at = first + 3 * count * wavelength;
  for (let j = 0; j < count; j++, at += 3) {
    films.squareReal[j] = filmLayers[at];
    films.squareImaginary[j] = filmLayers[at + 1];
    films.turns[j] = filmLayers[at + 2];
    if (filmLayers[at + 1] !== 0) films.absorbing = true;
  }
}
