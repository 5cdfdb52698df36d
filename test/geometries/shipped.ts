/** The designs that ship in geometries/, read, turned and traced. */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Description } from '../../src/design/description.js';
import { readDesignText } from '../../src/design/read-design.js';
import { ErrorBars } from '../../src/outcome/error-bars.js';
import { type MapField, mapField } from '../../src/outcome/map-field.js';
import type { RecordedMap } from '../../src/tallies/run-tallies.js';
import type { TraceResult } from '../../src/trace/trace-result.js';
import { binomialError, figure, traceHere } from '../helpers/trace.js';

export const FOLDER = 'geometries';

/** File names without their extension. */
export const shippedNames = (): string[] =>
  readdirSync(FOLDER)
    .filter((file) => file.endsWith('.yaml'))
    .map((file) => file.slice(0, -'.yaml'.length))
    .sort();

export const shippedText = (name: string): string => readFileSync(join(FOLDER, `${name}.yaml`), 'utf8');

export interface Estimate {
  readonly value: number;
  readonly standardError: number;
}

export interface Changes {
  readonly dials?: Readonly<Record<string, string>>;
  /** Text of the file to take out and what to put there. */
  readonly replace?: readonly (readonly [string, string])[];
}

export function shipped(name: string, { dials = {}, replace = [] }: Changes = {}): Description {
  const text = replace.reduce((before, [from, to]) => {
    if (!before.includes(from)) throw new Error(`${name} has no "${from}"`);
    return before.replace(from, to);
  }, shippedText(name));
  const reading = readDesignText(text, join(FOLDER, `${name}.yaml`), { dials });
  if (!reading.ok) throw new Error(reading.faults.map(({ problem }) => problem).join('; '));
  return reading.description;
}

export const traceShipped = (name: string, histories: number, seed: string, changes?: Changes): Promise<TraceResult> =>
  traceHere(shipped(name, changes), histories, seed);

/** Photons of light a dye emitted that left by the exit, per history; at most one, so the binomial error is never too small. */
export function exitFraction(result: TraceResult): Estimate {
  const value = figure(result, 'exitPhotons');
  return { value, standardError: binomialError(value, result.tallies.moments.histories) };
}

/** `more` − `less` in standard errors of the difference. */
export function gap(more: Estimate, less: Estimate): number {
  return (more.value - less.value) / Math.hypot(more.standardError, less.standardError);
}

/** A map of a run in W/cm² or W/cm³. */
export function field(result: TraceResult, what: RecordedMap['what'], where?: string): MapField {
  const { description, tallies } = result;
  const map = tallies.maps.find((one) => one.what === what && (where === undefined || one.where === where));
  if (map === undefined) throw new Error(`no map ${what} ${where ?? ''}`);
  const pumpWatts = description.pumps.reduce((sum, { power }) => sum + power, 0);
  return mapField(map, tallies, pumpWatts, new ErrorBars(tallies).mean('launchedEnergy'));
}
