/**
 * Shares of the forms of a stepwise acid, most protonated first, by Henderson and Hasselbalch (1917): each step down has
 * [form i+1]/[form i] = 10^(pH − pKᵢ). Activities are taken as concentrations.
 * @param pKa of the loss of the next proton, one fewer than there are forms
 */
export function formShares(pH: number, pKa: readonly number[]): number[] {
  const logs = [0];
  for (const step of pKa) logs.push(logs[logs.length - 1] + (pH - step));
  const top = Math.max(...logs);
  const weights = logs.map((log) => 10 ** (log - top));
  const sum = weights.reduce((a, b) => a + b, 0);
  return weights.map((weight) => weight / sum);
}
