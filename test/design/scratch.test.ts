import { writeFileSync } from 'node:fs';
import { test } from 'vitest';
import { readDesignText } from '../../src/design/read-design.js';
import { starterDesign } from '../../src/design/starter-design.js';
import { formatFault } from '../../src/design/format-fault.js';
const show = (t: string) => { const t0 = performance.now(); const r = readDesignText(t, 'x.yaml'); console.log((performance.now() - t0).toFixed(0) + ' ms ' + (r.ok ? 'OK ' + JSON.stringify(r.description.parts).slice(0, 3000) + '\n' + r.warnings.map(formatFault).join('\n') : r.faults.slice(0,12).map(formatFault).join('\n') + '\n' + r.faults.length)); };
const rich = `
design: Rich
dials: { a: 2 mm, b: a * 2 }
dyes:
  probe: { extinction: [[450 nm, 8000 L/mol/cm], [520 nm, 100 L/(mol cm)]], emission: [[500 nm, 0.1], [520 nm, 1]], yield: 0.9, lifetime: 4 ns, molar-mass: 332 g/mol }
  line: { absorption: 1 /mm, emission: 520 nm, yield: 50 % }
media:
  bath: { solvent: methanol, pH: 7, dyes: { fluorescein: 60 mg/L, probe: 0.1 g/L, line: 2 } }
  oil: { index: [[400 nm, 1.5], [700 nm, 1.48]], absorption: 0.01 /cm, kind: liquid }
  block: { solid: pmma, absorption: 0.01 /cm }
finishes:
  m: { mirror: aluminium }
  t: { table: [[450 nm, 0 deg, 5 %, 95 %], [450 nm, 45 deg, 10 %, 80 %]] }
  d: { diffuser: { reflects: 97 % } }
  s: { scatter: { shape: gaussian, fwhm: 10 deg } }
parts:
  p: { prism: { outline: [[0 mm, 0 mm], [0 mm, 10 mm], [10 mm, 0 mm]], height: b, sides: [x, y, z] }, medium: bath, faces: { x: m, others: black } }
  u: { union: [ { name: body, box: [1 mm, 1 mm, 1 mm], minus: [ { name: bore, cylinder: { diameter: 0.5 mm, height: 2 mm }, at: [0 mm, 0 mm, 0 mm], turn: { axis: x, by: 90 deg } } ] } ], medium: oil, against: p.top, with: body.bottom, shift: [1 mm, 2 mm], gap: 0.1 mm, faces: { body.bore.side: t, body.top: d } }
  c: { cap: { radius: 3 mm, height: 2 mm }, medium: block, at: [0 mm, 0 mm, 20 mm], turn: [ { axis: z, by: 30 deg } ], faces: { dome: s } }
  k: { cone: { bottom-radius: 3 mm, top-diameter: 2 mm, height: 1 mm }, medium: air }
pumps:
  one: { patch: { disc: 2 mm }, power: 3 W, wavelength: 445 nm, at: [0 mm, 0 mm, 50 mm], direction: [0, 0, -1], roll: 10 deg, divergence: 2 deg }
  two: { gaussian: { radius: 1 mm, half-angle: 5 mrad }, power: 300 mW, wavelength: 450 nm, toward: p.x, distance: 3 cm, tilt: [1 deg, 0 deg] }
detectors:
  eye: { plane: { at: [0 mm, 0 mm, 0 mm], normal: [0, 0, 1], disc: 3 mm }, pixels: [8, 8] }
exit: { face: eye, pixels: [64, 32] }
surroundings: air
trace: { histories: 1e6, precision: 0.2 %, seed: 42, voxels: [8, 8, 8] }
`;
test('x', () => {
  show(rich);
  show('x'.repeat(999_999));
  show(Array.from({length: 110_000}, (_, i) => `a${i}:`).join('\n'));
  show('parts: ' + '['.repeat(500_000));
  show('- '.repeat(400_000));
  show('[1,'.repeat(300_000));
  show('{'.repeat(900_000));
  show('parts: {' + Array.from({length: 60_000}, (_, i) => `b${i}: &a${i} x`).join(', ') + '}');
  show('a: &a [x,x,x,x,x,x,x,x,x]\nb: &b [*a,*a,*a,*a,*a,*a,*a,*a,*a]\nc: &c [*b,*b,*b,*b,*b,*b,*b,*b,*b]\nd: [*c,*c]');
  show('parts: &p\n  a: &q {box: *q, medium: *p, minus: [*q, *q, *q]}\n');
  show('hole: &h {name: x, sphere: {radius: 1 mm}}\nminus: &m [' + '*h,'.repeat(50) + ']\npart: &p {box: [1 mm,1 mm,1 mm], medium: air, minus: *m}\nparts: {' + Array.from({length: 20000}, (_, i) => `b${i}: *p`).join(', ') + '}');
  show('design: ' + '"' + '\\u001b[31m'.repeat(3) + '"');
  show('a: "x');
  show('? [a]\n: b\ndesign: no\n12: x');
});
