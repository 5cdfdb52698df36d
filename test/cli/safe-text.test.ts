import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { safeText } from '../../src/cli/safe-text.js';

describe('safeText', () => {
  it('takes out escape sequences, controls, bidirectional and invisible marks', () => {
    // Sequences after ECMA-48 (CSI) and common practice of terminals (OSC 8 hyperlinks).
    expect(safeText('a\u001b[31mred\u001b[0m')).toBe('ared');
    expect(safeText('\u001b]8;;http://x.test\u0007link\u001b]8;;\u0007')).toBe('link');
    expect(safeText('line\r\nnext\u0007\u009b2J')).not.toMatch(/\p{Cc}/u);
    expect(safeText('a\u202eb\u200bc\u2066d')).toBe('a b c d');
  });

  it('leaves letters of any script alone', () => {
    expect(safeText('Gewebe, grün – 織機 µW/cm²')).toBe('Gewebe, grün – 織機 µW/cm²');
  });

  it('cuts what is too long', () => {
    expect(safeText('abcdef', 4)).toBe('abc…');
  });

  it('never lets a control or format character through', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 60 }), (text) => {
        expect(safeText(text)).not.toMatch(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]/u);
      }),
      { seed: 20261201 },
    );
  });
});
