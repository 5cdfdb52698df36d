/** Checks that what a design refers to exists. */
import { nearestName } from '../units/nearest-name.js';
import type { Reference } from './form-scalars.js';
import type { Reading } from './reading.js';

const MOST_LISTED = 12;

/** True when the name is among `names`; else reports it with the nearest right one. Blank references are passed over. */
export function checkReference(
  { name, path }: Reference,
  names: readonly string[],
  problem: string,
  reading: Reading,
  at: 'key' | null = null,
): boolean {
  if (names.includes(name)) return true;
  if (name === '') return false;
  const nearest = nearestName(name, names);
  const hint = nearest === null ? {} : { suggestion: nearest };
  reading.report({ code: 'unknown-name', path, problem, found: name, expected: listNames(names), ...hint }, at);
  return false;
}

function listNames(names: readonly string[]): string {
  if (names.length === 0) return 'none is there to choose from';
  const more = names.length - MOST_LISTED;
  return `one of ${names.slice(0, MOST_LISTED).join(', ')}${more > 0 ? ` and ${more} more` : ''}`;
}

/** Names given twice in a list of named things. */
export function reportRepeatedNames(names: readonly Reference[], reading: Reading): void {
  const seen = new Set<string>();
  for (const { name, path } of names) {
    if (name !== '' && seen.has(name)) {
      reading.report({
        code: 'type',
        path,
        problem: 'the name is taken already',
        found: name,
        expected: 'another name',
      });
    }
    seen.add(name);
  }
}
