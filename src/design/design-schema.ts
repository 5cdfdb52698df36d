/** The JSON Schema of design files, for editors: it completes, underlines and explains. */
import { designForm } from './design-fields.js';

/** Draft-07. Comes from the same table of fields as the validator; arithmetic and names are for `check` to judge. */
export function designJsonSchema(): Record<string, unknown> {
  const schema: Record<string, unknown> = {
    $schema: 'http://json-schema.org/draft-07/schema#',
    title: 'Stokeswell design',
    description: 'A pumped fluorescent cell: media, finishes, parts, pumps, detectors and the exit of its light.',
    ...designForm.schema,
  };
  return schema;
}

/** The schema as the text of the file that editors read. */
export const designSchemaText = (): string => `${JSON.stringify(designJsonSchema(), null, 2)}\n`;
