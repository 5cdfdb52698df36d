/** placeholder of the lead until the optics helper's file lands */
export function metalReflectance(nIncident: number, n: number, k: number, cosIncident: number): number {
  const sin2 = 1 - cosIncident * cosIncident;
  const n1 = n / nIncident;
  const k1 = k / nIncident;
  const t0 = n1 * n1 - k1 * k1 - sin2;
  const ab = Math.sqrt(t0 * t0 + 4 * n1 * n1 * k1 * k1);
  const a = Math.sqrt(Math.max(0, 0.5 * (ab + t0)));
  const t1 = ab + cosIncident * cosIncident;
  const t2 = 2 * cosIncident * a;
  const rs = (t1 - t2) / (t1 + t2);
  const t3 = cosIncident * cosIncident * ab + sin2 * sin2;
  const t4 = t2 * sin2;
  return 0.5 * (rs + (rs * (t3 - t4)) / (t3 + t4));
}
