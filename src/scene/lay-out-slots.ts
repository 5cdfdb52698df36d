/** Numbers the rows of the ledgers: every fate that could happen in a scene has a slot, and every slot a name. */
import type { Description } from '../design/description.js';
import type { FateSlot, Light } from '../tallies/run-tallies.js';
import type { CompiledMedia } from './compile-media.js';
import type { SceneFace } from './compile-solids.js';
import type { PlacedPart } from './place-parts.js';

export interface SlotLayout {
  readonly slots: readonly FateSlot[];
  readonly faceSlot: number[];
  readonly ownerSlot: number[];
  readonly dyeSlot: number[];
}

const LIGHTS: readonly Light[] = ['pump', 'emitted'];

/** The order of each group is that of the *_SLOT tables in scene-layout.ts. */
export function layOutSlots(
  description: Description,
  parts: readonly PlacedPart[],
  faces: readonly SceneFace[],
  media: CompiledMedia,
  ownerMedia: readonly string[],
): SlotLayout {
  const exit = description.exit.name;
  const slots: FateSlot[] = [
    { fate: 'missed', light: 'pump', where: null, by: null },
    { fate: 'left-by-exit', light: 'pump', where: exit, by: null },
    { fate: 'left-by-exit', light: 'emitted', where: exit, by: null },
  ];
  const add = (...more: FateSlot[]): number => {
    slots.push(...more);
    return slots.length - more.length;
  };
  const both = (fate: FateSlot['fate'], where: string | null, by: string | null): FateSlot[] =>
    LIGHTS.map((light) => ({ fate, light, where, by }));

  const faceSlot = faces.map(({ reference, part }) => {
    const finish = part.description.faces.find(({ face }) => `${part.description.name}.${face}` === reference);
    const rest = part.description.faces.find(({ face }) => face === '*');
    return add(
      { fate: 'reflected-at-entry', light: 'pump', where: reference, by: null },
      ...both('left-elsewhere', reference, null),
      ...both('absorbed-by-finish', reference, (finish ?? rest)?.finish ?? null),
    );
  });

  const ownerName = (owner: number): string => (owner === 0 ? 'surroundings' : parts[owner - 1].description.name);
  const ownerSlot = ownerMedia.map((name, owner) => {
    const kind = description.media.get(name)?.kind;
    const base = description.media.get(name)?.base ?? name;
    const fate = kind === 'solid' ? 'absorbed-by-solid' : 'absorbed-by-solvent';
    return add(...both(fate, ownerName(owner), base), ...both('trapped', ownerName(owner), null));
  });

  const dyeSlot = new Array<number>(ownerMedia.length * media.maxAbsorbers).fill(-1);
  ownerMedia.forEach((name, owner) => {
    const dyes = media.media[media.names.indexOf(name)].dyes;
    dyes.forEach((dye, d) => {
      dyeSlot[owner * media.maxAbsorbers + d + 1] = add(
        ...both('lost-in-dye', ownerName(owner), dye.name),
        ...both('stokes-heat', ownerName(owner), dye.name),
        ...both('quenched', ownerName(owner), dye.name),
      );
    });
  });
  return { slots, faceSlot, ownerSlot, dyeSlot };
}
