import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Description } from '../../src/design/description.js';
import type { FaultCode, LocatedFault } from '../../src/design/fault.js';
import { formatFault } from '../../src/design/format-fault.js';
import { locateFaults, type ReadDesignOptions, readDesignText } from '../../src/design/read-design.js';
import { starterDesign } from '../../src/design/starter-design.js';
import { readDye } from '../../src/materials/library.js';

/** The sketch of a two-bank box cell, the way designs are first written. */
const CELL = `design: Two-bank box cell, green
dials:
  strength: 0.20 mmol/L
  depth: 8 mm
media:
  bath: { solvent: ethanol, pH: 11, dyes: { fluorescein: strength } }
  window: borosilicate-crown
finishes:
  blue-pass: { dichroic: { edge: 490 nm, passes: below, transmits: 95 %, reflects: 98 % } }
  aluminium: { mirror: aluminium }
parts:
  cell: { box: [20 mm, 8 mm, depth], medium: bath,
          faces: { front: blue-pass, back: blue-pass, left: aluminium, right: aluminium, bottom: aluminium } }
  lid: { box: [20 mm, 8 mm, 1 mm], medium: window, against: cell.top }
pumps:
  front-bank: { diodes: { across: 6, along: 4, pitch: [3 mm, 2 mm] }, power: 60 W, wavelength: 445 nm, linewidth: 2 nm,
                divergence: [2 deg, 6 deg], toward: cell.front, distance: 40 mm, wall-plug: 32 % }
exit: lid.top
`;

function describeText(text: string, options: ReadDesignOptions = {}): Description {
  const reading = readDesignText(text, 'cell.yaml', options);
  if (!reading.ok) throw new Error(reading.faults.map(formatFault).join('\n'));
  return reading.description;
}

function faultsOf(text: string, options: ReadDesignOptions = {}): readonly LocatedFault[] {
  const reading = readDesignText(text, 'cell.yaml', options);
  return reading.ok ? reading.warnings : reading.faults;
}

/** The cell with one passage exchanged. */
function changed(from: string, to: string): string {
  if (!CELL.includes(from)) throw new Error(`the cell has no ${from}`);
  return CELL.replace(from, to);
}

/** Line and column, from 1, of the first place where `needle` stands. */
function placeOf(text: string, needle: string): { line: number; column: number } {
  const before = text.slice(0, text.indexOf(needle)).split('\n');
  return { line: before.length, column: before[before.length - 1].length + 1 };
}

describe('the two-bank box cell', () => {
  const description = describeText(CELL);

  test('quantities come in base units, names resolved', () => {
    expect(description.title).toBe('Two-bank box cell, green');
    expect(description.dials).toEqual([
      { name: 'strength', text: '0.20 mmol/L', value: 0.0002 },
      { name: 'depth', text: '8 mm', value: 8 },
    ]);
    const [cell, lid] = description.parts;
    expect(cell.pieces).toEqual([
      {
        name: null,
        path: ['parts', 'cell'],
        shape: { kind: 'box', size: [20, 8, 8] },
        at: [0, 0, 0],
        turns: [],
        minus: [],
      },
    ]);
    expect(cell.faces[0]).toEqual({ face: 'front', finish: 'blue-pass', path: ['parts', 'cell', 'faces', 'front'] });
    expect(lid.placement.against).toMatchObject({ face: 'cell.top', with: null, shift: [0, 0], gap: 0 });
    expect(description.surroundings).toBe('air');
    expect(description.media.get('air')?.kind).toBe('gas');
    expect(description.media.get('window')).toMatchObject({ kind: 'solid', base: 'borosilicate-crown', dyes: [] });
    expect([...description.finishes.keys()]).toEqual(['clear', 'black', 'blue-pass', 'aluminium']);
    expect(description.finishes.get('aluminium')).toMatchObject({ kind: 'metal', metal: 'aluminium' });
    expect(description.exit).toMatchObject({ name: 'lid.top', pixels: null });
  });

  test('divergence [fast, slow] becomes [across, along] with the fast axis along', () => {
    const degrees = (value: number) => expect.closeTo((value * Math.PI) / 180, 14);
    const [pump] = description.pumps;
    expect(pump).toMatchObject({ power: 60, wavelengthNm: 445, linewidthNm: 2, wallPlug: 0.32, driver: null });
    expect(pump.beam).toMatchObject({ kind: 'diodes', across: 6, along: 4, pitch: [3, 2], lens: null });
    expect(pump.beam).toMatchObject({ divergence: [degrees(6), degrees(2)] });
    const turned = describeText(changed('divergence: [2 deg, 6 deg]', 'divergence: [2 deg, 6 deg], fast-axis: across'));
    expect(turned.pumps[0].beam).toMatchObject({ divergence: [degrees(2), degrees(6)] });
  });

  test('the dye absorbs ln 10 · ε · c (Beer–Lambert, decadic ε; IUPAC Green Book 2007, section 2.7)', () => {
    const dye = description.media.get('bath')?.dyes[0];
    const extinction = readDye('fluorescein', 'ethanol').extinction(445);
    // 0.2 mmol/L: A per cm is ε·2e-4; e-folds per mm are a tenth of ln 10 times that.
    expect(dye?.absorption(445)).toBeCloseTo((Math.LN10 * extinction * 2e-4) / 10, 12);
    expect(dye).toMatchObject({ name: 'fluorescein', concentration: 0.0002 });
  });

  test('a strength in mg/L goes through the molar mass: 332.31 g/mol, C20H12O5 (CIAAW weights)', () => {
    const dye = describeText(changed('0.20 mmol/L', '66.462 mg/L')).media.get('bath')?.dyes[0];
    expect(dye?.concentration).toBeCloseTo(0.0002, 12);
  });

  test('the hash is the SHA-256 of the text', () => {
    const reading = readDesignText(CELL, 'cell.yaml');
    expect(reading.ok && reading.hash).toBe(createHash('sha256').update(CELL).digest('hex'));
    expect(reading.ok && reading.warnings).toEqual([]);
  });

  test('dials can be turned from outside', () => {
    const turned = describeText(CELL, { dials: { depth: '1 cm + 2 mm' } });
    expect(turned.parts[0].pieces[0].shape).toEqual({ kind: 'box', size: [20, 8, 12] });
    expect(turned.dials[1]).toEqual({ name: 'depth', text: '1 cm + 2 mm', value: 12 });
    expect(faultsOf(CELL, { dials: { depht: '1 mm' } })[0]).toMatchObject({
      code: 'unknown-name',
      suggestion: 'depth',
    });
    expect(faultsOf(CELL, { dials: { depth: '1 W' } })[0]).toMatchObject({ code: 'quantity', found: '1 W', line: 4 });
    expect(faultsOf(CELL, { dials: { depth: '1 furlong' } })[0]).toMatchObject({ code: 'quantity', found: 'furlong' });
    expect(faultsOf(CELL, { dials: { constructor: '1 mm' } })[0]).toMatchObject({ code: 'unknown-name' });
  });
});

test('the starter design has no faults and no warnings', () => {
  const reading = readDesignText(starterDesign(), 'starter.yaml');
  expect(reading.ok ? reading.warnings : reading.faults).toEqual([]);
});

test('faults of later stages find their place', () => {
  const reading = readDesignText(CELL, 'cell.yaml');
  if (!reading.ok) throw new Error('the cell is sound');
  const fault = { code: 'geometry', severity: 'error', problem: 'x' } as const;
  const located = locateFaults(reading, [
    { ...fault, path: ['exit'] },
    { ...fault, path: ['parts', 'cell'] },
    { ...fault, path: ['parts', 'cell', 'box', 1] },
    { ...fault, path: ['parts', 'lid', 'against'] },
    { ...fault, path: ['parts', 'lid', 'gap'] },
    { ...fault, path: ['surroundings'] },
  ]);
  expect(located.map(({ line, column }) => ({ line, column }))).toEqual([
    placeOf(CELL, 'lid.top'),
    placeOf(CELL, 'cell: {'),
    placeOf(CELL, '8 mm, depth'),
    placeOf(CELL, 'cell.top'),
    placeOf(CELL, 'lid: {'),
    { line: 1, column: 1 },
  ]);
  expect(located[0].file).toBe('cell.yaml');
});

describe('each fault code', () => {
  // From, to, code, where, and what else must be told.
  const cases: readonly (readonly [string, string, FaultCode, string, Partial<LocatedFault>])[] = [
    [
      'power: 60 W',
      'power: 60',
      'quantity',
      '60, wave',
      { problem: 'the number has no unit', suggestion: 'write 60 W' },
    ],
    ['power: 60 W', 'power: 60 mm', 'quantity', '60 mm', { problem: 'a length cannot stand here', found: '60 mm' }],
    ['power: 60 W', 'power: 60 furlong', 'quantity', 'furlong', { found: 'furlong' }],
    ['power: 60 W', 'power: .nan', 'quantity', '.nan', { problem: 'is not a finite number' }],
    ['power: 60 W', 'power: .inf', 'quantity', '.inf', { problem: 'is not a finite number' }],
    ['power: 60 W', 'power: NaN W', 'quantity', 'NaN W', {}],
    ['power: 60 W', 'power: 1e999 W', 'quantity', '1e999', { problem: 'is too large for a number' }],
    ['power: 60 W', 'power: no', 'unknown-name', 'no,', { found: 'no' }],
    ['power: 60 W', 'power: 1_000 W', 'quantity', '_000', { found: '_000' }],
    ['power: 60 W', 'power: strenght', 'unknown-name', 'strenght', { suggestion: 'strength' }],
    ['power: 60 W', 'power: 30 W * (1 + dept)', 'unknown-name', 'dept)', { suggestion: 'depth' }],
    ['power: 60 W', 'power: -60 W', 'range', '-60', { found: '-60 W', problem: 'the value is too small' }],
    ['power: 60 W', 'power: 0 W', 'range', '0 W, wave', { expected: 'a power, above 0 W' }],
    ['power: 60 W, ', '', 'missing', 'front-bank', { path: ['pumps', 'front-bank', 'power'] }],
    ['power: 60 W', 'power: [60 W]', 'type', '', { found: 'a list' }],
    ['power: 60 W', 'power: ', 'missing', 'power', { problem: 'the field is empty' }],
    ['power: 60 W', 'powre: 60 W', 'unknown-key', 'powre', { suggestion: 'power' }],
    ['wall-plug: 32 %', 'wall-plug: 32', 'range', '32 }', { suggestion: 'write 32 %' }],
    ['across: 6', 'across: 0', 'range', '0, along', { found: '0' }],
    ['across: 6', 'across: 2.5', 'range', '2.5', { found: '2.5' }],
    ['[20 mm, 8 mm, depth]', '[20 mm, -8 mm, depth]', 'range', '-8 mm', { path: ['parts', 'cell', 'box', 1] }],
    ['[20 mm, 8 mm, depth]', '[20 mm, 0 mm, depth]', 'range', '0 mm, depth', {}],
    ['[20 mm, 8 mm, depth]', '[20 mm, 8 mm, depth - 9 mm]', 'range', 'depth - 9', { found: 'depth - 9 mm = -1 mm' }],
    ['[20 mm, 8 mm, depth]', '[20 mm, 8 mm]', 'type', 'box: [20', { found: 'a list of 2' }],
    ['pH: 11', 'pH: 15', 'range', '15', { found: '15' }],
    ['fluorescein: strength', 'fluorescin: strength', 'unknown-name', 'fluorescin', { suggestion: 'fluorescein' }],
    ['fluorescein: strength', 'fluorescein: 3', 'quantity', '', { path: ['media', 'bath', 'dyes', 'fluorescein'] }],
    ['solvent: ethanol', 'solvent: ethanal', 'unknown-name', 'ethanal', { suggestion: 'ethanol' }],
    [
      'window: borosilicate-crown',
      'window: borosilicat-crown',
      'unknown-name',
      'borosilicat-',
      { suggestion: 'borosilicate-crown' },
    ],
    ['mirror: aluminium', 'mirror: aluminum', 'unknown-name', 'aluminum', { suggestion: 'aluminium' }],
    ['mirror: aluminium', 'mirror: 104 %', 'range', '104 %', {}],
    ['passes: below', 'passes: belo', 'unknown-name', 'belo', { suggestion: 'below' }],
    ['reflects: 98 %', 'reflects: 98 %, absorbs: 5 %', 'energy', 'dichroic', { found: 'reflects + absorbs = 103 %' }],
    ['medium: window', 'medium: windou', 'unknown-name', 'windou', { suggestion: 'window' }],
    ['front: blue-pass', 'frnot: blue-pass', 'unknown-name', 'frnot', { suggestion: 'front' }],
    ['front: blue-pass', 'front: blue-past', 'unknown-name', 'blue-past', { suggestion: 'blue-pass' }],
    ['against: cell.top', 'against: cel.top', 'unknown-name', 'cel.top', { suggestion: 'cell.top' }],
    ['against: cell.top', 'against: cell.tpo', 'unknown-name', 'cell.tpo', { suggestion: 'cell.top' }],
    ['against: cell.top', 'against: cell.top, with: botom', 'unknown-name', 'botom', { suggestion: 'bottom' }],
    ['against: cell.top', 'against: cell.top, at: [0 mm, 0 mm, 0 mm]', 'geometry', '', {}],
    ['against: cell.top', 'against: lid.top', 'unknown-name', 'lid.top }', {}],
    ['against: cell.top', 'gap: 1 mm', 'geometry', '1 mm }', { problem: 'gap has no meaning without against' }],
    ['toward: cell.front', 'toward: cell.fron', 'unknown-name', 'cell.fron', { suggestion: 'cell.front' }],
    ['distance: 40 mm, ', '', 'missing', 'front-bank', { path: ['pumps', 'front-bank', 'distance'] }],
    [
      'toward: cell.front, distance: 40 mm',
      'at: [0 mm, 0 mm, 9 mm], direction: [0, 0, 0]',
      'range',
      '',
      { found: '[0, 0, 0]' },
    ],
    ['exit: lid.top', 'exit: lid', 'unknown-name', 'lid\n', { found: 'lid' }],
    ['exit: lid.top', 'exit: { face: lid.top, pixels: [4000, 4000] }', 'range', 'pixels', { code: 'range' }],
    ['depth: 8 mm', 'depth: depth + 1 mm', 'quantity', 'depth + 1', { found: 'depth → depth' }],
    ['depth: 8 mm', 'mm: 8 mm\n  depth: 8 mm', 'type', 'mm: 8', { problem: 'a unit has this name' }],
    ['  lid:', '  li d:', 'type', 'li d', { problem: 'this cannot be a name' }],
    ['  aluminium:', '  black:', 'type', 'black', {}],
    ['  aluminium:', '  blue-pass:', 'yaml', 'blue-pass: { mirror', { found: 'blue-pass' }],
    ['exit: lid.top', 'exit: *nowhere', 'yaml', '*nowhere', { found: '*nowhere' }],
    ['exit: lid.top', 'trace: { histories: 0 }\nexit: lid.top', 'range', '0 }\nexit', { found: '0' }],
  ];
  test.each(cases)('%j → %j: %s', (from, to, code, needle, more) => {
    const text = changed(from, to);
    const place = needle === '' ? {} : placeOf(text, needle);
    expect(faultsOf(text)).toContainEqual(expect.objectContaining({ severity: 'error', code, ...place, ...more }));
  });

  test('a circle of dials is told with its members, once', () => {
    const text = changed('depth: 8 mm', 'depth: a * 2\n  a: b\n  b: depth');
    const faults = faultsOf(text).filter(({ severity }) => severity === 'error');
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject({ code: 'quantity', found: 'depth → a → b → depth' });
  });

  test('dials may use dials below them', () => {
    expect(describeText(changed('depth: 8 mm', 'depth: half * 2\n  half: 4 mm')).dials[1].value).toBe(8);
  });

  test('cautions do not stop a design', () => {
    const acid = readDesignText(changed('pH: 11', 'pH: 7'), 'cell.yaml');
    expect(acid.ok && acid.warnings).toMatchObject([{ code: 'caution', severity: 'warning', line: 6, found: 'pH 7' }]);
    const methanol = readDesignText(changed('solvent: ethanol', 'solvent: methanol'), 'cell.yaml');
    expect(methanol.ok && methanol.warnings[0].problem).toContain('those in ethanol are used');
    const spare = readDesignText(changed('depth: 8 mm', 'depth: 8 mm\n  spare: 3 W'), 'cell.yaml');
    expect(spare.ok && spare.warnings).toMatchObject([{ problem: 'nothing uses this dial', line: 5, column: 3 }]);
  });

  test('all faults of a file come in one go, in its order', () => {
    const text = CELL.replace('8 mm\n', '8 mmm\n')
      .replace('pH: 11', 'pH: 15')
      .replace('belo', 'blo')
      .replace('60 W', '60')
      .replace('lid.top', 'lid.tpo');
    const codes = faultsOf(text).map(({ line, code }) => [line, code]);
    expect(codes).toEqual([
      [4, 'quantity'],
      [6, 'range'],
      [9, 'unknown-name'],
      [16, 'quantity'],
      [18, 'unknown-name'],
    ]);
  });
});

describe('hostile and odd text', () => {
  test.each([
    ['an empty file', '', 'file', 'the file is empty'],
    ['only a comment', '# only a comment\n', 'file', 'the file is empty'],
    ['zero bytes', 'design: a\u0000b', 'file', 'zero bytes'],
    ['over 1 MB', 'x'.repeat(1_000_001), 'file', 'too large'],
    ['a list', '- a\n- b\n', 'type', 'keys with values are needed here'],
    ['prose', 'just words', 'type', 'keys with values are needed here'],
    ['a tab', 'a:\n\tb: 1', 'yaml', 'a tab stands where only spaces may indent'],
    ['an open bracket', 'a: [1, 2', 'yaml', 'not well-formed'],
    ['a tag', 'a: !!float 3', 'yaml', 'tags are not used'],
    ['two documents', 'a: 1\n---\nb: 2', 'yaml', 'a second document'],
    ['endless brackets', `parts: ${'['.repeat(20_000)}`, 'yaml', 'nested too deeply'],
    ['a key given twice', 'design: a\ndesign: b\n', 'yaml', 'a second time; the first is in line 1'],
    ['a list for a key', '? [a, b]\n: 1\n', 'yaml', 'neither a key'],
  ])('%s', (_, text, code, problem) => {
    expect(faultsOf(text)).toContainEqual(expect.objectContaining({ code, problem: expect.stringContaining(problem) }));
  });

  test('an alias bomb is cut off', () => {
    const holes = `hole: &h { name: x, sphere: { radius: 1 mm } }\nminus: &m [${'*h, '.repeat(50)}]\n`;
    const part = 'part: &p { box: [1 mm, 1 mm, 1 mm], medium: air, minus: *m }\n';
    const parts = `parts: { ${Array.from({ length: 900 }, (_, i) => `b${i}: *p`).join(', ')} }`;
    const start = performance.now();
    const nine = 'a: &a [x,x,x,x,x,x,x,x,x]\nb: &b [*a,*a,*a,*a,*a,*a,*a,*a,*a]\nparts: [*b,*b,*b,*b,*b,*b,*b,*b,*b]\n';
    expect(faultsOf(holes + part + parts).length).toBeLessThan(250);
    expect(faultsOf(nine).length).toBeLessThan(250);
    expect(faultsOf('parts: &p { a: { box: *p, union: [*p, *p], medium: *p } }').length).toBeGreaterThan(0);
    expect(performance.now() - start).toBeLessThan(20_000);
  });

  test('anchors, aliases and merge keys mean what YAML says; a fault in what is lent stands at the lender', () => {
    const text = changed('front: blue-pass, back: blue-pass,', 'front: &pass blue-pass, back: *pass,')
      .replace('faces: {', 'faces: &coats {')
      .replace('medium: window,', 'medium: window, faces: { <<: *coats, top: clear, front: black },');
    const faces = describeText(text).parts[1].faces.map(({ face, finish }) => `${face} ${finish}`);
    expect(faces).toEqual([
      'front black',
      'back blue-pass',
      'left aluminium',
      'right aluminium',
      'bottom aluminium',
      'top clear',
    ]);
    const wrong = text.replace('right: aluminium', 'right: aluminum');
    expect(faultsOf(wrong)).toContainEqual(
      expect.objectContaining({ ...placeOf(wrong, 'aluminum'), found: 'aluminum' }),
    );
  });

  test('names of the language are only names', () => {
    const text = changed('  lid:', '  constructor:').replace('exit: lid.top', 'exit: constructor.top');
    expect(describeText(text).parts[1].name).toBe('constructor');
    expect(faultsOf(changed('exit: lid.top', 'exit: lid.top\n__proto__: x'))).toContainEqual(
      expect.objectContaining({ code: 'unknown-key', found: '__proto__' }),
    );
  });

  test('no text makes the reader throw; every fault stands inside the text', () => {
    const words = [...new Set(CELL.split(/(\W)/))].filter((word) => word !== '');
    const scrambled = fc
      .array(fc.constantFrom(...words, '&a ', '*a', '<<', '\t', '"', '!!', '%'), { maxLength: 60 })
      .map((all) => all.join(''));
    const damaged = fc
      .tuple(fc.nat(CELL.length), fc.nat(40), fc.string({ maxLength: 12 }))
      .map(([at, cut, put]) => CELL.slice(0, at) + put + CELL.slice(at + cut));
    fc.assert(
      fc.property(fc.oneof(fc.string({ unit: 'binary', maxLength: 200 }), scrambled, damaged), (text) => {
        const lines = text.split('\n');
        for (const fault of faultsOf(text)) {
          expect(fault.line).toBeGreaterThanOrEqual(1);
          expect(fault.line).toBeLessThanOrEqual(lines.length);
          expect(fault.column).toBeGreaterThanOrEqual(1);
          expect(fault.column).toBeLessThanOrEqual(lines[fault.line - 1].length + 1);
          expect(formatFault(fault)).not.toMatch(/\p{Cc}/u);
        }
      }),
      { numRuns: 250 },
    );
  });

  test('the fault of a misspelt word stands at that word, wherever it is', () => {
    const spots = [
      'strength: 0',
      'window: boro',
      'below',
      'cell: {',
      'depth]',
      'front-bank',
      '445 nm',
      'cell.front',
      'lid.top',
    ];
    fc.assert(
      fc.property(fc.constantFrom(...spots), fc.nat(5), fc.nat(3), (spot, blankLines, spaces) => {
        // Blank lines and comments move everything; the place must move along.
        const text = CELL.replace('media:', `${'# moved\n'.repeat(blankLines)}media:`).replace(
          'exit: ',
          `exit: ${' '.repeat(spaces)}`,
        );
        const broken = text.replace('lid.top', 'lid.tpo');
        expect(faultsOf(broken)).toMatchObject([placeOf(broken, 'lid.tpo')]);
        expect(broken).toContain(spot === 'lid.top' ? 'lid.tpo' : spot);
      }),
    );
  });
});
