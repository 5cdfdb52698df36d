/** The material library: every curve with its source and how sure it is. Files are read when first asked for. */
export { readDyeQuenching } from './dye-quenching.js';
export { dyeNames, dyeSolvents, readDye } from './dyes.js';
export { gasNames, readGas } from './gases.js';
export { layerMaterialNames, readLayerMaterial } from './layer-materials.js';
export type {
  DyeData,
  DyeForm,
  LayerMaterialData,
  MaterialData,
  QuenchingData,
  ThermalData,
  YieldTemperature,
} from './material-data.js';
export { metalNames, readMetal } from './metals.js';
export { mixtureDensity } from './mixture-density.js';
export { type Photostability, type RangedConstant, readPhotostability } from './photostability.js';
export { readSolid, solidNames } from './solids.js';
export { readSolvent, solventNames } from './solvents.js';
