/** State of one reading of a design: the faults found so far, the dials, and what the forms need to read a value. */
import { isMap, isScalar, isSeq, type Node } from 'yaml';
import { nearestName } from '../units/nearest-name.js';
import type { Quantity } from '../units/quantity.js';
import { parseQuantity } from '../units/quantity-parse.js';
import { nearestUnit } from '../units/quantity-unit-expression.js';
import { type DesignSource, locatePath, startOf } from './design-source.js';
import type { DesignPath, Fault, LocatedFault } from './fault.js';
import type { MeshFileReader } from './read-design-mesh.js';
import type { TableFileReader } from './table-file.js';

/** A value of the file with its place. A null node is one whose fault has been told already. */
export interface Place {
  readonly node: Node | null;
  readonly path: DesignPath;
}

/** Aliases let a small file unfold to a huge one; no sensible design has this many values. */
const MOST_VALUES = 100_000;
const MOST_FAULTS = 200;

/** `T` without the key `severity`, which is 'error' unless said. */
export type Complaint = Omit<Fault, 'severity'> & { readonly severity?: 'warning' };

/** A character of the text, the key of the path, or a place in another file. */
export type Spot = number | 'key' | { readonly file: string; readonly line: number; readonly column: number };

export class Reading {
  readonly dials = new Map<string, Quantity | null>();
  readonly usedDials = new Set<string>();
  private readonly told: LocatedFault[] = [];
  private untold = 0;
  private values = 0;
  private unfolded = false;

  constructor(
    readonly source: DesignSource,
    readonly readTable: TableFileReader,
    readonly readMesh: MeshFileReader,
  ) {}

  /** Notes a fault: where the value at its path stands unless another spot is given. */
  report(complaint: Complaint, at: Spot | null = null): void {
    if (this.full) {
      this.untold++;
      return;
    }
    const { source } = this;
    const place =
      typeof at === 'number'
        ? source.position(at)
        : typeof at === 'object' && at !== null
          ? at
          : locatePath(source, complaint.path, at ?? 'value');
    this.told.push({ severity: 'error', file: source.file, ...complaint, ...place });
  }

  /** Enough has been told: further faults are only counted. */
  get full(): boolean {
    return this.told.length >= MOST_FAULTS;
  }

  hasErrors(): boolean {
    return this.told.some(({ severity }) => severity === 'error');
  }

  /** True when something has been said about exactly this path. */
  hasFaultAt(path: DesignPath): boolean {
    return this.told.some((fault) => fault.path.join('\n') === path.join('\n'));
  }

  /** Faults and warnings in the order of the file. */
  faults(): LocatedFault[] {
    const sorted = this.told.toSorted((a, b) => a.line - b.line || a.column - b.column);
    if (this.untold > 0) {
      const last = sorted[sorted.length - 1];
      const problem = `${this.untold} more faults are not listed`;
      sorted.push({ ...last, path: [], code: 'file', severity: 'error', problem });
    }
    return sorted;
  }

  /** The value behind a node of the tree, aliases followed. */
  place(value: unknown, path: DesignPath): Place {
    if (++this.values > MOST_VALUES) {
      if (!this.unfolded) {
        this.unfolded = true;
        this.report({ code: 'yaml', path: [], problem: `the file unfolds to more than ${MOST_VALUES} values` });
      }
      return { node: null, path };
    }
    const node = this.source.resolve(value);
    if (node === null && value !== null) {
      const offset = startOf(value as Node);
      const found = this.source.text.slice(offset, (value as Node).range?.[1] ?? offset);
      this.report({ code: 'yaml', path, problem: 'no anchor of this name stands above', found }, offset);
    }
    return { node, path };
  }

  /** The text of a scalar, or null after reporting that it is none. */
  text({ node, path }: Place, expected: string): string | null {
    if (node === null) return null;
    if (!isScalar(node) || typeof node.value !== 'string') {
      const problem = 'one value is needed here';
      this.report({ code: 'type', path, problem, found: describeNode(node), expected });
      return null;
    }
    if (node.value.trim() === '') {
      this.report({ code: 'missing', path, problem: 'the field is empty', expected });
      return null;
    }
    return node.value;
  }

  /** The quantity a scalar spells, or null after reporting what is wrong with it. */
  quantity(place: Place, expected: string): Quantity | null {
    const text = this.text(place, expected);
    if (text === null) return null;
    return this.quantityFromText(text, place, expected, (start) => this.offsetIn(place, text, start));
  }

  /** As `quantity`, for a text that need not stand in the file (a dial turned from outside). */
  quantityFromText(
    text: string,
    place: Place,
    expected: string,
    offset: (start: number) => number | null,
    dial = (name: string) => this.dial(name),
  ): Quantity | null {
    const reading = parseQuantity(text, dial);
    if (reading.ok) return reading.quantity;
    const { problem, start, found, suggestion, unknownDial } = reading.fault;
    const nearest = unknownDial && found ? (nearestName(found, this.dials.keys()) ?? nearestUnit(found)) : null;
    const hyphen = unknownDial && found?.includes('-') && nearest === null ? 'put spaces round a minus' : null;
    const hint = suggestion ?? nearest ?? hyphen;
    this.report(
      {
        code: unknownDial ? 'unknown-name' : 'quantity',
        path: place.path,
        problem,
        found: found ?? text,
        expected: reading.fault.expected ?? expected,
        ...(hint === null ? {} : { suggestion: hint }),
      },
      offset(start),
    );
    return null;
  }

  dial(name: string): Quantity | null | undefined {
    const value = this.dials.get(name);
    if (value !== undefined) this.usedDials.add(name);
    return value;
  }

  /** Place in the file of a character of a scalar's value; its start where escapes or folding move characters. */
  offsetIn({ node }: Place, text: string, start: number): number {
    const from = node?.range?.[0] ?? 0;
    for (const quote of [0, 1]) {
      if (this.source.text.startsWith(text, from + quote)) return from + quote + Math.min(start, text.length - 1);
    }
    return from;
  }
}

/** 'a list', 'a map' or the text itself. */
export function describeNode(node: Node): string {
  if (isSeq(node)) return 'a list';
  if (isMap(node)) return 'a map of keys and values';
  return isScalar(node) && node.value !== '' ? String(node.value) : 'nothing';
}
