import { recordRun } from '../../src/cli/record-run.js';
import { readDesign } from '../../src/design/read-design.js';
import type { RunArrays } from '../../src/record/run-arrays.js';
import type { RunRecord } from '../../src/record/run-record.js';
import { traceHere } from '../helpers/trace.js';

/** A small real run of a design file, traced in this thread. */
export async function realRun(file: string, histories: number): Promise<{ record: RunRecord; arrays: RunArrays }> {
  const reading = await readDesign(file);
  if (!reading.ok) throw new Error(`the design has faults: ${JSON.stringify(reading.faults)}`);
  const result = await traceHere(reading.description, histories);
  return recordRun(result, reading, {}, new Date('2026-12-01T12:00:00Z'));
}
