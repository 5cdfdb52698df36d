/** What a design declares and never uses: often a slip, never an error. */
import type { Dial } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import type { Reading } from './reading.js';
import type { LayerRecord } from './stack-fields.js';

export function reportUnused(design: DesignRecord, dials: readonly Dial[], reading: Reading): void {
  const caution = (path: DesignPath, problem: string, found: string) =>
    reading.report({ code: 'caution', severity: 'warning', path, problem, found }, 'key');
  for (const { name } of dials) {
    if (!reading.usedDials.has(name)) caution(['dials', name], 'nothing uses this dial', name);
  }
  const filled = new Set([design.surroundings.name, ...design.parts.map(({ value }) => value.medium.name)]);
  for (const { name, path } of design.media) {
    if (!filled.has(name)) caution(path, 'no part is filled with this medium', name);
  }
  const dissolved = new Set(
    design.media.flatMap(({ value }) => (value.kind === 'record' ? value.fields.dyes.map((dye) => dye.name) : [])),
  );
  for (const { name, path } of design.dyes) {
    if (!dissolved.has(name)) caution(path, 'no medium holds this dye', name);
  }
  const layered = new Set(design.finishes.flatMap(({ value }) => layerNames(value.stack?.layers ?? [])));
  for (const { name, path } of design['layer-materials']) {
    if (!layered.has(name)) caution(path, 'no layer is made of this material', name);
  }
  const coated = new Set(design.parts.flatMap(({ value }) => value.faces.map((face) => face.value.name)));
  for (const { name, path } of design.finishes) {
    if (!coated.has(name)) caution(path, 'no face has this finish', name);
  }
}

const layerNames = (layers: readonly LayerRecord[]): string[] =>
  layers.flatMap(({ material, layers: group }) => [...(material ? [material.name] : []), ...layerNames(group ?? [])]);
