/** A spectral quantity: its value at a vacuum wavelength in nanometres. The unit of the value is the holder's. */
export type Curve = (wavelengthNm: number) => number;
