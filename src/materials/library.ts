/** The material library: every curve with its source and how sure it is. Files are read when first asked for. */
export { dyeNames, dyeSolvents, readDye } from './dyes.js';
export { gasNames, readGas } from './gases.js';
export type { DyeData, MaterialData, MetalData, ThermalData } from './material-data.js';
export { metalNames, readMetal } from './metals.js';
export { readSolid, solidNames } from './solids.js';
export { readSolvent, solventNames } from './solvents.js';
