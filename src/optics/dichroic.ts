export function dichroicShares(
  d: { edgeNm: number; widthNm: number; passes: 'below' | 'above'; transmits: number; reflects: number; absorbs: number },
  nm: number,
): { reflectance: number; transmittance: number } {
  const x = (d.passes === 'below' ? 1 : -1) * (d.edgeNm - nm);
  const pass = d.widthNm === 0 ? (x >= 0 ? 1 : 0) : 1 / (1 + Math.exp((-x * 2 * Math.log(9)) / d.widthNm));
  const transmittance = pass * d.transmits + (1 - pass) * (1 - d.reflects - d.absorbs);
  return { transmittance, reflectance: 1 - transmittance - d.absorbs };
}
