import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { escapeText, join, markup, trusted } from '../../src/report/markup.js';

describe('markup', () => {
  it('escapes what comes from outside and keeps what it built itself', () => {
    const inner = markup`<b title="${'"><script>'}">${'a & b'}</b>`;
    expect(inner.text).toBe('<b title="&quot;&gt;&lt;script&gt;">a &amp; b</b>');
    expect(markup`<p>${inner}${[inner, "it's"]}${null}${3}</p>`.text).toBe(
      `<p>${inner.text}${inner.text}it&#39;s3</p>`,
    );
    expect(join(['<', '>'], trusted('<br>')).text).toBe('&lt;<br>&gt;');
  });

  it('shows what reorders or hides its neighbours as a code point', () => {
    expect(escapeText('a\u202eb\u0000c\u200bd')).toBe('a⟨U+202E⟩b⟨U+0000⟩c⟨U+200B⟩d');
    expect(escapeText('one\r\ntwo\tthree')).toBe('one\ntwo\tthree');
  });

  it('leaves no sign that could open or close an element, an attribute or an entity, whatever the text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const escaped = escapeText(text);
        expect(escaped).not.toMatch(/[<>"']/);
        expect(escaped.replace(/&(?:amp|lt|gt|quot|#39);/g, '')).not.toContain('&');
      }),
    );
  });
});
