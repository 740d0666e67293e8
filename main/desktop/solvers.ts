/** Solver processes of the window: started, given a port that leads straight to the page, and missed when they end. */
import { MessageChannelMain, app, utilityProcess, type MessagePortMain, type UtilityProcess } from 'electron';
import { log } from './log';

const SERVICE = 'Soakwright solver';

export interface Solvers {
  /** Starts a solver; `give` gets the page's end of its port, `ended` is told once when it ends by itself. */
  start(give: (solver: number, port: MessagePortMain) => void, ended: (solver: number, reason: string) => void): number;
  end(solver: number): void;
  endAll(): void;
}

/** `entry` is the file of the solver process. */
export function createSolvers(entry: string): Solvers {
  const running = new Map<number, UtilityProcess>();
  let last = 0;
  app.on('child-process-gone', (_event, { type, name, reason, exitCode }) => {
    log.warn(`process gone: ${name ?? type}, ${reason}, code ${exitCode}`);
  });
  const end = (solver: number): void => {
    const child = running.get(solver);
    running.delete(solver);
    child?.kill();
  };
  return {
    start(give, ended) {
      const solver = ++last;
      const child = utilityProcess.fork(entry, [], { serviceName: SERVICE });
      running.set(solver, child);
      const { port1, port2 } = new MessageChannelMain();
      child.postMessage({ solver }, [port1]);
      child.once('exit', (code) => {
        if (running.delete(solver)) ended(solver, wordExit(code));
      });
      give(solver, port2);
      return solver;
    },
    end,
    endAll: () => [...running.keys()].forEach(end),
  };
}

const wordExit = (code: number): string =>
  code === 0 ? 'The solver process ended.' : `The solver process ended unexpectedly (code ${code}).`;
