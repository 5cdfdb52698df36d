import { describe, expect, it } from 'vitest';
import { fitToStyle, styleFor } from '../../src/cli/terminal-style.js';

describe('styleFor', () => {
  it.each([
    [false, {}, false],
    [true, {}, true],
    [false, { LANG: 'de_DE.UTF-8' }, true],
    [true, { LANG: 'de_DE.UTF-8', LC_ALL: 'C' }, false],
    [false, { LC_CTYPE: 'C.utf8' }, true],
  ])('terminal %s, %j: beyond ASCII %s', (isTerminal, environment, unicode) => {
    expect(styleFor(isTerminal, environment).unicode).toBe(unicode);
  });

  it.each([
    [true, { TERM: 'xterm' }, true],
    [false, { TERM: 'xterm', CI: '1', FORCE_COLOR: '3' }, false],
    [true, { TERM: 'xterm', NO_COLOR: '1' }, false],
    [true, { TERM: 'dumb' }, false],
  ])('terminal %s, %j: colour %s', (isTerminal, environment, colour) => {
    expect(styleFor(isTerminal, environment).bold('x') !== 'x').toBe(colour);
  });
});

describe('fitToStyle', () => {
  it('spells signs out in ASCII and leaves them alone otherwise', () => {
    const text = '1 ± 2 W/cm³, 5 µm – 織';
    expect(fitToStyle(text, styleFor(false, { LANG: 'C' }))).toBe('1 +- 2 W/cm3, 5 um - ?');
    expect(fitToStyle(text, styleFor(false, { LANG: 'C.UTF-8' }))).toBe(text);
  });
});
