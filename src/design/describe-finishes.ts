/** Finishes as written -> what they do to light, energy checked. */
import { readMetal } from '../materials/library.js';
import { coatingGrid, ENERGY_SLACK } from './coating-grid.js';
import { describeLayerMaterial } from './describe-layer-materials.js';
import { describeStack, type OwnLayerMaterials } from './describe-stacks.js';
import type { FinishDescription } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import type { FinishRecord } from './finish-fields.js';
import type { Named } from './form-record.js';
import type { Mirror } from './mirror-form.js';
import type { Reading } from './reading.js';
import { readScatterTable } from './scatter-table.js';

type Finish<Kind extends FinishDescription['kind']> = Extract<FinishDescription, { kind: Kind }>;
type Identity = Pick<FinishDescription, 'name' | 'path'>;

export function describeFinishes(design: DesignRecord, reading: Reading): Map<string, FinishDescription> {
  const finishes = new Map<string, FinishDescription>();
  for (const kind of ['clear', 'black'] as const) finishes.set(kind, { name: kind, path: ['finishes', kind], kind });
  const own = new Map(design['layer-materials'].map((entry) => [entry.name, describeLayerMaterial(entry, reading)]));
  for (const entry of design.finishes) {
    const finish = describeFinish(entry, own, reading);
    if (finish !== null) finishes.set(entry.name, finish);
  }
  return finishes;
}

function describeFinish(
  { name, path, value }: Named<FinishRecord>,
  materials: OwnLayerMaterials,
  reading: Reading,
): FinishDescription | null {
  const identity = { name, path };
  const { mirror, dichroic, stack, table, diffuser, scatter, bsdf } = value;
  if (mirror !== null) return describeMirror(mirror, identity);
  if (dichroic !== null) return describeDichroic(dichroic, identity, reading);
  if (stack !== null) return describeStack(stack, identity, materials, reading);
  if (table !== null) {
    const grid = coatingGrid(table, [...path, 'table'], reading);
    return grid && { ...identity, kind: 'table', ...grid };
  }
  if (diffuser !== null) {
    const { reflects, transmits } = diffuser;
    checkEnergy(reflects + transmits, 'reflects + transmits', [...path, 'diffuser'], reading);
    return { ...identity, kind: 'diffuser', reflects, transmits };
  }
  if (bsdf !== null) {
    const measured = readScatterTable(bsdf, [...path, 'bsdf'], reading);
    return measured && { ...identity, kind: 'bsdf', ...measured };
  }
  return scatter && describeScatter(scatter, identity, reading);
}

function describeMirror(mirror: Mirror, identity: Identity): Finish<'mirror'> | Finish<'metal'> {
  if (mirror.kind === 'share') return { ...identity, kind: 'mirror', reflectance: mirror.reflectance };
  const { name: metal, n, k } = readMetal(mirror.metal.name);
  return { ...identity, kind: 'metal', metal, n, k };
}

function describeDichroic(
  fields: NonNullable<FinishRecord['dichroic']>,
  identity: Identity,
  reading: Reading,
): Finish<'dichroic'> {
  const { edge, width, passes, transmits, reflects, absorbs } = fields;
  const path = [...identity.path, 'dichroic'];
  checkEnergy(transmits + absorbs, 'transmits + absorbs', path, reading);
  checkEnergy(reflects + absorbs, 'reflects + absorbs', path, reading);
  return { ...identity, kind: 'dichroic', edgeNm: edge, widthNm: width, passes, transmits, reflects, absorbs };
}

function describeScatter(
  { shape, fwhm, reflects, transmits }: NonNullable<FinishRecord['scatter']>,
  identity: Identity,
  reading: Reading,
): Finish<'scatter'> {
  if (reflects === null && transmits === null) return { ...identity, kind: 'scatter', shape, fwhm, split: null };
  const split = { reflects: reflects ?? 0, transmits: transmits ?? 0 };
  checkEnergy(split.reflects + split.transmits, 'reflects + transmits', [...identity.path, 'scatter'], reading);
  return { ...identity, kind: 'scatter', shape, fwhm, split };
}

function checkEnergy(sum: number, words: string, path: DesignPath, reading: Reading): void {
  if (!(sum > 1 + ENERGY_SLACK)) return;
  reading.report({
    code: 'energy',
    path,
    problem: 'the finish would create energy',
    found: `${words} = ${Number((sum * 100).toPrecision(6))} %`,
    expected: 'at most 100 %',
  });
}
