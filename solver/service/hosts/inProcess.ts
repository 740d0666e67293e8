/** The solver in the same process, for commands: two ends of a channel in memory, messages handed over as they are. */
import { startRefining, startSolve } from '../../planning';
import type { Link, Port } from '../protocol';
import { startRunner } from '../runner';

type Handler = (message: unknown) => void;

/**
 * Two ports; what one posts the other hears, in order, never within the call that posted it. Messages wait for the first
 * who listens, as on the ports of the platforms.
 */
export function portPair(): [Port, Port] {
  const handlers: [Handler | null, Handler | null] = [null, null];
  const waiting: [unknown[], unknown[]] = [[], []];
  let open = true;
  const deliver = (to: 0 | 1): void => {
    const handler = handlers[to];
    if (handler === null) return;
    while (open && waiting[to].length > 0) handler(waiting[to].shift());
  };
  const end = (mine: 0 | 1): Port => ({
    post(message) {
      const other = mine === 0 ? 1 : 0;
      waiting[other].push(message);
      queueMicrotask(() => deliver(other));
    },
    listen(handler) {
      handlers[mine] = handler;
      queueMicrotask(() => deliver(mine));
      return () => void (handlers[mine] = null);
    },
    close: () => void (open = false),
  });
  return [end(0), end(1)];
}

/** Starts a solver here. It lives until `kill`; it cannot end by itself, so `onExit` never calls. */
export function startInProcess(log?: (fault: unknown) => void): Promise<Link> {
  const [port, its] = portPair();
  const now = (): number => performance.now();
  const { stop } = startRunner({
    port: its,
    start: (project) => startSolve(project, { now }),
    refine: startRefining,
    now,
    later: (turn) => void setImmediate(turn),
    log,
  });
  return Promise.resolve({ port, onExit: () => () => undefined, kill: stop });
}
