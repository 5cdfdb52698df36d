const GAS_CONSTANT = 8.314462618;
const KELVIN = 273.15;
const REFERENCE_C = 25;

/**
 * Quantum yield at a temperature, where one thermally activated way of decay competes with light:
 * 1/φ − 1 = (1/φ₂₅ − 1) exp(−(E/R)(1/T − 1/T₂₅)) (Arrhenius; Karstens & Kobs, J. Phys. Chem. 84 1871 (1980) use it so, from memory).
 * @param yieldAt25 yield at 25 °C, above 0 @param activationKJPerMol E @param temperatureC °C
 */
export function yieldAtTemperature(yieldAt25: number, activationKJPerMol: number, temperatureC: number): number {
  if (yieldAt25 <= 0) return 0;
  const inverse = 1 / (temperatureC + KELVIN) - 1 / (REFERENCE_C + KELVIN);
  return 1 / (1 + (1 / yieldAt25 - 1) * Math.exp(((-1000 * activationKJPerMol) / GAS_CONSTANT) * inverse));
}

/** The activation energy, kJ/mol, that makes the yield fall by `perKelvin` of itself a kelvin at 25 °C. */
export function activationEnergy(yieldAt25: number, perKelvin: number): number {
  const kelvin = REFERENCE_C + KELVIN;
  return (perKelvin * GAS_CONSTANT * kelvin * kelvin) / (1 - yieldAt25) / 1000;
}
