import type { RunRecord } from '../record/run-record.js';
import { runRecordSchema } from './run-schema.js';

/**
 * Text of run.json: indented, keys in the order of the schema whoever built the record, dials by name. JSON has no NaN and no infinity: such
 * numbers become null. A record that then breaks the schema is a defect of the program, but is written all the same, in the order it came:
 * hours of tracing are worth more than the form.
 */
export function runJson(record: RunRecord): string {
  const plain: unknown = JSON.parse(
    JSON.stringify({ ...record, design: { ...record.design, dials: sorted(record.design.dials) } }),
  );
  const parsed = runRecordSchema.safeParse(plain);
  return `${JSON.stringify(parsed.success ? parsed.data : plain, null, 2)}\n`;
}

function sorted(dials: Readonly<Record<string, string>>): Record<string, string> {
  return Object.fromEntries(Object.entries(dials).sort(([a], [b]) => (a < b ? -1 : 1)));
}
