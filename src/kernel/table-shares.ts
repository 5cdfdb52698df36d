import type { Scene } from '../scene/scene-layout.js';

/** Reflectance and transmittance of a tabulated finish at an angle of incidence, linear between whole degrees, into `out`. */
export function tableShares(
  scene: Scene,
  finish: number,
  wavelength: number,
  cosine: number,
  out: Float64Array,
): void {
  const last = scene.tableAngles - 1;
  const position = (Math.acos(cosine < 1 ? cosine : 1) / (Math.PI / 2)) * last;
  const angle = Math.min(last - 1, Math.floor(position));
  const share = position - angle;
  const at = (scene.finishTable[finish] + wavelength) * scene.tableAngles + angle;
  out[0] = scene.tableReflectance[at] * (1 - share) + scene.tableReflectance[at + 1] * share;
  out[1] = scene.tableTransmittance[at] * (1 - share) + scene.tableTransmittance[at + 1] * share;
}
