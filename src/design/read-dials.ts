/** Dials: named quantities that may use each other, in any order but not in a circle. */
import { isMap } from 'yaml';
import { nearestName } from '../units/nearest-name.js';
import { inOwnUnit, type Quantity } from '../units/quantity.js';
import { sameDimension } from '../units/quantity-dimension.js';
import { QUANTITY_KINDS } from '../units/quantity-kinds.js';
import { UNITS } from '../units/quantity-units.js';
import type { Dial } from './description.js';
import { entriesOf, startOf } from './design-source.js';
import type { Form } from './form.js';
import { checkName } from './form-record.js';
import type { Place, Reading } from './reading.js';

const EXPECTS = 'a quantity such as 8 mm';
const reservedNames = new Map([...UNITS.keys()].map((unit) => [unit, 'a unit has this name']));

/** For the schema, and to find the text; values come from `readDials`, which has run before. */
export const dialForm: Form<string> = {
  expects: EXPECTS,
  blank: () => '',
  schema: { type: ['string', 'number'], examples: Object.values(QUANTITY_KINDS).map(({ example }) => example) },
  read: ({ node }) => (node !== null && 'value' in node ? String(node.value) : ''),
};

/**
 * Reads all dials into `reading.dials` before anything else is read. `turned` replaces the texts of dials; a turned
 * dial keeps its dimension.
 */
export function readDials(root: Place, turned: Readonly<Record<string, string>>, reading: Reading): Dial[] {
  const places = dialPlaces(root, reading);
  const open = new Set<string>();
  const done = new Set<string>();
  const turnedText = (name: string) => (Object.hasOwn(turned, name) ? turned[name] : undefined);
  for (const name of places.keys()) reading.dials.set(name, null);

  const evaluate = (name: string): Quantity | null | undefined => {
    const place = places.get(name);
    if (place === undefined) return undefined;
    reading.usedDials.add(name);
    if (done.has(name)) return reading.dials.get(name);
    if (open.has(name)) {
      const circle = [...open].slice([...open].indexOf(name));
      const found = [...circle, name].join(' → ');
      const problem = 'dials that use each other go round in a circle';
      reading.report({ code: 'quantity', path: place.path, problem, found, expected: 'a dial that rests on numbers' });
      for (const each of circle) done.add(each);
      return null;
    }
    open.add(name);
    const value = readDial(place, turnedText(name), reading, evaluate);
    open.delete(name);
    if (!done.has(name)) reading.dials.set(name, value);
    done.add(name);
    return reading.dials.get(name);
  };
  for (const name of places.keys()) {
    const used = reading.usedDials.has(name);
    evaluate(name);
    if (!used) reading.usedDials.delete(name);
  }
  reportUnknownTurns(places, turned, reading);
  return [...places].flatMap(([name, place]) => {
    const quantity = reading.dials.get(name);
    if (!quantity) return [];
    const text = turnedText(name) ?? reading.text(place, EXPECTS) ?? '';
    return [{ name, text, value: inOwnUnit(quantity) }];
  });
}

function dialPlaces(root: Place, reading: Reading): Map<string, Place> {
  const { source } = reading;
  const places = new Map<string, Place>();
  const dials =
    root.node === null ? undefined : entriesOf(root.node, source).entries.find(({ name }) => name === 'dials');
  const map = dials && source.resolve(dials.value);
  // Anything but a map is told by the form of the whole design, as are odd keys and duplicates.
  if (!map || !isMap(map)) return places;
  for (const { key, name, value } of entriesOf(map, source).entries) {
    const path = ['dials', name];
    if (UNITS.has(name)) checkName(name, path, startOf(key), reservedNames, reading);
    places.set(name, reading.place(value, path));
  }
  return places;
}

function readDial(
  place: Place,
  turned: string | undefined,
  reading: Reading,
  dial: (name: string) => Quantity | null | undefined,
): Quantity | null {
  const text = reading.text(place, EXPECTS);
  const written =
    text === null
      ? null
      : reading.quantityFromText(text, place, EXPECTS, (i) => reading.offsetIn(place, text, i), dial);
  if (turned === undefined || written === null) return written;
  const value = reading.quantityFromText(turned, place, EXPECTS, () => null, dial);
  if (value === null || sameDimension(value.dimension, written.dimension)) return value;
  const problem = 'the dial was turned to another kind of quantity';
  reading.report({ code: 'quantity', path: place.path, problem, found: turned, expected: `a quantity like ${text}` });
  return null;
}

function reportUnknownTurns(
  places: ReadonlyMap<string, Place>,
  turned: Readonly<Record<string, string>>,
  reading: Reading,
): void {
  for (const name of Object.keys(turned)) {
    if (places.has(name)) continue;
    const nearest = nearestName(name, places.keys());
    const expected = places.size === 0 ? 'a design with dials' : `one of ${[...places.keys()].join(', ')}`;
    const problem = 'the design has no dial of this name to turn';
    const hint = nearest === null ? {} : { suggestion: nearest };
    reading.report({ code: 'unknown-name', path: ['dials'], problem, found: name, expected, ...hint });
  }
}
