/** Doors of the hosts: a solver in the same process. The worker and the process host are entries, started by file. */
export { portPair, startInProcess } from './inProcess';
