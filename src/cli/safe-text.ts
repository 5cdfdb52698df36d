import { stripVTControlCharacters } from 'node:util';

/**
 * Characters that move the cursor, hide or reorder what follows: C0, DEL, C1, soft hyphen, line and paragraph separators,
 * zero-width and bidirectional marks, tag characters, lone surrogates.
 */
const UNSAFE = /[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu;

/**
 * Text from a design file, made fit to print on a terminal as one line: escape sequences go, other control characters
 * and line breaks become one space each.
 * @param longest cut to this many characters, with an ellipsis
 */
export function safeText(text: string, longest = 400): string {
  const clean = stripVTControlCharacters(text).replace(UNSAFE, ' ');
  const characters = [...clean];
  return characters.length <= longest ? clean : `${characters.slice(0, longest - 1).join('')}…`;
}
