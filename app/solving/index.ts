/** Doors of solving: how the plan is solved, as a section of the sheet. */
export { default as SolverSettings } from './SolverSettings.vue';
