/** A made-up clock and made-up solvers, so that hours of silence pass in no time. */
import type { Frames } from '../../solver/model';
import { PROTOCOL_VERSION, type After, type Answered, type FromSolver, type Link } from '../../solver/service/protocol';

/** A clock that moves only when told to. */
export function manualClock() {
  let now = 0;
  let calls: { due: number; call: () => void }[] = [];
  const after: After = (wait_ms, call) => {
    const entry = { due: now + wait_ms, call };
    calls.push(entry);
    return () => void (calls = calls.filter((other) => other !== entry));
  };
  return {
    after,
    now: () => now,
    /** Moves time on, calling what falls due, in order. */
    pass(time_ms: number): void {
      const until = now + time_ms;
      for (;;) {
        const next = calls.filter(({ due }) => due <= until).sort((a, b) => a.due - b.due)[0];
        if (next === undefined) break;
        calls = calls.filter((entry) => entry !== next);
        now = next.due;
        next.call();
      }
      now = until;
    },
    /** Time goes on while nothing runs; on waking, what fell due meanwhile is called once. */
    sleep(time_ms: number): void {
      now += time_ms;
      const due = calls.filter((entry) => entry.due <= now);
      calls = calls.filter((entry) => entry.due > now);
      due.forEach(({ call }) => call());
    },
    pending: () => calls.length,
  };
}

/** One solver that was started: what it was told, and what it says and does by the test's hand. */
export interface FakeSolver {
  told: unknown[];
  killed: boolean;
  say(message: FromSolver | unknown): void;
  die(reason?: string): void;
}

/** A place that starts solvers; `all` lists them in the order of their start. */
export function solverShop({ greeting = { type: 'ready', protocol: PROTOCOL_VERSION } as unknown, startFails = 0 } = {}) {
  const all: FakeSolver[] = [];
  let failures = startFails;
  const start = (): Promise<Link> => {
    if (failures-- > 0) return Promise.reject(new Error('no such file'));
    const listeners = new Set<(message: unknown) => void>();
    let exit: ((reason: string) => void) | null = null;
    const solver: FakeSolver = {
      told: [],
      killed: false,
      say: (message) => listeners.forEach((listener) => listener(message)),
      die: (reason = 'exit code 9') => exit?.(reason),
    };
    all.push(solver);
    const link: Link = {
      port: {
        post: (message) => void solver.told.push(message),
        listen(handler) {
          listeners.add(handler);
          if (greeting !== null) queueMicrotask(() => handler(greeting));
          return () => void listeners.delete(handler);
        },
        close: () => undefined,
      },
      onExit(handler) {
        exit = handler;
        return () => void (exit = null);
      },
      kill: () => void (solver.killed = true),
    };
    return Promise.resolve(link);
  };
  return { start, all };
}

/** Lets promises and microtasks run out. */
export const settle = (): Promise<void> => new Promise((done) => setImmediate(done));

/** An answer of the least that passes as one. */
export const anyResult = { answers: [] } as unknown as Answered;
export const anyFrames = { temperature_C: new Float32Array(1) } as unknown as Frames;
