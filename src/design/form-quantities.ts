/** Forms of numbers with units, and of the counts and ranges they must keep. */

import { type Quantity, quantityIn } from '../units/quantity.js';
import { describeDimension, describeKind, QUANTITY_KINDS, type QuantityKindName } from '../units/quantity-kinds.js';
import type { DesignPath } from './fault.js';
import type { Form, JsonSchema } from './form.js';
import type { Place, Reading } from './reading.js';

/** Bounds in base units of the kind; `above` and `below` are themselves excluded. */
export interface Range {
  readonly above?: number;
  readonly min?: number;
  readonly max?: number;
  readonly below?: number;
}

export interface KindedQuantity {
  readonly kind: QuantityKindName;
  /** Base units of `kind`; NaN when it could not be read. */
  readonly value: number;
  readonly path: DesignPath;
}

/** A quantity of one kind, in its base unit. */
export const quantity = (kind: QuantityKindName, range: Range = {}): Form<number> => {
  const form = quantityOf([kind], range);
  return { ...form, blank: () => Number.NaN, read: (place, reading) => form.read(place, reading).value };
};

/** A quantity of any of several kinds, e.g. mol/L or g/L. The range holds for each in its own base unit. */
export const quantityOf = (kinds: readonly QuantityKindName[], range: Range = {}): Form<KindedQuantity> => {
  const expects = kinds.map(describeKind).join(' or ') + describeRange(range, kinds[0]);
  return {
    expects,
    blank: () => ({ kind: kinds[0], value: Number.NaN, path: [] }),
    schema: quantitySchema(kinds, expects),
    read(place, reading) {
      const read = reading.quantity(place, expects);
      const kind = read === null ? undefined : kinds.find((name) => quantityIn(read, name) !== null);
      const blank = { kind: kinds[0], value: Number.NaN, path: place.path };
      if (read === null) return blank;
      if (kind === undefined) {
        reportDimension(read, place, reading, expects, kinds[0]);
        return blank;
      }
      const value = quantityIn(read, kind) as number;
      checkRange(value, kind, range, place, reading);
      return { kind, value, path: place.path };
    },
  };
};

/** A whole number. */
export const count = (min: number, max: number): Form<number> => {
  const expects = `a whole number from ${min} to ${max}`;
  const any = quantity('number');
  return {
    expects,
    blank: () => Number.NaN,
    schema: { ...any.schema, examples: [Math.max(min, 4)] },
    read(place, reading) {
      const value = any.read(place, reading);
      if (value < min || value > max || value % 1 !== 0) {
        if (!Number.isNaN(value)) {
          const found = foundText(value, 'number', place, reading);
          const problem = 'the count is not possible';
          reading.report({ code: 'range', path: place.path, problem, found, expected: expects });
        }
      }
      return value;
    },
  };
};

function reportDimension(
  read: Quantity,
  place: Place,
  reading: Reading,
  expected: string,
  kind: QuantityKindName,
): void {
  const text = reading.text(place, expected) ?? '';
  const bare = quantityIn(read, 'number') !== null;
  const problem = bare ? 'the number has no unit' : `${describeDimension(read.dimension)} cannot stand here`;
  const unit = QUANTITY_KINDS[kind].example.split(' ').slice(1).join(' ');
  const found = bare && /^[\p{L}_(]/u.test(text) ? `${text} = ${read.magnitude}` : text;
  const hint = bare && /^[\d.]+$/.test(text) && unit !== '' ? { suggestion: `write ${text} ${unit}` } : {};
  reading.report({ code: 'quantity', path: place.path, problem, found, expected, ...hint });
}

function checkRange(value: number, kind: QuantityKindName, range: Range, place: Place, reading: Reading): void {
  const { above, min, max, below } = range;
  const low = (above !== undefined && value <= above) || (min !== undefined && value < min);
  const high = (below !== undefined && value >= below) || (max !== undefined && value > max);
  if (!low && !high) return;
  const found = foundText(value, kind, place, reading);
  // '95' for '95 %' is the commonest slip of all.
  const percent = kind === 'fraction' && value > 1 && value <= 100 && quantityText(place, reading) === String(value);
  reading.report({
    code: 'range',
    path: place.path,
    problem: low ? 'the value is too small' : 'the value is too large',
    found,
    expected: QUANTITY_KINDS[kind].words + describeRange(range, kind),
    ...(percent ? { suggestion: `write ${value} %` } : {}),
  });
}

const quantityText = (place: Place, reading: Reading): string => reading.text(place, '')?.trim() ?? '';

/** The text in the file, and its value where arithmetic hides it. */
function foundText(value: number, kind: QuantityKindName, place: Place, reading: Reading): string {
  const text = quantityText(place, reading);
  return /[+*/()]|\s-\s|^[\p{L}_]/u.test(text) ? `${text} = ${writeValue(value, kind)}` : text;
}

/** A value with a unit people read: degrees and percent instead of base units. */
export function writeValue(value: number, kind: QuantityKindName): string {
  if (kind === 'angle') return `${round((value * 180) / Math.PI)} deg`;
  if (kind === 'fraction') return `${round(value * 100)} %`;
  return `${round(value)} ${QUANTITY_KINDS[kind].unit}`.trim();
}

const round = (value: number): number => Number(value.toPrecision(6));

function describeRange({ above, min, max, below }: Range, kind: QuantityKindName): string {
  const low = above !== undefined ? `above ${writeValue(above, kind)}` : null;
  const least = min !== undefined ? `at least ${writeValue(min, kind)}` : null;
  const most = max !== undefined ? `at most ${writeValue(max, kind)}` : null;
  const high = below !== undefined ? `below ${writeValue(below, kind)}` : null;
  const bounds = [low, least, high, most].filter((bound) => bound !== null);
  return bounds.length === 0 ? '' : `, ${bounds.join(' and ')}`;
}

/** An expression cannot be checked by a pattern; that some unit or dial is in it can. */
function quantitySchema(kinds: readonly QuantityKindName[], expects: string): JsonSchema {
  const examples = kinds.map((kind) => QUANTITY_KINDS[kind].example);
  const plain = kinds.some((kind) => kind === 'number' || kind === 'fraction');
  if (plain) return { type: ['string', 'number'], $comment: expects, examples };
  return { type: 'string', pattern: '[A-Za-zµ_°%]', $comment: expects, examples };
}
