/** Library face of stokeswell: read a design, trace it, sum the run up. */
export type { Description } from './design/description.js';
export { DesignFaults } from './design/design-faults.js';
export type { Fault, FaultCode, LocatedFault } from './design/fault.js';
export { type DesignReading, readDesign } from './design/read-design.js';
export { type RunAbout, summariseRun } from './outcome/summarise-run.js';
export type { Figure, FigureName, LedgerRow, MapRecord, RunRecord } from './record/run-record.js';
export type { RunTallies } from './tallies/run-tallies.js';
export type { SaturationStep } from './trace/saturation-step.js';
export { NothingTraced, traceDescription } from './trace/trace-design.js';
export type { StopReason, TraceOptions, TraceProgress, TraceResult } from './trace/trace-result.js';
export { type SaturatedTrace, traceSaturated } from './trace/trace-saturated.js';
