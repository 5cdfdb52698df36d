import { quantityIn } from '../../units/quantity.js';
import { describeKind, QUANTITY_KINDS, type QuantityKindName } from '../../units/quantity-kinds.js';
import { parseQuantity } from '../../units/quantity-parse.js';
import { CommandFault } from '../command-fault.js';
import { EXIT } from '../exit-codes.js';
import { safeText } from '../safe-text.js';

/**
 * The value of an option in the base unit of a kind.
 * @param bounds in that unit; the lower one itself is excluded
 * @throws CommandFault that names the option, what was found and what was expected
 */
export function quantityOption(
  option: string,
  text: string,
  kind: QuantityKindName,
  [above, most]: readonly [number, number],
): number {
  const { unit } = QUANTITY_KINDS[kind];
  const read = parseQuantity(text);
  const value = read.ok && read.quantity !== null ? quantityIn(read.quantity, kind) : null;
  const refuse = (why: string): never => {
    throw new CommandFault(
      EXIT.fault,
      `${option}: ${why}; found ${safeText(text, 80)}; expected ${describeKind(kind)}.`,
    );
  };
  if (value === null) return refuse('this cannot be read');
  if (!(value > above)) return refuse(`it must be above ${above} ${unit}`);
  if (value > most) return refuse(`it must be ${most} ${unit} or less`);
  return value;
}
