/**
 * One batch of histories, from pump to fate. Analog: every event of a photon is drawn as nature would, so both ledgers are sums of
 * whole numbers. Nothing is allocated; `createFlight` holds the hot loop, what it leaves to others is done here.
 */
import { BLOCK, fillExponentials, fillUnits, nextUnit } from '../numerics/random-stream.js';
import { SOBOL_DIMENSIONS, stepSobol } from '../numerics/sobol.js';
import type { RegionGraph } from '../scene/region-graph.js';
import { OWNER_SLOT, type Scene } from '../scene/scene-layout.js';
import { FIGURE_PLACE, GROUP_HISTORIES } from '../tallies/run-tallies.js';
import { type BatchTally, closeGroup, type GrownTally } from './batch-tally.js';
import { closeHistory } from './close-history.js';
import { createFlight, createFlightDesk, type FlightDesk, LIMIT, STOP } from './flight.js';
import { launchPump } from './launch-pump.js';
import { meetInterface } from './meet-interface.js';
import { findBoundary } from './next-boundary.js';
import { NOW, RAY, turnTo } from './photon.js';
import { SHARES } from './shares.js';
import { workOutWall } from './wall.js';
import type { Witness } from './witness.js';

/**
 * Turns of the outer loop after which a history counts as endless: light between reflectors that lose nothing, however they scatter it. A
 * turn is one boundary, or between axis planes up to a block of draws.
 */
const enum TURNS {
  surfaces = 1_000_000,
  boxes = 100_000,
}

type BatchTracer = (tally: BatchTally, random: Int32Array, half: number, histories: number) => number;

const tracers = new WeakMap<RegionGraph, BatchTracer>();

/** @returns how many histories ended in no fate: 0, or the program is at fault. */
export function traceBatch(
  scene: Scene,
  graph: RegionGraph,
  tally: BatchTally,
  random: Int32Array,
  half: number,
  histories: number,
): number {
  let tracer = tracers.get(graph);
  if (tracer === undefined) {
    tracer = createTracer(scene, graph);
    tracers.set(graph, tracer);
  }
  return tracer(tally, random, half, histories);
}

/** As `traceBatch`, with someone who sees every turn of a photon's path. The graph must be stepwise. */
export function traceWitnessed(
  scene: Scene,
  graph: RegionGraph,
  tally: BatchTally,
  random: Int32Array,
  histories: number,
  witness: Witness,
): number {
  return createTracer(scene, graph, witness)(tally, random, 0, histories);
}

/** Working memory and flight of a thread, made once for a run: what a closure made but once holds is fixed to the optimiser. */
function createTracer(scene: Scene, graph: RegionGraph, witness: Witness | null = null): BatchTracer {
  const desk = createFlightDesk(scene);
  const { ray, now, units, exponentials } = desk;
  const fly = createFlight(scene, graph, desk);
  const shares = new Float64Array(SHARES.COUNT);
  const points = new Int32Array(SOBOL_DIMENSIONS);
  const startRegion = new Int32Array(scene.pumpCount);
  const others = graph.stepwise;
  const figures = 2 * scene.slots;
  const mostTurns = others ? TURNS.surfaces : TURNS.boxes;

  return (tally, random, half, histories) => {
    const { vector, grown } = tally;
    // The first point of a randomly shifted net is the shift itself.
    for (let i = 0; i < SOBOL_DIMENSIONS; i++) points[i] = (nextUnit(random) * 2 ** 32) | 0;
    startRegion.fill(-1);
    graph.forgetWalls();
    fillUnits(random, units);
    fillExponentials(random, exponentials);
    now.fill(0);
    let defects = 0;
    let inGroup = 0;

    for (let history = 0; history < histories; history++) {
      if (graph.crowded) {
        graph.forget();
        startRegion.fill(-1);
      }
      launchPump(scene, graph, points, startRegion, ray, now);
      stepSobol(points, history);
      const launched = now[NOW.wavelength];
      vector[figures + FIGURE_PLACE.launchedPhotons]++;
      vector[figures + FIGURE_PLACE.launchedEnergy] += scene.energyQuanta[launched];
      grown.spectra[scene.spectrumLaunched + launched]++;
      turnTo(ray);
      ray[RAY.facet] = 0;
      now[NOW.era]++;
      now[NOW.bentAxis] = -1;

      let end: number = STOP.again;
      let turns = 0;
      while (end < 0) {
        if (++turns > mostTurns && endless(scene, ray, now) && turns > 2 * mostTurns) {
          end = scene.ownerSlot[now[NOW.owner]] + OWNER_SLOT.trappedPump + now[NOW.light];
          break;
        }
        if (others) {
          if (graph.crowded) {
            now[NOW.region] = graph.renew(now[NOW.region]);
            startRegion.fill(-1);
          }
          findBoundary(scene, graph, ray, now);
          if (now[NOW.way] >= 0) graph.resolve(now[NOW.region], now[NOW.way]);
        }
        if (now[NOW.draw] > LIMIT.lastDraw) {
          fillUnits(random, units);
          now[NOW.draw] = 0;
        }
        if (now[NOW.exponential] === BLOCK.draws) {
          fillExponentials(random, exponentials);
          now[NOW.exponential] = 0;
        }
        if (now[NOW.deposits] > LIMIT.lastDeposit) bookDeposits(scene, desk, half, grown);
        witness?.see(ray, now);
        end = fly();
        if (end === STOP.boundary) {
          end = meetInterface(scene, graph, grown, half, ray, now, shares, random);
          turnTo(ray);
          now[NOW.era]++;
          now[NOW.bentAxis] = -1;
        } else if (end === STOP.wall) {
          workOutWall(scene, graph, ray, now, shares);
        } else if (end === STOP.region) {
          if (graph.crowded) {
            now[NOW.region] = graph.renew(now[NOW.region]);
            now[NOW.era]++;
            startRegion.fill(-1);
          }
          graph.resolveAll(now[NOW.region]);
        } else if (end === STOP.defect) break;
      }

      if (end < 0) {
        defects++;
        continue;
      }
      witness?.close(end, ray, now);
      closeHistory(scene, tally, end, ray, now);
      if (++inGroup === GROUP_HISTORIES) {
        moveCounts(desk.vector, vector);
        closeGroup(tally, inGroup);
        inGroup = 0;
      }
    }
    moveCounts(desk.vector, vector);
    if (inGroup > 0) closeGroup(tally, inGroup);
    moveCounts(desk.spectra, grown.spectra);
    bookDeposits(scene, desk, half, grown);
    return defects;
  };
}

/**
 * Ends endless light where its medium absorbs anything at all. @returns whether only time can end it: nothing absorbs, or what scatters
 * would only be met the sooner.
 */
function endless(scene: Scene, ray: Float64Array, now: Int32Array): boolean {
  const row = now[NOW.medium] * scene.wavelengths + now[NOW.wavelength];
  if (scene.attenuation[row] === 0 || scene.scatterShare[row] > 0) return true;
  ray[RAY.depth] = 0;
  return false;
}

/** Adds counts to where they belong and sets them to 0. */
function moveCounts(from: Float64Array, to: Float64Array): void {
  for (let i = 0; i < from.length; i++) to[i] += from[i];
  from.fill(0);
}

function bookDeposits(scene: Scene, desk: FlightDesk, half: number, grown: GrownTally): void {
  const { now, depositCell, depositQuanta } = desk;
  const { maps } = grown;
  const first = half * scene.mapCells;
  const deposits = now[NOW.deposits];
  for (let i = 0; i < deposits; i++) maps[first + depositCell[i]] += depositQuanta[i];
  now[NOW.deposits] = 0;
}
