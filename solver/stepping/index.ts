/** Doors of stepping: a run of a plan, how it can end, and what it shows of every step. */
export { createRun } from './createRun';
export type { FieldPoints, Run, Step, StepObserver } from './contract';
export { OUTCOMES, succeeded, type OutcomeEntry } from './outcomes';
/** The state that a part comes to in the end under given exposures and sources. */
export { steadyState, type SteadyState, type SteadyUnder } from './steady';
/** For a body other than a plan's: any HeatSystem, marched by any scheme. */
export { makeScheme, type SchemeSettings } from './makeScheme';
export { RunLoop, type Ending, type LoopObserver } from './runLoop';
export { startState, type HeatState, type Scheme } from './scheme';
export { type CycleInterval } from './intervals';
