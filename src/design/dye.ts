import type { DyeForm, YieldTemperature } from '../materials/library.js';
import type { QuenchingLaw } from '../materials/self-quenching.js';
import type { Curve } from '../units/curve.js';
import type { DissolvedDye, EmissionDescription, GivenConstant } from './description.js';

/** A dye before it is given a strength. */
export interface Dye {
  /** Decadic molar extinction, L/(mol cm), or Napierian absorption at strength 1, 1/mm. */
  readonly extinction: Curve | null;
  readonly absorption: Curve | null;
  readonly emission: EmissionDescription;
  readonly quantumYield: number;
  readonly lifetimeNs: number | null;
  readonly molarMassGPerMol: number | null;
  readonly bleachYield: GivenConstant | null;
  readonly triplet: NonNullable<DissolvedDye['triplet']> | null;
  /** Protolytic forms to mix by pH, most protonated first; empty where one set of data holds. */
  readonly forms: readonly DyeForm[];
  readonly quenching: { readonly law: QuenchingLaw; readonly most: number; readonly source: string } | null;
  readonly temperature: YieldTemperature | null;
  readonly notes: readonly string[];
}

/** What the dye is dissolved in. */
export interface Host {
  /** Library name of what the most of it is, or 'custom'. */
  readonly base: string;
  /** What people call it. */
  readonly words: string;
  /** One solvent of the library, unmixed. */
  readonly pure: boolean;
  readonly kind: 'gas' | 'liquid' | 'solid';
  readonly pH: number | null;
  /** °C; null where the design says none. */
  readonly temperatureC: number | null;
  readonly quenching: boolean;
}
