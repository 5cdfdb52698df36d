import { visibleText } from '../markup.js';
import { shortName } from '../name-text.js';

const NAME_LETTERS = 60;

/** A name as both the page's scripts and its text know it: cut, and with nothing unseen in it. */
export const viewName = (name: string): string => visibleText(shortName(name, NAME_LETTERS));
