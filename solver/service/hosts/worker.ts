/** The solver in a browser: a Web Worker whose own messages are the port. */
import { startRefining, startSolve } from '../../planning';
import type { Port } from '../protocol';
import { startRunner } from '../runner';
import { channelTurns } from './turns';

const scope = self as unknown as DedicatedWorkerGlobalScope;

const port: Port = {
  post: (message, transfer = []) => scope.postMessage(message, transfer),
  listen(handler) {
    const heard = (event: MessageEvent): void => handler(event.data);
    scope.addEventListener('message', heard);
    return () => scope.removeEventListener('message', heard);
  },
  close: () => scope.close(),
};

const now = (): number => performance.now();
// eslint-disable-next-line no-console -- faults of ours are kept for those who mend them
const log = (fault: unknown): void => console.error(fault);
startRunner({ port, start: (project) => startSolve(project, { now }), refine: startRefining, now, later: channelTurns(), log });
