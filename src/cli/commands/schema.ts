import { EXIT, type ExitCode } from '../exit-codes.js';
import { print } from '../output-stream.js';

/** `stokeswell schema [design|run]`: the JSON Schema of design files or of run.json. */
export async function schemaCommand(of: 'design' | 'run'): Promise<ExitCode> {
  const schema = of === 'design' ? await designSchema() : await runSchema();
  print(`${JSON.stringify(schema, null, 2)}\n`);
  return EXIT.ok;
}

async function designSchema(): Promise<object> {
  const { designJsonSchema } = await import('../../design/design-schema.js');
  return designJsonSchema();
}

async function runSchema(): Promise<object> {
  const { runJsonSchema } = await import('../../run-folder/run-schema.js');
  return runJsonSchema();
}
