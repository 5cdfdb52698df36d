/** Every design that ships: what it says at its head, that it is sound, and that light comes out where it should. */
import { describe, expect, test } from 'vitest';
import { readDesign } from '../../src/design/read-design.js';
import { starterDesign } from '../../src/design/starter-design.js';
import { photonLedger, wattLedger } from '../../src/outcome/ledger.js';
import { checkScene } from '../../src/scene/check-scene.js';
import { figure, share } from '../helpers/trace.js';
import { FOLDER, shippedNames, shippedText, traceShipped } from './shipped.js';

const HISTORIES = 4096;
const SEED = 'warp';

/** The comment before the first key, unwrapped. */
function head(text: string): string {
  const lines = text.split('\n');
  const end = lines.findIndex((line) => !line.startsWith('#'));
  return lines
    .slice(0, end)
    .map((line) => line.slice(1).trim())
    .join(' ');
}

test('the shipped designs are these', () => {
  expect(shippedNames()).toEqual([
    'beaded-converter',
    'box-with-bonded-dome',
    'box-with-white-back',
    'buffered-water-cell',
    'edge-lit-plate',
    'pebble-block',
    'ring-pumped-hexagon',
    'rod-fed-cell',
    'side-pumped-cylinder',
    'two-bank-box-cell',
    'two-bank-even-spread',
    'two-bank-poor-spread',
    'wedge-cell',
    'wetted-dichroic-cell',
  ]);
});

test('the two-bank box cell is the design that `new` writes', () => {
  expect(shippedText('two-bank-box-cell')).toBe(starterDesign());
});

describe.each(shippedNames())('%s', (name) => {
  test('points editors to the schema, says that its data are invented, and cautions', () => {
    const text = shippedText(name);
    expect(text.split('\n', 1)[0]).toBe('# yaml-language-server: $schema=./design.schema.json');
    expect(head(text)).toMatch(/\binvented\b/);
    expect(head(text)).toMatch(/Cautions: .*class 4 lasers?.*burns.*local rules.*licence/);
    expect(text).toMatch(/cloth on a loom/);
  });

  test('reads and checks without a fault or a warning', async () => {
    const reading = await readDesign(`${FOLDER}/${name}.yaml`);
    expect(reading.ok ? reading.warnings : reading.faults).toEqual([]);
    if (!reading.ok) return;
    const { faults, faces } = checkScene(reading.description);
    expect(faults).toEqual([]);
    expect(faces.length).toBeGreaterThan(0);
    expect(reading.description.about).not.toBeNull();
    expect(reading.description.dials.length).toBeGreaterThanOrEqual(3);
  });

  test(`traces to closed ledgers and sends light out by its exit, seed ${SEED}`, async () => {
    const result = await traceShipped(name, HISTORIES, SEED);
    const { tallies } = result;
    expect(tallies.moments.histories).toBe(HISTORIES);
    for (const ledger of [photonLedger(tallies), wattLedger(tallies)]) {
      expect(Math.abs(ledger.reduce((sum, { fraction }) => sum + fraction, 0) - 1)).toBeLessThan(1e-12);
    }
    // By a dye of yield below one, at most one photon out for a photon in (energy: Stokes' law for these dyes).
    expect(figure(result, 'exitPhotons')).toBeGreaterThan(0.1);
    expect(figure(result, 'exitPhotons')).toBeLessThan(1);
    expect(figure(result, 'exitEnergy')).toBeLessThan(figure(result, 'launchedEnergy'));
    // An aim that is off, or light shut in for ever, would be a slip of the design.
    expect(share(result, { fate: 'missed' })).toBeLessThan(0.02);
    expect(share(result, { fate: 'trapped' })).toBe(0);
    expect(figure(result, 'pumpAbsorbed')).toBeGreaterThan(0.75);
  });
});
