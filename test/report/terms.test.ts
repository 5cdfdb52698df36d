import { describe, expect, it } from 'vitest';
import type { RunRecord } from '../../src/record/run-record.js';
import { runPage } from '../../src/report/run-page.js';
import { markedWords, termMark } from '../../src/report/term-mark.js';
import { termById } from '../../src/terms/all-terms.js';
import { termOfRow } from '../../src/terms/fate-terms.js';
import { termOfFault } from '../../src/terms/fault-terms.js';
import { termOfMap } from '../../src/terms/picture-terms.js';
import { sampleRun } from '../run-folder/sample-run.js';
import { HOSTILE_TEXTS, hostileRun } from './hostile-run.js';
import { realRun } from './real-run.js';

const idsOf = (page: string): string[] => [...page.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id);
const marksOf = (page: string): string[] =>
  [...page.matchAll(/class="mark" popovertarget="([^"]+)"/g)].map(([, id]) => id);

/** Every mark leads to an entry, every entry has a mark, each text stands once. */
function expectWhole(page: string): void {
  const ids = idsOf(page);
  const marks = new Set(marksOf(page));
  expect(marks.size).toBeGreaterThan(30);
  for (const mark of marks) expect(ids.filter((id) => id === mark)).toHaveLength(1);
  expect(ids.filter((id) => id.startsWith('term-')).toSorted()).toEqual([...marks].toSorted());
}

function expectExplained(page: string, { figures, ledger, maps, checks, run }: RunRecord): void {
  const marks = new Set(marksOf(page));
  const wanted = [
    ...Object.keys(figures),
    ...[...ledger.watts, ...ledger.photons].map(termOfRow),
    ...maps.map(({ what }) => termOfMap(what)),
    ...checks.map(termOfFault),
    `stop-${run.stopReason}`,
  ];
  for (const id of wanted) expect.soft([...marks], id).toContain(`term-${id}`);
  for (const of of ['watts', 'photons'] as const) {
    const table = new RegExp(`<table class="ledger" data-ledger="${of}">[\\s\\S]*?</table>`).exec(page)?.[0] ?? '';
    const lines = table.match(/<tr><td>[\s\S]*?<\/tr>/g) ?? [];
    expect(lines).toHaveLength(ledger[of].length);
    for (const line of lines) expect(line).toContain('class="mark"');
  }
}

describe('terms of the page', () => {
  it('explains every figure, fate, map and check of a real run', async () => {
    const { record, arrays } = await realRun('geometries/two-bank-poor-spread.yaml', 4096);
    const page = runPage(record, arrays);
    expectWhole(page);
    expectExplained(page, record);
    for (const heading of page.match(/<figcaption><h3>[\s\S]*?<\/h3>/g) ?? [])
      expect(heading).toContain('class="mark"');
    // Marks and texts together are a small part of a page of 3 MB at most.
    const size = (text: string | undefined) => Buffer.byteLength(text ?? '');
    expect(size(/<section id="terms">[\s\S]*<\/section>/.exec(page)?.[0])).toBeLessThan(60_000);
    expect(size(page.match(/<button [^>]*class="mark"[^>]*>/g)?.join(''))).toBeLessThan(40_000);
  });

  it('explains figures that have no value', () => {
    const { record, arrays } = sampleRun();
    const figures = Object.fromEntries(
      Object.entries(record.figures).map(([name, figure]) => [name, { ...figure, value: null, standardError: null }]),
    ) as RunRecord['figures'];
    const page = runPage({ ...record, figures }, arrays);
    expectWhole(page);
    expectExplained(page, record);
    const answers = /<section id="answers"[\s\S]*?<\/section>/.exec(page)?.[0] ?? '';
    for (const name of [
      'exitPower',
      'luminousFlux',
      'exitUniformityVariation',
      'peakAbsorbedPowerDensity',
      'timeToBoiling',
    ])
      expect(answers).toContain(`popovertarget="term-${name}"`);
  });

  it.each(HOSTILE_TEXTS.map((text) => [text.slice(0, 50), text] as const))(
    'text from outside makes no mark: %s',
    (_, text) => {
      const { record, arrays } = hostileRun(`${text} " popovertarget="term-no-such" class="mark"`);
      const page = runPage(record, arrays);
      expectWhole(page);
      expect(page).not.toContain('popovertarget="term-no-such"');
    },
  );

  it('names a mark by its term', () => {
    const name = termById('exitPower')?.name;
    expect(termMark('exitPower')?.text).toContain(`aria-label="what ${name} means"`);
    expect(termMark('no-such')).toBeNull();
    expect(markedWords('heat in the dye', 'heat').text).toMatch(/^heat in the <span class="figure">dye<button /);
  });
});
