/** How an interface divides light. */
import { fresnelReflectance } from '../optics/fresnel.js';
import { metalReflectance } from '../optics/metal-reflectance.js';
import { INTERFACE } from '../scene/region-graph.js';
import { type Scene, SPLIT, SPREAD } from '../scene/scene-layout.js';
import { SHARES } from './shares.js';
import { polarisedStackShares, stackShares } from './stack-shares.js';

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
    const film = interfaces[record + INTERFACE.film];
    if (scene.polarised === 0) stackShares(scene, film, wavelength, shares);
    else polarisedStackShares(scene, film, wavelength, shares);
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
