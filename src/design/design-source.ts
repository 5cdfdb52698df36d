/** The text of a design file as a YAML tree in which every node knows its place. */
import {
  type Alias,
  type Document,
  isAlias,
  isMap,
  isScalar,
  isSeq,
  type Node,
  type Pair,
  parseDocument,
  type Scalar,
  visit,
  type YAMLError,
} from 'yaml';
import type { DesignPath } from './fault.js';

export interface DesignSource {
  /** As the user named it; only shown. */
  readonly file: string;
  readonly text: string;
  readonly root: Node | null;
  readonly syntaxFaults: readonly SyntaxFault[];
  readonly resolve: (node: unknown) => Node | null;
  readonly position: (offset: number) => Position;
}

export interface Position {
  readonly line: number;
  readonly column: number;
}

export interface SyntaxFault {
  readonly problem: string;
  readonly offset: number;
  readonly suggestion?: string;
}

/** One key and value of a map; `from` a merge key when another map lent it. */
export interface Entry {
  readonly key: Scalar;
  readonly name: string;
  readonly value: unknown;
}

// The library's own words name its methods and options; these say the same to the person with the file.
const SAID_BETTER: Readonly<Record<string, string>> = {
  MULTIPLE_DOCS: 'a second document starts here; a design is one document',
  TAB_AS_INDENT: 'a tab stands where only spaces may indent',
  TAG_RESOLVE_FAILED: 'tags are not used in designs',
  RESOURCE_EXHAUSTION: 'brackets are nested too deeply',
  BLOCK_AS_IMPLICIT_KEY: 'two colons on one line; quote the text or start a new line',
};

/**
 * Every scalar is read as text: what `012`, `no`, `.inf` or `1_000` mean is for the grammar of quantities to say,
 * not for YAML.
 */
export function parseDesignSource(text: string, file: string): DesignSource {
  const position = positionFinder(text);
  try {
    // Duplicate keys are looked for by entriesOf, which is linear where the library compares each with each.
    const options = { schema: 'failsafe', prettyErrors: false, uniqueKeys: false } as const;
    const document = parseDocument(text, options);
    const syntaxFaults = syntaxFaultsOf([...document.errors, ...document.warnings]);
    const targets = aliasTargets(document);
    const resolve = (node: unknown): Node | null => {
      if (isAlias(node)) return targets.get(node) ?? null;
      return isMap(node) || isSeq(node) || isScalar(node) ? node : null;
    };
    return { file, text, root: resolve(document.contents), syntaxFaults, resolve, position };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    const problem = `not well-formed YAML: ${SAID_BETTER.RESOURCE_EXHAUSTION}`;
    return { file, text, root: null, syntaxFaults: [{ problem, offset: 0 }], resolve: () => null, position };
  }
}

/** Offset to line and column. The library's own counter loses count of lines after some errors. */
function positionFinder(text: string): (offset: number) => Position {
  const starts = [0];
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) starts.push(at + 1);
  return (offset) => {
    const within = Math.min(Math.max(0, offset), text.length);
    let low = 0;
    let high = starts.length;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (starts[middle] <= within) low = middle;
      else high = middle;
    }
    return { line: low + 1, column: within - starts[low] + 1 };
  };
}

/** One fault for each place: what follows from a fault at the same spot says nothing new. */
function syntaxFaultsOf(errors: readonly YAMLError[]): SyntaxFault[] {
  const deep = errors.find(({ code }) => code === 'RESOURCE_EXHAUSTION');
  const places = new Map<number, SyntaxFault>();
  for (const { code, message, pos } of deep ? [deep] : errors) {
    const problem = `not well-formed YAML: ${SAID_BETTER[code] ?? sentence(message)}`;
    if (!places.has(pos[0])) places.set(pos[0], { problem, offset: pos[0] });
  }
  return [...places.values()];
}

/**
 * What each alias stands for: the nearest node above it with that anchor. The library walks the document anew for
 * every alias; one walk for all keeps a file of aliases linear.
 */
function aliasTargets(document: Document.Parsed): ReadonlyMap<Alias, Node> {
  const anchors = new Map<string, Node>();
  const targets = new Map<Alias, Node>();
  visit(document, {
    Value: (_, node) => {
      if (node.anchor !== undefined) anchors.set(node.anchor, node);
    },
    Alias: (_, alias) => {
      const target = anchors.get(alias.source);
      if (target !== undefined) targets.set(alias, target);
    },
  });
  return targets;
}

const sentence = (message: string): string => message.split('\n')[0].replace(/[.:]$/, '');

/** Keys and values of a map in file order, those lent by a merge key `<<` first unless the map has its own. */
export function entriesOf(map: Node, source: DesignSource): { entries: Entry[]; duplicates: Entry[]; misfits: Node[] } {
  const found = new Map<string, Entry>();
  const duplicates: Entry[] = [];
  const misfits: Node[] = [];
  if (!isMap(map)) return { entries: [], duplicates, misfits };
  const own = new Set<string>();
  for (const pair of map.items as Pair[]) {
    const key = source.resolve(pair.key);
    if (!isScalar(key) || typeof key.value !== 'string') {
      misfits.push(key ?? map);
    } else if (key.value === '<<') {
      for (const entry of lentEntries(pair.value, source, misfits)) {
        if (!found.has(entry.name)) found.set(entry.name, entry);
      }
    } else {
      const entry = { key, name: key.value, value: pair.value };
      if (own.has(entry.name)) duplicates.push(entry);
      else found.set(entry.name, entry);
      own.add(entry.name);
    }
  }
  return { entries: [...found.values()], duplicates, misfits };
}

/** What `<<: *common` or `<<: [*a, *b]` lends; one level deep. */
function lentEntries(value: unknown, source: DesignSource, misfits: Node[]): Entry[] {
  const node = source.resolve(value);
  const lenders = isSeq(node) ? node.items.map((item) => source.resolve(item)) : [node];
  return lenders.flatMap((lender) => {
    if (!isMap(lender)) {
      if (node !== null) misfits.push(node);
      return [];
    }
    return (lender.items as Pair[]).flatMap((pair) => {
      const key = source.resolve(pair.key);
      if (!isScalar(key) || typeof key.value !== 'string' || key.value === '<<') return [];
      return [{ key, name: key.value, value: pair.value }];
    });
  });
}

/**
 * Where the value at a path stands: a scalar at its own text, a collection at its key, or for `what` 'key' anything at
 * its key; the nearest place above for what is not in the file.
 */
export function locatePath(source: DesignSource, path: DesignPath, what: 'value' | 'key' = 'value'): Position {
  let node = source.root;
  let offset = node?.range?.[0] ?? 0;
  for (const step of path) {
    if (node === null) break;
    if (isSeq(node)) {
      const item = node.items[Number(step)];
      node = source.resolve(item);
      if (node !== null) offset = startOf(node, offset);
    } else {
      const entry = entriesOf(node, source).entries.find(({ name }) => name === String(step));
      node = entry === undefined ? null : source.resolve(entry.value);
      const byValue = what === 'value' && isScalar(node) && node.value !== '';
      if (entry !== undefined) offset = startOf(byValue && node !== null ? node : entry.key, offset);
    }
  }
  return source.position(offset);
}

export const startOf = (node: Node, fallback = 0): number => node.range?.[0] ?? fallback;
