/** Doors of the stores: the plan, its runs, and what is looked at. */
export { problemsIn, useProjectStore } from './project';
export { useRunStore } from './run';
export { useViewStore, type TableName, type Theme } from './view';
export { useShownStore } from './shown';
