/** The sheet of three views: by structure. Sizes are those of the design files, projections those of ISO 5456-2 (third angle; from memory). */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawDescription } from '../../src/drawing/draw-description.js';
import type { Drawing } from '../../src/record/drawing.js';
import { threeView } from '../../src/report/charts/three-view.js';
import { arrangeMeasures, type Measure, measuresOf } from '../../src/report/three-view/dimensions.js';
import { linePath } from '../../src/report/three-view/line-paths.js';
import { mergeLines } from '../../src/report/three-view/merge-lines.js';
import { occludersOf } from '../../src/report/three-view/occluders.js';
import { sheetBounds } from '../../src/report/three-view/sheet-bounds.js';
import { layOutSheet } from '../../src/report/three-view/sheet-layout.js';
import { type FlatLine, FRONT, RIGHT, seen, TOP } from '../../src/report/three-view/view.js';
import { viewLines } from '../../src/report/three-view/view-lines.js';
import { shipped, shippedNames } from '../geometries/shipped.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';
import { HOSTILE_TEXTS } from './hostile-run.js';

const about = { title: 'Loom strobe', file: 'loom.yaml', dials: { depth: '8 mm' } };
const sheetOf = (drawing: Drawing) => threeView(drawing, about, 'sheet').text;
const textsOf = (svg: string) => [...svg.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, text]) => text);
const drawn = (...parts: Parameters<typeof part>[]) =>
  drawDescription(
    describeDesign({
      media: [medium('glass', 1.5)],
      parts: parts.map((words) => part(...words)),
      pumps: [beam([0, 0, -9], [0, 0, 1], { name: 'bank', power: 7.5, wavelengthNm: 445 })],
      exit: `${parts[0][0]}.top`,
    }),
  );
const length = (lines: readonly FlatLine[]) =>
  lines.reduce((sum, [a, b]) => sum + Math.hypot(b[0] - a[0], b[1] - a[1]), 0);
const linesOf = (drawing: Drawing, view = FRONT) => viewLines(drawing, view, occludersOf(drawing, view, 10), 10);

describe('three views', () => {
  it('are aligned: the top view above the front, the right view level with it, at one scale', () => {
    const layout = layOutSheet(drawDescription(shipped('two-bank-even-spread')));
    const [top, front, right] = layout.views;
    expect([top.left, top.right]).toEqual([front.left, front.right]);
    expect([right.top, right.bottom]).toEqual([front.top, front.bottom]);
    expect(top.bottom).toBeLessThan(front.top);
    expect(right.left).toBeGreaterThan(front.right);
    // A point in front (−y) is at the foot of the top view and at the left of the right view; +x at the right of the front view.
    expect(top.place([0, -5])[1]).toBeGreaterThan(top.place([0, 5])[1]);
    expect(right.place([-5, 0])[0]).toBeLessThan(right.place([5, 0])[0]);
    expect([FRONT, TOP, RIGHT].map((view) => seen(view, [1, 2, 3]))).toEqual([
      [1, 3, -2],
      [1, 2, 3],
      [2, 3, 1],
    ]);
    expect((front.right - front.left) / 22).toBeCloseTo(layout.scale, 9);
  });

  it.each(shippedNames())('%s: sizes, names, pumps, exit and dials are on the sheet', (name) => {
    const description = shipped(name);
    const drawing = drawDescription(description);
    const svg = sheetOf(drawing);
    const words = textsOf(svg).join('\n');
    for (const { bounds, faces } of drawing.parts) {
      for (const axis of [0, 1, 2])
        expect(words).toContain(String(Number((bounds[1][axis] - bounds[0][axis]).toFixed(3))));
      // Nine designs have room for the name of every face that is left of it.
      for (const { name: face, triangles, isExit } of faces) {
        if (triangles.length > 0) expect(words.split('\n')).toContain(isExit ? `${face} (exit)` : face);
      }
    }
    for (const pump of description.pumps)
      expect(words).toContain(`${pump.name}: ${pump.power} W, ${Number(pump.wavelengthNm.toPrecision(6))} nm`);
    for (const finish of new Set(drawing.parts.flatMap(({ faces }) => faces.map((face) => face.finish)))) {
      expect(words).toContain(finish);
    }
    expect(words).toContain('Third-angle projection');
    expect(svg).toBe(sheetOf(drawing));
    expect(svg).not.toMatch(/NaN|Infinity|undefined/);
    expect(svg.length).toBeLessThan(100_000);
  });

  it('stays whole with 30 parts: every face is named beside a view, numbered or listed, once', () => {
    const many = drawn(
      ...Array.from(
        { length: 30 },
        (_, i): Parameters<typeof part> => [
          `part-${i}`,
          i % 2 === 0 ? { kind: 'box', size: [3, 3, 2 + (i % 5)] } : { kind: 'cylinder', radius: 1.5, height: 3 },
          'glass',
          { at: [(i % 6) * 5, Math.floor(i / 6) * 5, i % 3] },
        ],
      ),
    );
    const words = textsOf(sheetOf(many)).join(' ');
    for (const { name, isExit } of many.parts.flatMap(({ faces }) => faces)) {
      const once = new RegExp(`(^|[ ,])${name.replace('.', '\\.')}(?=[ ,]|$)`, 'g');
      // The exit is named in its own list besides.
      expect([name, words.match(once)?.length]).toEqual([name, isExit ? 2 : 1]);
    }
  });

  it.each(HOSTILE_TEXTS.map((text, i) => [i, text] as const))(
    'escapes hostile text %i wherever a name stands',
    (_, text) => {
      const drawing = drawn(['a', { kind: 'box', size: [2, 2, 2] }, 'glass']);
      const hostile: Drawing = {
        ...drawing,
        parts: drawing.parts.map((one) => ({
          ...one,
          name: text,
          medium: text,
          faces: one.faces.map((face) => ({ ...face, name: text, finish: text, finishKind: text })),
        })),
        pumps: drawing.pumps.map((pump) => ({ ...pump, name: text })),
        planes: [{ name: text, isExit: false, normal: [0, 0, 1], edges: [0, 0, 0, 1, 0, 0] }],
      };
      const svg = threeView(hostile, { title: text, file: text, dials: { [text]: text } }, 'sheet').text;
      const tags = new Set([...svg.matchAll(/<\/?([^\s>/]+)/g)].map(([, tag]) => tag));
      expect([...tags].sort()).toEqual(['circle', 'desc', 'g', 'path', 'rect', 'style', 'svg', 'text', 'title']);
      expect(svg).not.toMatch(/\son\w+\s*=\s*["'](?!&)/);
      // biome-ignore lint/suspicious/noControlCharactersInRegex: there must be none
      expect(svg).not.toMatch(/[\u0000-\u0008\u202e\u2066\ud800]/);
      expect(svg.length).toBeLessThan(60_000);
    },
  );
});

describe('lines of a view', () => {
  it('a box behind another is hidden as far as that covers it', () => {
    const one = linesOf(drawn(['a', { kind: 'box', size: [4, 2, 4] }, 'glass']));
    expect(length(one.visible)).toBeCloseTo(16, 6);
    expect(one.hidden).toEqual([]);
    const two = linesOf(
      drawn(
        ['a', { kind: 'box', size: [4, 2, 4] }, 'glass'],
        ['b', { kind: 'box', size: [4, 2, 2] }, 'glass', { at: [2, 5, 0] }],
      ),
    );
    // Of the far box, 4 × 2 mm, a half stands out: two sides of 2 mm and one upright of 2 mm.
    expect(length(two.visible)).toBeCloseTo(16 + 6, 2);
    expect(length(two.hidden)).toBeCloseTo(6, 2);
  });

  it('a bore is dashed from the side and round from above; a ball shows its contour', () => {
    const bored = drawn([
      'a',
      { kind: 'box', size: [4, 4, 4] },
      'glass',
      { minus: [{ name: 'bore', shape: { kind: 'cylinder', radius: 1, height: 4 } }] },
    ]);
    expect(length(linesOf(bored).hidden)).toBeCloseTo(8, 2);
    expect(length(linesOf(bored, TOP).visible)).toBeCloseTo(16 + 2 * Math.PI, 1);
    const ball = drawn(['a', { kind: 'sphere', radius: 2 }, 'glass']);
    for (const view of [FRONT, TOP, RIGHT]) {
      expect(length(linesOf(ball, view).visible) / (4 * Math.PI)).toBeGreaterThan(0.99);
      expect(length(linesOf(ball, view).visible) / (4 * Math.PI)).toBeLessThan(1.001);
      expect(linesOf(ball, view).hidden).toEqual([]);
    }
  });

  it('what lies on one another is drawn once, the seen before the hidden', () => {
    const merged = mergeLines(
      [
        [
          [0, 0],
          [2, 0],
        ],
        [
          [3, 0],
          [1, 0],
        ],
      ],
      [
        [
          [2, 0],
          [5, 0],
        ],
      ],
      10,
    );
    expect(length(merged.visible)).toBeCloseTo(3, 9);
    expect(length(merged.hidden)).toBeCloseTo(2, 9);
  });

  it('paths round gentle turns and keep corners', () => {
    const ring = Array.from({ length: 48 }, (_, i): FlatLine => {
      const at = (k: number) => [100 * Math.cos((k * Math.PI) / 24), 100 * Math.sin((k * Math.PI) / 24)] as const;
      return [at(i), at(i + 1)];
    });
    const round = linePath(ring, (point) => point);
    expect(round.match(/C/g)?.length).toBe(48);
    expect(round).not.toContain('L');
    const corner = linePath(
      [
        [
          [0, 0],
          [1, 0],
        ],
        [
          [1, 1],
          [1, 0],
        ],
      ],
      (point) => point,
    );
    expect(corner).toBe('M0 0L1 0L1 1');
  });
});

describe('dimensions', () => {
  it('equal ones are drawn once, none stands over another, the whole is always there', () => {
    const spans = fc.array(fc.tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 1, max: 40 })), {
      minLength: 1,
      maxLength: 40,
    });
    fc.assert(
      fc.property(spans, fc.double({ min: 0.5, max: 30, noNaN: true }), (list, scale) => {
        const drawing = drawn(
          ...list.map(
            ([low, size], i): Parameters<typeof part> => [
              `part-${i}`,
              { kind: 'box', size: [size, 1, 1] },
              'glass',
              { at: [low + size / 2, 0, 0] },
            ],
          ),
        );
        const measures = measuresOf(drawing, sheetBounds(drawing).parts, 0, 2, -1);
        const key = ({ low, high }: Measure) => `${low} ${high}`;
        expect(new Set(measures.map(key)).size).toBe(measures.length);
        const { rows, left } = arrangeMeasures(measures, scale);
        expect(rows.length + left).toBe(measures.length);
        expect(rows.some(({ parts }) => parts.includes('all parts'))).toBe(true);
        for (const a of rows) {
          for (const b of rows) {
            if (a !== b && a.row === b.row) expect(a.low < b.high - 1e-9 && b.low < a.high - 1e-9).toBe(false);
          }
        }
      }),
      { numRuns: 15 },
    );
  });

  it('far pumps leave the scale alone and are marked at the edge', () => {
    const near = drawDescription(shipped('rod-fed-cell'));
    const far = drawDescription(shipped('two-bank-box-cell'));
    expect(sheetBounds(near).far.size).toBe(0);
    expect(sheetBounds(far).far.size).toBe(2);
    expect(textsOf(sheetOf(far)).join(' ')).toContain('(beyond the views)');
  });
});
