import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { TERMS, termById } from '../../src/terms/all-terms.js';
import { termOfRow } from '../../src/terms/fate-terms.js';
import { termOfFault } from '../../src/terms/fault-terms.js';
import { fateWords } from '../../src/terms/ledger-words.js';
import { LONGEST_LINE, type Term } from '../../src/terms/term.js';

const LINES = ['means', 'formula', 'assumes', 'source'] as const satisfies readonly (keyof Term)[];
const plain = (text: string): string => text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');

describe('the table of terms', () => {
  it('explains each in four lines that fit 80 columns with their labels', () => {
    for (const term of TERMS) {
      for (const line of LINES) {
        const { length } = [...term[line]];
        expect.soft(length, `${term.id}: ${line} "${term[line]}"`).toBeLessThanOrEqual(LONGEST_LINE);
        expect.soft(length, `${term.id}: ${line}`).toBeGreaterThan(3);
        expect.soft(term[line], `${term.id}: ${line}`).toMatch(/[^.\s]$/);
      }
      expect.soft([...term.name].length, term.id).toBeLessThanOrEqual(34);
    }
  });

  it('has ids and names that no other term has', () => {
    for (const key of ['id', 'name'] as const) {
      const all = TERMS.map((term) => plain(term[key]));
      expect(all.filter((one, i) => all.indexOf(one) !== i)).toEqual([]);
    }
    // Ids stand in addresses within the page.
    for (const { id } of TERMS) expect(id).toMatch(/^[A-Za-z0-9-]+$/);
  });

  it('uses no word of its own meaning for another term', () => {
    const meant = new Map<string, string>();
    for (const { id, name, also = [] } of TERMS) {
      for (const word of new Set([id, name, ...also].map(plain))) {
        expect.soft(meant.get(word) ?? id, `"${word}"`).toBe(id);
        meant.set(word, id);
      }
    }
  });

  it('names a fate as the ledger words it', () => {
    const row = { where: null, by: null, fraction: 1, standardError: null };
    for (const fate of ['missed', 'reflected-at-entry', 'left-by-exit', 'left-elsewhere', 'trapped'] as const) {
      for (const light of ['pump', 'emitted'] as const) {
        expect(termById(termOfRow({ fate, light }))?.name).toBe(fateWords({ ...row, fate, light }));
      }
    }
    for (const [fate, own] of [
      ['absorbed-by-solid', 'absorbed by a solid'],
      ['absorbed-by-solvent', 'absorbed by a solvent'],
      ['absorbed-by-finish', 'absorbed by a finish'],
      ['lost-in-dye', 'not re-emitted'],
      ['stokes-heat', 'Stokes heat'],
    ] as const) {
      expect(termById(termOfRow({ fate, light: 'pump' }))?.name).toBe(own);
    }
  });
});

/** Sentences of all warnings in the source, with `X` where a name is put in. */
function warnings(): string[] {
  const src = join(import.meta.dirname, '../../src');
  const files = readdirSync(src, { recursive: true, encoding: 'utf8' }).filter(
    (name) => name.endsWith('.ts') && !name.startsWith('terms'),
  );
  return files.flatMap((name) => {
    const text = readFileSync(join(src, name), 'utf8');
    const told = text.matchAll(/severity: 'warning',\s*path[\s\S]{0,80}?problem:?\s*([`'][^\n]+)/g);
    const unused = text.matchAll(/\bcaution\([^\n]*?, ('[^']+'), name\)/g);
    return [...told, ...unused].map(([, sentence]) =>
      sentence.replace(/\$\{[^}]*\}/g, 'X').replace(/^[`']|[`'],?$/g, ''),
    );
  });
}

describe('the checks', () => {
  const sentences = warnings();

  it('are all found in the source', () => {
    expect(sentences.length).toBeGreaterThanOrEqual(13);
  });

  it.each(sentences)('"%s" has a term of its own', (problem) => {
    const id = termOfFault({ code: 'caution', severity: 'warning', problem });
    expect(id).not.toBe('fault-caution');
    expect(termById(id)).toBeDefined();
  });

  it('a warning not known is explained by its code, an error too', () => {
    expect(termOfFault({ code: 'caution', severity: 'warning', problem: 'thin wall' })).toBe('fault-caution');
    expect(termOfFault({ code: 'range', severity: 'error', problem: 'the value is too large' })).toBe('fault-range');
  });
});
