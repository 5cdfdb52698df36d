import { it } from 'vitest';
import { showLedger } from '../../../src/cli/ledger/show-ledger.js';
import { styleFor } from '../../../src/cli/terminal-style.js';
import { sampleRecord } from '../sample-record.js';
it('x', () => {
  const view = { count: 'watts' as const, warnings: ['geometries/loom.yaml:4:5: a warning that is really quite long and so must be broken over lines of the text'], folder: 'results/loom/2026' };
  process.stdout.write(showLedger(sampleRecord(), view, styleFor(false, { LANG: 'C.UTF-8' })));
  process.stdout.write(showLedger(sampleRecord(), view, styleFor(false, { LANG: 'C' })));
});
