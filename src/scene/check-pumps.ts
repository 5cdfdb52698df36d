import type { Description } from '../design/description.js';
import type { Fault } from '../design/fault.js';

/** Light starts at the lens: one that stands in the part would let it in without meeting the face. */
export function pumpFaults({ pumps }: Description): Fault[] {
  return pumps.flatMap(({ path, beam, aim }): Fault[] => {
    if (aim.kind !== 'toward' || beam.kind !== 'diodes' || beam.lens === null) return [];
    if (beam.lens.distance < aim.distance) return [];
    return [
      {
        code: 'geometry',
        severity: 'error',
        path,
        problem: 'the lens does not stand before the face the pump is aimed at',
        found: `lens ${beam.lens.distance} mm from the emitters, face ${aim.distance} mm`,
        expected: 'a lens nearer than the face',
      },
    ];
  });
}
