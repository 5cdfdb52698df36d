/** Exact SI constants (SI Brochure, 9th edition, 2019). */
export const PLANCK_J_S = 6.62607015e-34;
export const SPEED_OF_LIGHT_M_PER_S = 299_792_458;
export const ELEMENTARY_CHARGE_C = 1.602176634e-19;
export const BOLTZMANN_J_PER_K = 1.380649e-23;
export const AVOGADRO_PER_MOL = 6.02214076e23;

/** Photon energy in eV times wavelength in nm: hc / (e · 1 nm), about 1239.84 eV nm. */
export const EV_NM = (PLANCK_J_S * SPEED_OF_LIGHT_M_PER_S * 1e9) / ELEMENTARY_CHARGE_C;

/** Energy of one photon, J, at a vacuum wavelength in nm. */
export const photonEnergyJ = (wavelengthNm: number): number =>
  (PLANCK_J_S * SPEED_OF_LIGHT_M_PER_S * 1e9) / wavelengthNm;

/**
 * Maximum luminous efficacy of photopic vision in lm/W for the CIE 1931 2° observer
 * (683 lm/W at 540 THz by definition of the candela; 683.002 at the 555 nm peak of V(λ), CIE 018:2019).
 */
export const MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W = 683.002;
