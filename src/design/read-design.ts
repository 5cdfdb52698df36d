/** Design file -> description: the one way in. All faults of a file are found in one go, each with its place. */
import { createHash } from 'node:crypto';
import { describeDesign } from './describe-design.js';
import type { Description } from './description.js';
import { designForm } from './design-fields.js';
import { locatePath, type Position, parseDesignSource } from './design-source.js';
import type { DesignPath, Fault, LocatedFault } from './fault.js';
import { decodeText, readDesignFile } from './read-design-file.js';
import { meshReader } from './read-design-mesh.js';
import { tableReader } from './read-design-table.js';
import { readDials } from './read-dials.js';
import { Reading } from './reading.js';

export interface ReadDesignOptions {
  /** Dials turned from outside: name to text, in place of what the file says. */
  readonly dials?: Readonly<Record<string, string>>;
}

export type DesignReading = SoundDesign | FaultyDesign;

export interface SoundDesign {
  readonly ok: true;
  readonly description: Description;
  readonly warnings: readonly LocatedFault[];
  /** Line and column, from 1, of what stands at a path; of the nearest thing above it when it is not in the file. */
  readonly locate: (path: DesignPath) => Position;
  readonly text: string;
  /** SHA-256 of the text, hexadecimal. */
  readonly hash: string;
  readonly file: string;
}

export interface FaultyDesign {
  readonly ok: false;
  /** Errors and warnings in the order of the file. */
  readonly faults: readonly LocatedFault[];
}

/** Reads a design file. Never throws for what a file or a user can do. */
export async function readDesign(file: string, options: ReadDesignOptions = {}): Promise<DesignReading> {
  const reading = await readDesignFile(file);
  if (reading.ok) return readDesignText(reading.text, file, options);
  return { ok: false, faults: [{ ...reading.fault, file, line: 1, column: 1 }] };
}

/** As `readDesign`, for a text already at hand; `file` is its name in faults, and its folder the one tables are sought in. */
export function readDesignText(text: string, file: string, options: ReadDesignOptions = {}): DesignReading {
  const bytes = new TextEncoder().encode(text);
  const decoded = decodeText(bytes);
  if (!decoded.ok) return { ok: false, faults: [{ ...decoded.fault, file, line: 1, column: 1 }] };
  const source = parseDesignSource(text, file);
  const reading = new Reading(source, tableReader(file), meshReader(file));
  for (const { offset, ...fault } of source.syntaxFaults) reading.report({ code: 'yaml', path: [], ...fault }, offset);
  if (source.syntaxFaults.length === 0 && source.root === null) {
    const suggestion = '`stokeswell new` writes a design to start from';
    reading.report({ code: 'file', path: [], problem: 'the file is empty', expected: 'a design', suggestion });
  }
  // Half of a tree that could not be read would only give faults that are none.
  if (source.syntaxFaults.length > 0 || source.root === null) return { ok: false, faults: reading.faults() };

  const root = { node: source.root, path: [] };
  const dials = readDials(root, options.dials ?? {}, reading);
  const design = designForm.read(root, reading);
  const description = describeDesign(design, dials, reading);
  const faults = reading.faults();
  if (faults.some(({ severity }) => severity === 'error')) return { ok: false, faults };
  return {
    ok: true,
    description,
    warnings: faults,
    locate: (path) => locatePath(source, path),
    text,
    hash: createHash('sha256').update(bytes).digest('hex'),
    file,
  };
}

/** Gives faults of later stages their place in the design file. */
export const locateFaults = (
  { file, locate }: Pick<SoundDesign, 'file' | 'locate'>,
  faults: readonly Fault[],
): LocatedFault[] => faults.map((fault) => ({ ...fault, file, ...locate(fault.path) }));
