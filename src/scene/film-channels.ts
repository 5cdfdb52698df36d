/** What the table of a stack keeps of its s and p amplitudes. */
import { PRODUCTS, stackProducts } from '../optics/stack-products.js';
import { AMPLITUDES } from '../optics/thin-film-stack.js';
import { FILM, POLARISED_FILM } from './scene-layout.js';

export interface FilmChannels {
  readonly count: number;
  /** Whether phases are kept, which a stack without absorption has beyond the critical angle too, and not the same both ways. */
  readonly phases: boolean;
  /** Most intervals of a block whose half is tried against it. */
  readonly most: number;
  /** Whether the kernel can work out the stack itself in blocks that would need more. */
  readonly direct: boolean;
  /**
   * Writes `count` numbers at `at`, each smooth in angle.
   * @param ratio index beyond over that before; @param travels whether light travels beyond
   */
  readonly pick: (amplitudes: Float64Array, ratio: number, travels: boolean, nodes: Float32Array, at: number) => void;
}

/** Mean of s and p: share transmitted, share absorbed. What is neither is reflected, so that shares close without rounding. */
export const UNPOLARISED: FilmChannels = {
  count: FILM.channels,
  phases: false,
  most: 256,
  direct: false,
  pick(amplitudes, _ratio, _travels, nodes, at) {
    const passed = 0.5 * (amplitudes[AMPLITUDES.transmittanceS] + amplitudes[AMPLITUDES.transmittanceP]);
    const back = 0.5 * (amplitudes[AMPLITUDES.reflectanceS] + amplitudes[AMPLITUDES.reflectanceP]);
    nodes[at] = passed;
    nodes[at + 1] = Math.max(0, 1 - passed - back);
  },
};

const products = new Float64Array(PRODUCTS.COUNT);

/** Shares of s and p apart, and the products that turn their phases. */
export const POLARISED: FilmChannels = {
  count: POLARISED_FILM.COUNT,
  phases: true,
  most: 64,
  direct: true,
  pick(amplitudes, ratio, travels, nodes, at) {
    const passedS = amplitudes[AMPLITUDES.transmittanceS];
    const passedP = amplitudes[AMPLITUDES.transmittanceP];
    nodes[at + POLARISED_FILM.transmittedS] = passedS;
    nodes[at + POLARISED_FILM.transmittedP] = passedP;
    nodes[at + POLARISED_FILM.absorbedS] = Math.max(0, 1 - passedS - amplitudes[AMPLITUDES.reflectanceS]);
    nodes[at + POLARISED_FILM.absorbedP] = Math.max(0, 1 - passedP - amplitudes[AMPLITUDES.reflectanceP]);
    stackProducts(amplitudes, ratio, products);
    nodes[at + POLARISED_FILM.reflectedReal] = products[PRODUCTS.reflectedReal];
    nodes[at + POLARISED_FILM.reflectedImaginary] = products[PRODUCTS.reflectedImaginary];
    nodes[at + POLARISED_FILM.transmittedReal] = travels ? products[PRODUCTS.transmittedReal] : 0;
    nodes[at + POLARISED_FILM.transmittedImaginary] = travels ? products[PRODUCTS.transmittedImaginary] : 0;
  },
};
