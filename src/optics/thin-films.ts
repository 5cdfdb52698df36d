/** Layers at one wavelength, made ready for the characteristic matrices. */

export interface FilmLayer {
  /** Complex index n − ik, k > 0 absorbs. */
  readonly n: number;
  readonly k: number;
  readonly thicknessNm: number;
}

/** In the order the light meets them. */
export interface ThinFilms {
  readonly count: number;
  /** Square of the complex index. */
  readonly squareReal: Float64Array;
  readonly squareImaginary: Float64Array;
  /** 2π·thickness/wavelength. */
  readonly turns: Float64Array;
  readonly absorbing: boolean;
}

export function thinFilms(layers: readonly FilmLayer[], wavelengthNm: number): ThinFilms {
  return {
    count: layers.length,
    squareReal: Float64Array.from(layers, ({ n, k }) => n * n - k * k),
    squareImaginary: Float64Array.from(layers, ({ n, k }) => -2 * n * k),
    turns: Float64Array.from(layers, ({ thicknessNm }) => (2 * Math.PI * thicknessNm) / wavelengthNm),
    absorbing: layers.some(({ k }) => k !== 0),
  };
}
