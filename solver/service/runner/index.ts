/** Door of the runner: the answering side of the protocol, on any platform. */
export { ANSWERS_MS, PROGRESS_MS, SLICE_MS, startRunner, type RunnerOptions } from './runner';
