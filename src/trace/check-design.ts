/** All that can be said of a design before it is traced. */
import type { Description } from '../design/description.js';
import { checkScene, type SceneCheck } from '../scene/check-scene.js';
import { tryPumps } from './try-pumps.js';

/**
 * Faults of geometry and finishes; where there are none, a short trial tells what the pumps miss and whether light comes to the exit.
 * Takes a fraction of a second. @throws LostHistories on a defect of the program
 */
export async function checkDesign(description: Description): Promise<SceneCheck> {
  const check = checkScene(description);
  if (check.faults.some(({ severity }) => severity === 'error')) return check;
  return { ...check, faults: [...check.faults, ...(await tryPumps(description))] };
}
