import { colourMatching } from '../../materials/observer.js';
import { screenColour } from '../light-colour.js';
import { LIGHTS, lightNm } from './light-index.js';

/** Light the eye barely sees still needs a colour: that of the ends of the spectrum. */
const FIRST_NM = 400;
const LAST_NM = 690;

let table: Uint8Array | undefined;

/** Red, green and blue of every light index, 3 bytes each: the CIE 1931 observer's colour of that wavelength. */
export function lightTable(): Uint8Array {
  table ??= Uint8Array.from(Array.from({ length: LIGHTS }, (_, i) => [...lightColour(lightNm(i))]).flat());
  return table;
}

function lightColour(nm: number): readonly [number, number, number] {
  const [x, y, z] = colourMatching(Math.min(LAST_NM, Math.max(FIRST_NM, nm)));
  const sum = x + y + z;
  return screenColour(x / sum, y / sum);
}
