/** The kinds of quantity that fields ask for, each with the base unit its values are handed on in. */
import { type Dimension, PLAIN, sameDimension, writeDimension } from './quantity-dimension.js';

export interface QuantityKind {
  readonly dimension: Dimension;
  /** Base unit, and the power of ten that takes it to the coherent SI unit. */
  readonly unit: string;
  readonly exponent: number;
  readonly words: string;
  readonly example: string;
}

const kind = (dimension: Dimension, unit: string, exponent: number, words: string, example: string): QuantityKind => ({
  dimension,
  unit,
  exponent,
  words,
  example,
});

// Order matters where two kinds share a dimension: the first names it.
export const QUANTITY_KINDS = {
  number: kind(PLAIN, '', 0, 'a plain number', '3'),
  fraction: kind(PLAIN, '', 0, 'a share', '95 %'),
  length: kind([1, 0, 0, 0, 0, 0, 0], 'mm', -3, 'a length', '8 mm'),
  wavelength: kind([1, 0, 0, 0, 0, 0, 0], 'nm', -9, 'a wavelength', '450 nm'),
  thickness: kind([1, 0, 0, 0, 0, 0, 0], 'nm', -9, 'a thickness', '80 nm'),
  area: kind([2, 0, 0, 0, 0, 0, 0], 'mm²', -6, 'an area', '4 mm²'),
  volume: kind([3, 0, 0, 0, 0, 0, 0], 'mm³', -9, 'a volume', '2 mL'),
  angle: kind([0, 0, 0, 0, 0, 1, 0], 'rad', 0, 'an angle', '5 deg'),
  power: kind([2, 1, -3, 0, 0, 0, 0], 'W', 0, 'a power', '60 W'),
  irradiance: kind([0, 1, -3, 0, 0, 0, 0], 'W/mm²', 6, 'an irradiance', '100 W/cm²'),
  concentration: kind([-3, 0, 0, 1, 0, 0, 0], 'mol/L', 3, 'a concentration', '0.2 mmol/L'),
  massConcentration: kind([-3, 1, 0, 0, 0, 0, 0], 'g/L', 0, 'a mass concentration', '60 mg/L'),
  numberDensity: kind([-3, 0, 0, 0, 0, 0, 0], '1/mm³', 9, 'a number per volume', '2e6 /mm³'),
  absorption: kind([-1, 0, 0, 0, 0, 0, 0], '1/mm', 3, 'an absorption per length', '0.2 /cm'),
  extinction: kind([2, 0, 0, -1, 0, 0, 0], 'L/(mol cm)', -1, 'a molar extinction', '50000 L/(mol cm)'),
  molarVolume: kind([3, 0, 0, -1, 0, 0, 0], 'L/mol', -3, 'a volume per mole', '5 L/mol'),
  molarMass: kind([0, 1, 0, -1, 0, 0, 0], 'g/mol', -3, 'a molar mass', '332 g/mol'),
  time: kind([0, 0, 1, 0, 0, 0, 0], 's', 0, 'a time', '2 s'),
  lifetime: kind([0, 0, 1, 0, 0, 0, 0], 'ns', -9, 'a lifetime', '4 ns'),
  temperature: kind([0, 0, 0, 0, 1, 0, 0], 'K', 0, 'a temperature', '25 °C'),
  luminousFlux: kind([0, 0, 0, 0, 0, 0, 1], 'lm', 0, 'a luminous flux', '900 lm'),
} as const satisfies Record<string, QuantityKind>;

export type QuantityKindName = keyof typeof QUANTITY_KINDS;

/** 'a length such as 8 mm'. */
export const describeKind = (name: QuantityKindName): string =>
  `${QUANTITY_KINDS[name].words} such as ${QUANTITY_KINDS[name].example}`;

/** The kind that names a dimension, or null for one that has no name here. */
export function kindOf(dimension: Dimension): QuantityKindName | null {
  for (const [name, { dimension: own }] of Object.entries(QUANTITY_KINDS)) {
    if (sameDimension(dimension, own)) return name as QuantityKindName;
  }
  return null;
}

/** 'a length', or the SI units of a dimension without a name. */
export function describeDimension(dimension: Dimension): string {
  const name = kindOf(dimension);
  return name === null ? `a quantity in ${writeDimension(dimension)}` : QUANTITY_KINDS[name].words;
}
