import { nearestName } from '../../units/nearest-name.js';
import { CommandFault } from '../command-fault.js';
import { EXIT } from '../exit-codes.js';
import { safeText } from '../safe-text.js';

/** "There is no dye called …. Did you mean …? There is …." */
export function unknownNameFault(what: string, name: string, names: readonly string[]): CommandFault {
  const nearest = nearestName(name, names);
  const hint = nearest === null ? '' : ` Did you mean ${safeText(nearest)}?`;
  const known = names.length === 0 ? 'There is none.' : `There is ${names.map((each) => safeText(each)).join(', ')}.`;
  return new CommandFault(EXIT.fault, `There is no ${what} called "${safeText(name)}".${hint} ${known}`);
}
