import type { RunArrays } from '../../src/record/run-arrays.js';
import type { RunRecord } from '../../src/record/run-record.js';
import { sampleRun } from '../run-folder/sample-run.js';

/** Runs and shows itself wherever it gets through. */
const SCRIPT = '<script>globalThis.pwned = 1</script>';

/** Texts a design could hold to do harm to a page. */
export const HOSTILE_TEXTS: readonly string[] = [
  SCRIPT,
  `</title></style></script>${SCRIPT}`,
  `"><img src="x" onerror="globalThis.pwned = 2">`,
  `' onfocus='globalThis.pwned = 3' autofocus tabindex='0`,
  '--><!-- ]]> <svg onload="globalThis.pwned = 4">',
  'javascript:globalThis.pwned=5',
  '&lt;script&gt;globalThis.pwned = 6&lt;/script&gt;',
  'left \u202eright\u2066 to left\u0000\u0007\ud800',
  'שלום עולם مرحبا',
  `${'very-long-name-without-a-space'.repeat(2000)}`,
  '$\u007bglobalThis.pwned = 7} {{ 7 * 7 }} `',
];

/** A run of which every text is hostile. */
export function hostileRun(text: string): { record: RunRecord; arrays: RunArrays } {
  const { record, arrays } = sampleRun();
  const hostileRows = (rows: RunRecord['ledger']['watts']) => rows.map((row) => ({ ...row, where: text, by: text }));
  const hostile: RunRecord = {
    ...record,
    tool: { name: 'stokeswell', version: text },
    design: { ...record.design, title: text, file: text, text, dials: { [text]: text } },
    run: { ...record.run, seed: text, repeat: text },
    figures: {
      ...record.figures,
      timeToBoiling: { value: null, standardError: null, unit: 's', note: text },
      exitPower: { value: 24, standardError: 0.1, unit: text, note: text },
    },
    ledger: { photons: hostileRows(record.ledger.photons), watts: hostileRows(record.ledger.watts) },
    maps: record.maps.map((map) => ({ ...map, where: text, axes: map.axes.map(() => text) })),
    spectra: record.spectra.map((spectrum) => ({ ...spectrum, where: text })),
    angles: record.angles.map((angle) => ({ ...angle, where: text })),
    checks: [
      {
        code: 'caution',
        severity: 'warning',
        path: [text, 0],
        problem: text,
        found: text,
        expected: text,
        suggestion: text,
      },
    ],
    cautions: [text],
  };
  return { record: hostile, arrays };
}
