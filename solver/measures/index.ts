/** Doors of measures: what is drawn from the history of a run. */
export { createMeasures, type Measured, type Measures } from './measures';
export { marginUnit } from './judge';
export { MAX_FRAMES } from './frames';
