import { type Markup, markup } from './markup.js';

const LONGEST = 60;

/** A name from a design, cut to a length that fits a label. */
export function shortName(name: string, longest = LONGEST): string {
  const characters = [...name.replace(/\s+/gu, ' ')];
  return characters.length <= longest ? characters.join('') : `${characters.slice(0, longest - 1).join('')}…`;
}

/** The same for running text: kept apart from the direction of writing around it. */
export function nameText(name: string, longest = LONGEST): Markup {
  return markup`<bdi>${shortName(name, longest)}</bdi>`;
}
