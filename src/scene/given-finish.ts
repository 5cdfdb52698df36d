import type { PartDescription } from '../design/description.js';

/** Name of the finish a part gives one of its faces, null where it gives none; '*' stands for all faces that are not named. */
export function givenFinish({ faces }: PartDescription, face: string): string | null {
  const given = faces.find((entry) => entry.face === face) ?? faces.find((entry) => entry.face === '*');
  return given?.finish ?? null;
}
