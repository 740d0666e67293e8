/** Doors of the commands: one function that does what the arguments ask for, given the world it may touch. */
export { soakwright } from './cli';
export { EXIT, EXIT_MEANINGS, type ExitCode } from './exitCodes';
export { type Io } from './io';
