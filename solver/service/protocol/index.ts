/** Doors of the protocol: messages, ports, the checks of what arrives, and the asking side of the conversation. */
export { FAILURES, type FailureCode } from './failures';
export { PROTOCOL_VERSION, type AboutJob, type Answered, type FromSolver, type ToSolver } from './messages';
export { type After, type Link, type Port } from './port';
export { MAX_CASES, readFromSolver, readToSolver } from './read';
export {
  createSolverClient,
  SILENCE_S,
  START_S,
  type ClientEvent,
  type Restarted,
  type SolveOptions,
  type SolverClient,
} from './client';
