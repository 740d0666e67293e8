/** Doors of the protocol: messages and ports, data only. */
export { FAILURES, PROTOCOL_VERSION, type FailureCode, type FromSolver, type ToSolver } from './messages';
export { type Port } from './port';
