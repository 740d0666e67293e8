/**
 * The solver in a process of its own on the desktop.
 *
 * The parent hands over one end of a channel whose other end the window holds, so that results go straight there. Each
 * port handed over gets a runner of its own; it ends with its port.
 */
import { startRefining, startSolve } from '../../planning';
import type { Port } from '../protocol';
import { startRunner } from '../runner';

/** The port of a desktop process, as far as it is used here; its own types exist only where the desktop runtime does. */
export interface ParentPort {
  on(event: 'message', handler: (event: { data: unknown; ports: DesktopPort[] }) => void): unknown;
}
export interface DesktopPort {
  on(event: 'message', handler: (event: { data: unknown }) => void): unknown;
  on(event: 'close', handler: () => void): unknown;
  off(event: 'message', handler: (event: { data: unknown }) => void): unknown;
  postMessage(message: unknown): void;
  start(): void;
  close(): void;
}

const now = (): number => performance.now();
// eslint-disable-next-line no-console -- faults of ours are kept for those who mend them
const log = (fault: unknown): void => console.error(fault);

/** Serves every port that the parent hands over. */
export function serve(parent: ParentPort): void {
  parent.on('message', ({ ports }) => {
    for (const given of ports) {
      const runner = startRunner({
        port: portOf(given),
        start: (project) => startSolve(project, { now }),
        refine: startRefining,
        now,
        later: (turn) => void setImmediate(turn),
        log,
      });
      given.on('close', () => runner.stop());
      given.start();
    }
  });
}

/** These ports copy what they send: there is nothing to transfer. */
function portOf(given: DesktopPort): Port {
  return {
    post: (message) => given.postMessage(message),
    listen(handler) {
      const heard = (event: { data: unknown }): void => handler(event.data);
      given.on('message', heard);
      return () => void given.off('message', heard);
    },
    close: () => given.close(),
  };
}

const { parentPort } = process as unknown as { parentPort?: ParentPort };
if (parentPort !== undefined) serve(parentPort);
