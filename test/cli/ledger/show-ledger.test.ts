/**
 * Golden text of the terminal ledger. Promise protected: piped output has one fixed, plain, 80-column layout that
 * scripts and notes may quote; a change here is a change for users and belongs in CHANGELOG.md. Numbers are invented.
 */
import { describe, expect, it } from 'vitest';
import { type LedgerView, showLedger } from '../../../src/cli/ledger/show-ledger.js';
import { styleFor } from '../../../src/cli/terminal-style.js';
import { rows, sampleRecord } from '../sample-record.js';

const view: LedgerView = {
  count: 'watts',
  warnings: ['geometries/loom.yaml:4:5: parts.lid — the lid is thinner than its window'],
  folder: 'results/loom/2026-12-01-120000-000',
};
const piped = styleFor(false, { LANG: 'en_GB.UTF-8' });
const ascii = styleFor(false, { LANG: 'C' });

const GOLDEN = `Loom strobe, two-bank box cell
geometries/loom.yaml
200 000 histories in 4.2 s on 2 threads, seed 1
all histories traced

Dials       strength = 0.20 mmol/L, depth = 8 mm
Output      24.000 ± 0.066 W, 40.00 ± 0.11 % of 60 W pump light
            11912 ± 33 lm, 198.50 ± 0.55 lm per pump W
            63.50 ± 0.18 lm per electrical W
            0.5000 ± 0.0012 exit photons per pump photon
Colour      x 0.33120 ± 0.00040, y 0.61230 ± 0.00030
            dominant 556.10 ± 0.20 nm, mean 549.21 ± 0.11 nm
Pump leak   0.0360 ± 0.0030 W of pump light through the exit, 0.0600 ± 0.0050 %

Where the watts go, % of the pump light
output                                                    40.00
  left by the exit              lid.top          emitted  40.00  ± 0.11  ███████
lost pump light                                            3.24
  reflected at entry            cell.front       pump      2.120 ± 0.030 ▍
  left again unabsorbed         cell.back        pump      1.020 ± 0.020 ▏
  smaller losses (2 rows)                                  0.10
lost emitted light                                        22.19
  left elsewhere                cell.front       emitted  13.040 ± 0.070 ██▎
  absorbed by aluminium         cell.bottom      emitted   9.120 ± 0.060 █▋
  smaller losses (1 row)                                   0.03
heat in the dye                                           34.57
  Stokes heat in fluorescein    cell             pump     17.000 ± 0.040 ███
  not re-emitted by fluorescein cell             emitted  12.57          ██▎
  not re-emitted by fluorescein cell             pump      5.000 ± 0.050 ▉
total                                                    100.00

To win back 17.6 % not re-emitted by fluorescein
            13 % left elsewhere, cell.front
            9.16 % absorbed by aluminium

Evenness                              variation  min./mean   mean    peak
  light out of lid.top                    4.2 %       0.81     15    31.2 W/cm²
  pump light onto cell.front               62 %      0.034     15    31.2 W/cm²
  pump light absorbed in dyed parts                            15         W/cm³
  exit after ISO 13694: flatness 0.87, beam uniformity 0.051
  variation: standard deviation over mean, photon noise taken out

Survival    peak absorbed power density 1231 ± 42 W/cm³
            time to boiling 0.1520 ± 0.0050 s (bath at rest from 20 °C to
              78.3 °C, no heat carried away)
            excited at any time (5.200 ± 0.040)e11 molecules, 0.2870 ± 0.0020 ng
              (steady light; lifetime of fluorescein 4.13 ns)
            peak excited fraction 0.002100 ± 0.000070 % (0.0071 % out of the
              ground state)
            far from saturation: 0.0033 % of the absorption is lost to it (first
              order, not traced)
            no net gain, so no amplified spontaneous emission (no net gain)
            a tenth of the dye is bleached after 13 s with the liquid of the
              cell alone (fluorescein, 0.00001 molecules lost per absorption)

Warnings    geometries/loom.yaml:4:5: parts.lid — the lid is thinner than its
              window

Cautions    Class 4 laser light: eyewear and interlocks after IEC 60825-1 and
              local rules.

Files       results/loom/2026-12-01-120000-000
`;

describe('showLedger', () => {
  it('prints a run in the agreed layout', () => {
    expect(showLedger(sampleRecord(), view, piped)).toBe(GOLDEN);
  });

  it('keeps to 80 columns, in ASCII where nothing else would print', () => {
    const text = showLedger(sampleRecord(), view, ascii);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: ASCII is the point
    expect(text).toMatch(/^[\x0a\x20-\x7e]*$/);
    for (const line of [...text.split('\n'), ...GOLDEN.split('\n')]) expect([...line].length).toBeLessThanOrEqual(80);
    expect(text).toContain('40.00  +- 0.11  ######');
  });

  it('has no colour in a pipe, whatever CI or FORCE_COLOR say, and none with NO_COLOR', () => {
    const inCi = styleFor(false, { LANG: 'C.UTF-8', CI: '1', FORCE_COLOR: '1' });
    expect(showLedger(sampleRecord(), view, inCi)).toBe(GOLDEN);
    const noColour = styleFor(true, { LANG: 'C.UTF-8', NO_COLOR: '1', TERM: 'xterm' });
    expect(showLedger(sampleRecord(), view, noColour)).toBe(GOLDEN);
  });

  it('only adds colour codes on a terminal', () => {
    const text = showLedger(sampleRecord(), view, styleFor(true, { LANG: 'C.UTF-8', TERM: 'xterm' }));
    expect(text).not.toBe(GOLDEN);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: colour codes are the point
    expect(text.replace(/\u001b\[\d+m/g, '')).toBe(GOLDEN);
  });

  it('lets no name steer the terminal or forge a line', () => {
    const record = sampleRecord();
    const evil = 'x\u001b[2J\u001b]0;title\u0007\r\nFiles       /etc\u202e';
    const text = showLedger(
      {
        ...record,
        design: { ...record.design, title: evil, file: evil, dials: { [evil]: evil } },
        ledger: { ...record.ledger, watts: rows(0.4).map((row) => ({ ...row, where: evil, by: evil })) },
        maps: record.maps.map((map) => ({ ...map, where: evil, what: evil })),
        cautions: [evil],
      },
      { ...view, folder: evil },
      piped,
    );
    expect(text.replaceAll('\n', '')).not.toMatch(/[\p{Cc}\p{Cf}]/u);
    // The only line that starts like this is the real one: the last.
    expect(text.split('\n').filter((line) => line.startsWith('Files'))).toHaveLength(1);
  });

  it('counts photons when asked', () => {
    const text = showLedger(sampleRecord(), { ...view, count: 'photons' }, piped);
    expect(text).toContain('Where the photons go');
    expect(text).toMatch(/left by the exit +lid\.top +emitted +50\.00/);
  });

  it('leaves out what a run does not know', () => {
    const record = sampleRecord();
    const unknown = { value: null, standardError: null, unit: '' };
    const figures = Object.fromEntries(Object.keys(record.figures).map((name) => [name, unknown]));
    const text = showLedger(
      { ...record, figures: figures as typeof record.figures, maps: [], cautions: [] },
      { ...view, warnings: [], folder: null },
      piped,
    );
    expect(text).not.toMatch(/null|NaN|undefined|Colour|Survival|Warnings|Cautions|Files/);
    expect(text).toContain('total');
  });

  it('names the output also when there is none', () => {
    const text = showLedger(
      {
        ...sampleRecord(),
        ledger: {
          photons: [],
          watts: [{ fate: 'missed', light: 'pump', where: null, by: null, fraction: 1, standardError: 0 }],
        },
      },
      view,
      piped,
    );
    expect(text).toMatch(/^output +0\.00$/m);
    expect(text).toMatch(/missed every part +pump +100 +± 0/);
  });
});
