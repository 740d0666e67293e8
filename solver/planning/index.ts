/** Doors of planning: the solve of one plan. */
export { solve, startSolve, type Progress, type SolveOptions, type Solving } from './solve';
