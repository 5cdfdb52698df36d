/** What may stand after `mirror:`: a share reflected, or the name of a metal of the library. */
import { metalNames } from '../materials/library.js';
import { nearestName } from '../units/nearest-name.js';
import type { Form } from './form.js';
import { quantity } from './form-quantities.js';
import type { Reference } from './form-scalars.js';

export type Mirror =
  | { readonly kind: 'share'; readonly reflectance: number }
  | { readonly kind: 'metal'; readonly metal: Reference };

const BARE_WORD = /^[\p{L}][\p{L}\p{N}_-]*$/u;
const share = quantity('fraction', { min: 0, max: 1 });
const expects = `a share reflected such as 95 %, or a metal: ${metalNames().join(', ')}`;

export const mirrorForm: Form<Mirror> = {
  expects,
  blank: () => ({ kind: 'share', reflectance: Number.NaN }),
  schema: { anyOf: [{ enum: metalNames() }, share.schema] },
  read(place, reading) {
    const text = reading.text(place, expects);
    if (text !== null && metalNames().includes(text)) {
      return { kind: 'metal', metal: { name: text, path: place.path } };
    }
    // A single word is a dial if there is one, else it was meant for a metal.
    if (text !== null && BARE_WORD.test(text) && reading.dial(text) === undefined) {
      const nearest = nearestName(text, [...metalNames(), ...reading.dials.keys()]);
      const problem = 'no metal of the library and no dial has this name';
      const hint = nearest === null ? {} : { suggestion: nearest };
      reading.report({ code: 'unknown-name', path: place.path, problem, found: text, expected: expects, ...hint });
      return this.blank();
    }
    return { kind: 'share', reflectance: text === null ? Number.NaN : share.read(place, reading) };
  },
};
