/** What a finish does to a plane wave between two media, worked out directly: the law itself, without the tables of a scene. */
import type { FinishDescription } from '../design/description.js';
import { scatterShares } from '../numerics/hemisphere-cells.js';
import { dichroicShares } from '../optics/dichroic.js';
import { stackResponse } from '../optics/thin-film-stack.js';
import type { FilmLayer } from '../optics/thin-films.js';
import { tableShares } from './compile-finishes.js';

export interface Shares {
  readonly reflectance: number;
  readonly transmittance: number;
}

/** Shares of s and of p light; where a finish is given for unpolarised light only, both are those. */
export interface FinishResponse {
  readonly s: Shares;
  readonly p: Shares;
}

export interface Incidence {
  readonly indexHere: number;
  readonly indexBeyond: number;
  /** Cosine of the angle in the medium the light comes from, above 0. */
  readonly cosine: number;
  readonly wavelengthNm: number;
  /** Whether the light comes from outside of the face, or from within its part. */
  readonly inward: boolean;
}

/** Thicker than any light gets through. */
const OPAQUE_NM = 1e6;

export function finishResponse(finish: FinishDescription, incidence: Incidence): FinishResponse {
  const { indexHere, indexBeyond, cosine, wavelengthNm: nm, inward } = incidence;
  const films = (layers: readonly FilmLayer[]) => stackResponse(layers, indexHere, indexBeyond, cosine, nm);
  switch (finish.kind) {
    case 'clear':
      return films([]);
    case 'stack': {
      const met = inward ? finish.layers : finish.layers.toReversed();
      return films(met.map(({ n, k, thicknessNm }) => ({ n: n(nm), k: k(nm), thicknessNm })));
    }
    case 'metal':
      return films([{ n: finish.n(nm), k: finish.k(nm), thicknessNm: OPAQUE_NM }]);
    case 'black':
      return both({ reflectance: 0, transmittance: 0 });
    case 'mirror':
      return both({ reflectance: finish.reflectance, transmittance: 0 });
    case 'dichroic':
      return both(withTotalReflection(dichroicShares(finish, nm), incidence));
    case 'table':
      return both(withTotalReflection(tableShares(finish, nm, (Math.acos(cosine) * 180) / Math.PI), incidence));
    case 'bsdf': {
      const { incidenceDeg, reflected, transmitted } = scatterShares(finish);
      const table = {
        wavelengthsNm: [0],
        anglesDeg: incidenceDeg,
        reflectance: [reflected],
        transmittance: [transmitted],
      };
      return both(tableShares(table, nm, (Math.acos(cosine) * 180) / Math.PI));
    }
    case 'diffuser':
      return both({ reflectance: finish.reflects, transmittance: finish.transmits });
    case 'scatter': {
      if (finish.split === null) return films([]);
      const { reflects, transmits } = finish.split;
      return both(withTotalReflection({ reflectance: reflects, transmittance: transmits }, incidence));
    }
  }
}

const both = (shares: Shares): FinishResponse => ({ s: shares, p: shares });

/** Beyond the critical angle what a finish would pass is reflected. */
function withTotalReflection(shares: Shares, { indexHere, indexBeyond, cosine }: Incidence): Shares {
  if (indexHere * Math.sqrt(1 - cosine * cosine) < indexBeyond) return shares;
  return { reflectance: shares.reflectance + shares.transmittance, transmittance: 0 };
}
