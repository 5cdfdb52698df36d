/** A curve a trace goes by: types only, for the record. */

export type CurveKind =
  | 'dye-absorption' // Napierian, at the strength in use
  | 'dye-extinction' // decadic, molar
  | 'dye-emission' // photons per nm; the area is 1
  | 'medium-absorption' // Napierian, of the bare solvent or solid
  | 'finish-transmittance' // at normal incidence
  | 'finish-reflectance'; // at normal incidence

export interface UsedCurve {
  /** No two alike. */
  readonly id: string;
  readonly what: CurveKind;
  /** Of the dye, the material or the finish. */
  readonly name: string;
  /** Medium it holds in; null where that does not matter. */
  readonly where: string | null;
  readonly unit: '1/mm' | 'L/(mol cm)' | '1/nm' | '1';
  /** One per wavelength of the scene. */
  readonly values: Float64Array;
}
