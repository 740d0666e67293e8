/** Door of the hosts for commands. The worker and the process host are entries of their own, started by file. */
export { portPair, startInProcess } from './inProcess';
