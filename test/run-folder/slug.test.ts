import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { slug, uniqueSlugs } from '../../src/run-folder/slug.js';

const anyText = fc.oneof(
  fc.string({ unit: 'binary', maxLength: 300 }),
  fc.string({
    unit: fc.constantFrom('.', '/', '\\', '\0', '\n', '-', ' ', 'A', 'é', '漢', '\u202e', '\ud800', '👩‍🔬'),
  }),
);

describe('slug', () => {
  it('keeps words of any script', () => {
    expect(slug('Loom strobe, two-bank box cell', 'x')).toBe('loom-strobe-two-bank-box-cell');
    expect(slug('Стробоскоп №2', 'x')).toBe('стробоскоп-no2');
    expect(slug('../../etc/passwd', 'x')).toBe('etc-passwd');
    expect(slug('CON', 'design')).toBe('design-con');
    expect(slug('...', 'design')).toBe('design');
  });

  it('is a safe file name whatever the text', () => {
    fc.assert(
      fc.property(anyText, (text) => {
        const name = slug(text, 'design');
        expect(name).toMatch(/^[\p{L}\p{N}][\p{L}\p{M}\p{N}-]*$/u);
        expect(name).not.toMatch(/-$/);
        expect([...name].length).toBeLessThanOrEqual(60);
        expect(Buffer.byteLength(name)).toBeLessThanOrEqual(130);
        expect(name).not.toMatch(/^(con|nul|aux|prn|com\d|lpt\d)$/);
      }),
    );
  });

  it('gives no two texts of a list the same name', () => {
    const few = fc.constantFrom('a', 'A', 'a-2', 'a.2', '', '.', 'a-2-2');
    fc.assert(
      fc.property(fc.array(fc.oneof(few, anyText), { maxLength: 12 }), (texts) => {
        const names = uniqueSlugs(texts, 'map');
        expect(new Set(names).size).toBe(texts.length);
      }),
    );
  });
});
