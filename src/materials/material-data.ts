import type { Curve } from '../units/curve.js';

/** What the library knows of a solvent, a solid or a gas. */
export interface MaterialData {
  readonly name: string;
  readonly kind: 'gas' | 'liquid' | 'solid';
  /** Refractive index relative to air. */
  readonly index: Curve;
  /** Napierian absorption of the bare material, 1/mm. */
  readonly absorption: Curve;
  readonly thermal: ThermalData | null;
  /** Wavelengths the index was fitted to, nm. */
  readonly rangeNm: readonly [number, number];
  readonly source: string;
  /** How sure each part is: verified, from memory, or taken as lossless for want of data. */
  readonly status: string;
}

/** Liquid at rest at 25 °C and its boiling point at 101.325 kPa. */
export interface ThermalData {
  readonly densityKgPerM3: number;
  readonly specificHeatJPerKgK: number;
  readonly conductivityWPerMK: number;
  readonly viscosityMPaS: number;
  readonly boilingPointC: number | null;
  /** Change of the index a kelvin; null where unknown. */
  readonly indexPerKelvin: number | null;
  /** Closed cup, °C, the lowest value given; null for what does not burn or has no figure. */
  readonly flashPointC: number | null;
  readonly temperatureC: number;
  readonly source: string;
}

/** What the library knows of a dye in one solvent. */
export interface DyeData {
  readonly name: string;
  readonly solvent: string;
  readonly molarMassGPerMol: number;
  /** Decadic molar extinction, L/(mol cm); 0 above the red end of the table, held below its blue end. */
  readonly extinction: Curve;
  readonly emission: { readonly photonsPerNm: Curve; readonly fromNm: number; readonly toNm: number };
  readonly quantumYield: number;
  /** ns, computed from spectra and yield after Strickler & Berg, J. Chem. Phys. 37 814 (1962); `status` says where it is doubtful. */
  readonly lifetimeNs: number | null;
  readonly source: string;
  readonly status: string;
  /** pH over which the spectra and yield hold; null where pH does not matter. */
  readonly pHRange: readonly [number, number] | null;
  /** Wavelengths the absorption was measured or modelled at, nm. */
  readonly rangeNm: readonly [number, number];
  /** Forms by protonation, most protonated first; empty where the library knows one form only. */
  readonly forms: readonly DyeForm[];
  readonly temperature: YieldTemperature | null;
}

/** One protolytic form of a dye. All forms emit with the spectrum of the dye. */
export interface DyeForm {
  readonly name: string;
  /** Of the loss of the next proton; null for the last form. */
  readonly pKa: number | null;
  /** Decadic molar extinction, L/(mol cm). */
  readonly extinction: Curve;
  /** Per photon this form absorbs, whatever form emits in the end. */
  readonly quantumYield: number;
}

/** Constants of self-quenching by transfer to dark dimers. */
export interface QuenchingData {
  readonly radiusNm: number;
  readonly dimerRadiusNm: number;
  /** K = [dimer]/[single]², L/mol. */
  readonly pairing: number;
  /** mol/L up to which the constants are meant. */
  readonly most: number;
  readonly status: string;
  readonly source: string;
}

/** How the yield falls with temperature. */
export interface YieldTemperature {
  /** Share of itself the yield loses a kelvin at 25 °C. */
  readonly fallPerKelvin: number;
  readonly rangeC: readonly [number, number];
  readonly status: string;
  readonly source: string;
}

/** What the library knows of a metal or of another material of thin films. */
export interface LayerMaterialData {
  readonly name: string;
  /** Complex index n − ik, k > 0 absorbs. */
  readonly n: Curve;
  readonly k: Curve;
  /** Wavelengths there are data for, nm. */
  readonly rangeNm: readonly [number, number];
  readonly source: string;
  readonly status: string;
}

/** @throws RangeError that lists the names there are. */
export function unknownName(kind: string, name: string, names: readonly string[]): RangeError {
  return new RangeError(`the library has no ${kind} called ${name}; it has ${names.join(', ')}`);
}
