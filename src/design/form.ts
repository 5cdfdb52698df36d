/**
 * A form says what may stand at one place of a design. The same form reads and checks the file and writes the JSON
 * Schema, so the two cannot drift apart.
 */
import type { Place, Reading } from './reading.js';

export type JsonSchema = Readonly<Record<string, unknown>>;

export interface Form<T> {
  /** 'a length such as 8 mm', for messages. */
  readonly expects: string;
  /** Reads a value. Faults go to `reading`; what is faulty comes back as its blank, so that reading goes on. */
  readonly read: (place: Place, reading: Reading) => T;
  /**
   * Stands in for a value that could not be read: NaN, '' or null inside the right structure. A reading with
   * faults never becomes a description; checks on values are worded so that a blank passes.
   */
  readonly blank: () => T;
  readonly schema: JsonSchema;
}

/** One line of the table of fields. */
export interface Field<T> {
  readonly form: Form<unknown>;
  readonly help: string;
  readonly required: boolean;
  /** Value of a field that is not given; `written` is how the file would say it. */
  readonly absent: () => T;
  readonly written: string | null;
}

/** Type of the values that a field yields; carried by `absent`. */
export type FieldValue<F> = F extends Field<infer T> ? T : never;

export const required = <T>(form: Form<T>, help: string): Field<T> => ({
  form,
  help,
  required: true,
  absent: form.blank,
  written: null,
});

export const optional = <T>(form: Form<T>, help: string): Field<T | null> => ({
  form,
  help,
  required: false,
  absent: () => null,
  written: null,
});

export const withDefault = <T>(form: Form<T>, value: T, written: string, help: string): Field<T> => ({
  form,
  help,
  required: false,
  absent: () => value,
  written,
});
