/** The arrays of a run: what its folder keeps beside run.json. The outcome stage fills them. */
import type { Drawing } from './drawing.js';

export interface MapArray {
  readonly id: string;
  /** Cells along each axis; value index = iu + nu·(iv + nv·iw). */
  readonly shape: readonly number[];
  /** Low and high end along each axis, mm. */
  readonly extentMm: readonly (readonly [number, number])[];
  readonly axes: readonly string[];
  /** Of a sphere: azimuth and polar angle, degrees. */
  readonly extentDeg?: readonly (readonly [number, number])[];
  readonly unit: 'W/cm²' | 'W/cm³';
  /** NaN where the map has no face or liquid. */
  readonly values: Float64Array;
  /** Area, mm², or volume, mm³, of the face or liquid inside each cell. */
  readonly measure: Float64Array;
}

export interface SpectraArray {
  readonly wavelengthsNm: Float64Array;
  /** Photons per launched photon per nm, one value per wavelength. */
  readonly columns: readonly { readonly id: string; readonly values: Float64Array }[];
}

/** What the trace went by; the record says which column is what. */
export interface CurvesArray {
  readonly wavelengthsNm: Float64Array;
  /** In the unit the record gives, one value per wavelength. */
  readonly columns: readonly { readonly id: string; readonly values: Float64Array }[];
}

export interface AnglesArray {
  readonly id: string;
  /** Polar cells of equal width from 0 to `polarToDeg`, azimuth cells of equal width from 0 to 360°. */
  readonly polarCells: number;
  readonly azimuthCells: number;
  /** Radiant intensity, index polar·azimuthCells + azimuth. */
  readonly wattsPerSr: Float64Array;
  /** Luminous intensity, cd, of the same cells. */
  readonly candela: Float64Array;
  readonly polarToDeg: 90 | 180;
}

export interface RadianceArray {
  readonly id: string;
  /** Cells along u, v, polar angle and azimuth; value index ((iv·nu + iu)·polar + ip)·azimuth + ia. */
  readonly shape: readonly [number, number, number, number];
  readonly extentMm: readonly (readonly [number, number])[];
  readonly extentDeg?: readonly (readonly [number, number])[];
  readonly axes: readonly string[];
  /** W/(m² sr); NaN where the place is off the face. */
  readonly values: Float64Array;
}

export interface RunArrays {
  readonly maps: readonly MapArray[];
  readonly spectra: SpectraArray;
  readonly curves: CurvesArray;
  readonly angles: readonly AnglesArray[];
  readonly radiance: readonly RadianceArray[];
  /** The design in space and some histories; null where it was not made. */
  readonly drawing: Drawing | null;
}
