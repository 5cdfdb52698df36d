/** A few histories of every fate, with the ways they went. */
import { createBatchTally, grownBytes, grownTally } from '../kernel/batch-tally.js';
import { NOW, RAY } from '../kernel/photon.js';
import { traceWitnessed } from '../kernel/trace-batch.js';
import type { Witness } from '../kernel/witness.js';
import { RegionGraph } from '../scene/region-graph.js';
import type { Scene } from '../scene/scene-layout.js';
import { batchStream } from './trace-share.js';

export interface WitnessedPath {
  /** Slot of its fate. */
  readonly fate: number;
  /** x, y, z of every turn, mm. */
  readonly points: readonly number[];
  /** Place in the wavelength grid, one a segment. */
  readonly wavelengths: readonly number[];
  readonly pumpSegments: number;
  /** Turns after this point are left out; −1 when none are. */
  readonly cutAfter: number;
  /** Direction of travel at the end. */
  readonly direction: readonly [number, number, number];
}

/** Histories of one stream, and the fewest (for the sake of rare fates) and the most that are traced. */
const BATCH = 256;
const FEWEST_HISTORIES = 2048;
const MOST_HISTORIES = 4096;
/** Kept of one fate. */
const OF_A_FATE = 40;
/** Points kept of a path: as many of its beginning as of its end. */
const POINTS = 120;
/** Cosine above which two directions are one. */
const STRAIGHT = 1 - 1e-12;

/**
 * Traces 2048 to 4096 histories, until there are `wanted` paths, and keeps the first ones of every fate, evenly over the fates. They are
 * histories of their own: those of a run fly from event to event and are seen by nobody. The same for the same scene and seed.
 */
export function witnessPaths(
  scene: Scene,
  seed: string,
  wanted: number,
): { paths: WitnessedPath[]; histories: number } {
  const graph = new RegionGraph(scene, true);
  const tally = createBatchTally(scene, grownTally(scene, new ArrayBuffer(grownBytes(scene))));
  const keeper = new PathKeeper();
  let histories = 0;
  for (let batch = 0; histories < MOST_HISTORIES && (histories < FEWEST_HISTORIES || keeper.kept < wanted); batch++) {
    traceWitnessed(scene, graph, tally, batchStream(`${seed} paths`, batch), BATCH, keeper);
    histories += BATCH;
  }
  return { paths: evenly(keeper.byFate, wanted), histories };
}

/** The first `wanted` when taking one of each fate in turn. */
function evenly(byFate: ReadonlyMap<number, readonly WitnessedPath[]>, wanted: number): WitnessedPath[] {
  const fates = [...byFate].toSorted(([a], [b]) => a - b).map(([, paths]) => paths);
  const chosen: WitnessedPath[] = [];
  for (let turn = 0; turn < OF_A_FATE; turn++) chosen.push(...fates.flatMap((paths) => paths.slice(turn, turn + 1)));
  return chosen.slice(0, wanted).toSorted((a, b) => a.fate - b.fate);
}

class PathKeeper implements Witness {
  readonly byFate = new Map<number, WitnessedPath[]>();
  kept = 0;
  #points: number[] = [];
  #wavelengths: number[] = [];
  #pumpSegments = 0;
  #cut = false;
  #direction: [number, number, number] = [0, 0, 0];

  see(ray: Float64Array, now: Int32Array): void {
    const wavelength = now[NOW.wavelength];
    const [ax, ay, az] = this.#direction;
    const straight = ax * ray[RAY.dx] + ay * ray[RAY.dy] + az * ray[RAY.dz] > STRAIGHT;
    // Crossing without refraction is no turn.
    if (this.#wavelengths.length > 0 && straight && this.#wavelengths.at(-1) === wavelength) return;
    this.#points.push(ray[RAY.x], ray[RAY.y], ray[RAY.z]);
    this.#wavelengths.push(wavelength);
    this.#direction = [ray[RAY.dx], ray[RAY.dy], ray[RAY.dz]];
    if (now[NOW.light] === 0) this.#pumpSegments = this.#wavelengths.length;
    if (this.#wavelengths.length > 10 * POINTS) this.#shorten();
  }

  close(fate: number, ray: Float64Array, _now: Int32Array): void {
    const paths = this.byFate.get(fate) ?? [];
    if (paths.length < OF_A_FATE) {
      this.#end(ray);
      if (this.#wavelengths.length > POINTS) this.#shorten();
      paths.push({
        fate,
        points: this.#points,
        wavelengths: this.#wavelengths,
        pumpSegments: Math.min(this.#pumpSegments, this.#wavelengths.length),
        cutAfter: this.#cut ? POINTS / 2 - 1 : -1,
        direction: [ray[RAY.dx], ray[RAY.dy], ray[RAY.dz]],
      });
      this.byFate.set(fate, paths);
      this.kept++;
    }
    this.#points = [];
    this.#wavelengths = [];
    this.#pumpSegments = 0;
    this.#cut = false;
  }

  /** Light that found nothing ahead is where it was last seen: its last segment has no length. */
  #end(ray: Float64Array): void {
    const [x, y, z] = this.#points.slice(-3);
    const stays = x === ray[RAY.x] && y === ray[RAY.y] && z === ray[RAY.z] && this.#wavelengths.length > 1;
    if (stays) this.#wavelengths.pop();
    else this.#points.push(ray[RAY.x], ray[RAY.y], ray[RAY.z]);
  }

  /** Takes the middle out. The segment after the beginning then stands for what is missing. */
  #shorten(): void {
    const first = POINTS / 2;
    const out = this.#wavelengths.length - POINTS;
    this.#points.splice(3 * first, 3 * out);
    this.#wavelengths.splice(first, out);
    if (this.#pumpSegments > first) this.#pumpSegments = Math.max(first, this.#pumpSegments - out);
    this.#cut = true;
  }
}
