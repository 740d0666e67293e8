/** Doors of uncertainty: what a run's answers owe to its grid and step. */
export { startRefining, type Refining } from './refining';
