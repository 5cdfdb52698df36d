/** What direct emitters make of wall power: typical figures of the library, common practice from memory. */
import { colourMatching } from '../materials/observer.js';
import { numberIn, readTable } from '../materials/read-table.js';
import { MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W } from '../units/constants.js';

export interface OtherEmitter {
  readonly name: string;
  /** lm per W from the wall: low, typical, high product, behind a typical driver. */
  readonly lumensPerWatt: readonly [number, number, number];
}

export function otherEmitters(): readonly OtherEmitter[] {
  const driver = typical('constant-current driver efficiency')[1];
  const colour = (nm: number) => MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W * colourMatching(nm)[1];
  const green = (name: string, quantity: string, nm: number): OtherEmitter => ({
    name,
    lumensPerWatt: scaled(typical(quantity), driver * colour(nm)),
  });
  return [
    green('green LED, 525 nm', 'green InGaN LED wall-plug efficiency 525 nm', 525),
    green('green laser diode, 520 nm', 'green laser diode wall-plug efficiency 520 nm', 520),
    { name: 'white LED with phosphor', lumensPerWatt: scaled(typical('phosphor white LED efficacy'), driver) },
  ];
}

function scaled([low, middle, high]: readonly [number, number, number], by: number): [number, number, number] {
  return [low * by, middle * by, high * by];
}

function typical(quantity: string): readonly [number, number, number] {
  const row = readTable('emitters.csv').rows.find((entry) => entry.quantity === quantity);
  if (row === undefined) throw new Error(`emitters.csv has no ${quantity}`);
  return [numberIn(row, 'low'), numberIn(row, 'typical'), numberIn(row, 'high')];
}
