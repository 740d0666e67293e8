/** Doors of planning: the solve of one plan, and what its answers owe to grid and step. */
export { solve, startSolve, type Progress, type SolveOptions, type Solving } from './solve';
export { startRefining, type Refining } from './uncertainty';
