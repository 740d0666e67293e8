/** Doors of the stores: the plan, its runs, and what is looked at. */
export { problemsIn, useProjectStore } from './project';
export { useRunStore, type Progress, type RunState } from './run';
export { useViewStore, type FocusWish, type TableName, type Theme } from './view';
export { useShownStore } from './shown';
