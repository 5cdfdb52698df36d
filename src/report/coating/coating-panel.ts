/** What the pictures of a finish show: one way of light through it. */
export interface CoatingPanel {
  readonly from: string;
  readonly to: string;
  readonly wavelengthsNm: readonly number[];
  readonly anglesDeg: readonly number[];
  /** [wavelength · angles + angle] */
  readonly reflectanceS: Float64Array;
  readonly reflectanceP: Float64Array;
  readonly transmittanceS: Float64Array;
  readonly transmittanceP: Float64Array;
  readonly criticalDeg: number | null;
}

export const meanReflectance = ({ reflectanceS, reflectanceP }: CoatingPanel, at: number): number =>
  0.5 * (reflectanceS[at] + reflectanceP[at]);

export const meanTransmittance = ({ transmittanceS, transmittanceP }: CoatingPanel, at: number): number =>
  0.5 * (transmittanceS[at] + transmittanceP[at]);

/** Place of the tabulated angle nearest to one, degrees. */
export function angleAt({ anglesDeg }: CoatingPanel, degrees: number): number {
  let best = 0;
  anglesDeg.forEach((angle, a) => {
    if (Math.abs(angle - degrees) < Math.abs(anglesDeg[best] - degrees)) best = a;
  });
  return best;
}

/** Colours written out, so that a picture stands alone; on white, as it will be printed or pasted. */
export const STANDALONE_STYLE =
  'text{font-family:"DejaVu Sans",Verdana,sans-serif;font-size:11px;fill:#1b2226}' +
  '.picture-title{font-size:14px;font-weight:700}.panel-title{font-size:12px;font-weight:700}' +
  '.axis line{stroke:#565f66;stroke-width:1}.axis text{fill:#565f66}.axis .axis-title{fill:#1b2226}' +
  '.grid{stroke:#e4e0d7;stroke-width:1}.frame{fill:none;stroke:#565f66;stroke-width:1}' +
  '.note{fill:#565f66}.curve{fill:none;stroke-width:1.8;stroke-linejoin:round}' +
  '.critical{stroke:#fff;stroke-width:1.6;stroke-dasharray:5 4}';
