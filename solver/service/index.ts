/** Doors of the solver service for commands: a solver in the same process. Windows start the hosts by their files. */
export { startInProcess } from './hosts';
