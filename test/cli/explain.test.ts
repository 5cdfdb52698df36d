/** `stokeswell explain`: the built command, and how words are matched. */
import { tmpdir } from 'node:os';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findTerm } from '../../src/cli/find-term.js';
import { TERMS } from '../../src/terms/all-terms.js';
import { runCli } from './run-cli.js';

const explain = (words: readonly string[], env: Readonly<Record<string, string>> = {}) =>
  runCli(['explain', ...words], { cwd: tmpdir(), env });

describe('findTerm', () => {
  it.each([
    ['exitPower', 'exit power'],
    ['exit power', 'exit power'],
    ['EXIT-POWER', 'exit power'],
    ['exit_power', 'exit power'],
    ['lumens', 'luminous flux'],
    ['Etendue', 'étendue'],
    ['étendue', 'étendue'],
    ['±', 'standard error'],
    ['left-by-exit', 'left by the exit'],
    ['V(λ)', 'V(λ)'],
    ['W/cm³', 'absorbed power density'],
    ['finish', 'finish'],
    ['stokes shif', 'Stokes shift'],
  ])('%s is %s', (written, name) => {
    const answer = findTerm(written);
    expect(answer.found && answer.term.name).toBe(name);
  });

  it('finds every term by its id, its name and its other words', () => {
    for (const { id, name, also = [] } of TERMS) {
      for (const word of [id, name, ...also]) {
        const answer = findTerm(word);
        expect(answer.found && answer.term.id, word).toBe(id);
      }
    }
  });

  it('offers what may have been meant, and nothing for what is like nothing', () => {
    expect(findTerm('luminus flux')).toEqual({ found: false, nearest: ['luminous flux'] });
    const spectra = findTerm('spectr');
    expect(spectra.found).toBe(false);
    expect(!spectra.found && spectra.nearest.length).toBeGreaterThan(1);
    for (const nothing of ['', '   ', '-', 'qqqqqqqqqqqqqq', 'x'.repeat(10_000)])
      expect(findTerm(nothing)).toEqual({ found: false, nearest: [] });
  });

  it('stands any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 200 }), (text) => {
        const answer = findTerm(text);
        expect(answer.found || answer.nearest.length <= 8).toBe(true);
      }),
    );
  });
});

describe('stokeswell explain', () => {
  it('says a term in four lines, words without quotes', async () => {
    const { code, out, err } = await explain(['exit', 'power']);
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out).toMatch(
      /^exit power \(exitPower, .*\)\n {2}means .+\n {2}formula .+\n {2}assumes .+\n {2}source .+\n$/,
    );
  });

  it('lists all terms by question, in 80 columns without colour', async () => {
    const { code, out } = await explain([], { NO_COLOR: '1' });
    expect(code).toBe(0);
    const flowed = out.replace(/\s+/g, ' ');
    for (const { name } of TERMS) expect(flowed).toContain(name);
    expect(out.match(/^\S.*\?$/gm)).toHaveLength(4);
    for (const line of out.split('\n')) expect([...line].length).toBeLessThanOrEqual(80);
    expect(out).not.toContain('\u001b');
  });

  it('prints every term in ASCII where nothing else would print', async () => {
    const { out } = await explain(['--json']);
    expect(JSON.parse(out)).toEqual(TERMS);
    const { fitToStyle, styleFor } = await import('../../src/cli/terminal-style.js');
    const ascii = styleFor(false, { LANG: 'C' });
    for (const { name, means, formula, assumes, source } of TERMS) {
      const text = fitToStyle([name, means, formula, assumes, source].join('\n'), ascii);
      expect.soft(text).not.toContain('?');
    }
  });

  it('ends with 2 and the nearest names for a word it does not know', async () => {
    const { code, out, err } = await explain(['boling time']);
    expect({ code, out }).toEqual({ code: 2, out: '' });
    expect(err).toContain('No term is called "boling time"');
    expect(err).toContain('time to boiling');
    const many = await explain(['uniformity']);
    expect(many.code).toBe(2);
    expect(many.err).toContain('It may be one of these:\n');
  });

  it.each([
    ['control characters', 'exit\u001b[2J\u001b]0;title\u0007\r\npower\u202e'],
    ['10 kB', 'power '.repeat(1700)],
    ['markup', '<script>globalThis.pwned = 1</script>'],
  ])('hostile words do no harm: %s', async (_, text) => {
    const { code, out, err } = await explain([text]);
    expect(code === 2 || out.startsWith('exit power')).toBe(true);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are the point
    expect(out + err).not.toMatch(/[\x00-\x09\x0b-\x1f\x7f-\x9f\u202e]/);
    expect(err.length).toBeLessThan(600);
    expect(err).not.toContain('defect');
  });
});
