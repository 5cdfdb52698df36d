/** Stacks of thin films as written -> layers with thicknesses, groups unfolded. */
import { layerMaterialNames, readLayerMaterial } from '../materials/library.js';
import type { LayerMaterial } from './describe-layer-materials.js';
import type { FinishDescription, LayerDescription } from './description.js';
import type { DesignPath } from './fault.js';
import { checkReference } from './names.js';
import type { Reading } from './reading.js';
import { type LayerRecord, MOST_LAYERS, type StackRecord } from './stack-fields.js';

type Stack = Extract<FinishDescription, { kind: 'stack' }>;

/** Layer materials of the design by name; null for one that is faulty. */
export type OwnLayerMaterials = ReadonlyMap<string, LayerMaterial | null>;

/** The stack, or null after reporting what is wrong with it. */
export function describeStack(
  fields: StackRecord,
  identity: Pick<Stack, 'name' | 'path'>,
  materials: OwnLayerMaterials,
  reading: Reading,
): Stack | null {
  const total = countLayers(fields.layers);
  if (total > MOST_LAYERS) {
    reading.report({
      code: 'range',
      path: [...fields.path, 'layers'],
      problem: 'the stack has too many layers',
      found: `${total} layers with all repeats`,
      expected: `at most ${MOST_LAYERS}`,
    });
    return null;
  }
  const layers = unfold(fields.layers, fields, materials, reading);
  return layers && { ...identity, kind: 'stack', layers, extrapolates: fields.extrapolate === 'yes' };
}

function countLayers(layers: readonly LayerRecord[]): number {
  return layers.reduce((sum, { layers: group, repeat }) => sum + (group ? countLayers(group) * (repeat || 1) : 1), 0);
}

function unfold(
  records: readonly LayerRecord[],
  stack: StackRecord,
  materials: OwnLayerMaterials,
  reading: Reading,
): LayerDescription[] | null {
  let sound = true;
  const layers: LayerDescription[] = [];
  for (const record of records) {
    const group = record.layers ?? null;
    if (group !== null) {
      for (const field of ['thickness', 'quarter-waves', 'half-waves', 'at'] as const) {
        if (record[field] !== null) reportMisplaced(field, 'a layer, not to a group', record.path, reading);
      }
      const unfolded = unfold(group, stack, materials, reading);
      if (unfolded === null) sound = false;
      else for (let i = 0; i < (record.repeat || 1); i++) layers.push(...unfolded);
      continue;
    }
    if ((record.repeat ?? null) !== null) reportMisplaced('repeat', 'a group of `layers`', record.path, reading);
    const layer = describeLayer(record, stack, materials, reading);
    if (layer === null) sound = false;
    else layers.push(layer);
  }
  return sound ? layers : null;
}

function describeLayer(
  record: LayerRecord,
  stack: StackRecord,
  materials: OwnLayerMaterials,
  reading: Reading,
): LayerDescription | null {
  const { path, thickness } = record;
  const quarters = record['quarter-waves'];
  const halves = record['half-waves'];
  const given = [thickness, quarters, halves].filter((value) => value !== null).length;
  if (given !== 1) {
    reading.report({
      code: given === 0 ? 'missing' : 'type',
      path,
      problem: given === 0 ? 'the layer has no thickness' : 'the layer has more than one thickness',
      expected: 'one of thickness, quarter-waves, half-waves',
    });
  }
  const counted = quarters !== null || halves !== null;
  const atNm = record.at ?? stack['design-wavelength'];
  if (counted && atNm === null) {
    reading.report({
      code: 'missing',
      path,
      problem: 'quarter and half waves need a wavelength',
      expected: '`design-wavelength: 550 nm` in the stack, or `at: 550 nm` in the layer',
    });
  }
  if (!counted && record.at !== null) reportMisplaced('at', 'quarter-waves and half-waves', path, reading);
  const material = record.material && materialNamed(record.material, materials, reading);
  if (!material || given !== 1 || (counted && atNm === null)) return null;
  const fourths = quarters ?? 2 * (halves ?? 0);
  const bare = counted ? (fourths * (atNm ?? Number.NaN)) / (4 * material.n(atNm ?? Number.NaN)) : (thickness ?? 0);
  const { name, n, k, rangeNm } = material;
  return { material: name, n, k, rangeNm, thicknessNm: bare * stack.scale, path };
}

function materialNamed(
  reference: NonNullable<LayerRecord['material']>,
  materials: OwnLayerMaterials,
  reading: Reading,
): LayerMaterial | null {
  const own = materials.get(reference.name);
  if (own !== undefined) return own;
  const names = [...materials.keys(), ...layerMaterialNames()];
  const problem = 'no layer material of the design or of the library has this name';
  return checkReference(reference, names, problem, reading) ? readLayerMaterial(reference.name) : null;
}

function reportMisplaced(field: string, owner: string, path: DesignPath, reading: Reading): void {
  const problem = `${field} belongs to ${owner}`;
  reading.report({ code: 'unknown-key', path: [...path, field], problem, found: field });
}
