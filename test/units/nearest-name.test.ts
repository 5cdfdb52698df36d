import { expect, test } from 'vitest';
import { editDistance, nearestName } from '../../src/units/nearest-name.js';

test('edit distances of worked examples (Wagner & Fischer 1974; kitten/sitting and ca/abc are the usual ones, from memory)', () => {
  expect(editDistance('kitten', 'sitting')).toBe(3);
  expect(editDistance('saturday', 'sunday')).toBe(3);
  expect(editDistance('ca', 'abc')).toBe(3); // optimal string alignment; 2 for the unrestricted distance
  expect(editDistance('ab', 'ba')).toBe(1);
  expect(editDistance('', 'abc')).toBe(3);
});

test('offers the nearest name, and none when nothing is near', () => {
  const names = ['front', 'back', 'left', 'right', 'top', 'bottom'];
  expect(nearestName('frnot', names)).toBe('front');
  expect(nearestName('Top', names)).toBe('top');
  expect(nearestName('lid', names)).toBeNull();
  expect(nearestName('x', ['y'])).toBeNull();
  expect(nearestName('anything', [])).toBeNull();
});
