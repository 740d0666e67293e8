/** A solver client that answers when the test says so. */
import type { Outcome, Project, RunResult } from '../../../solver/model';
import type { ClientEvent, SolverClient } from '../../../solver/service/protocol';

export interface FakeSolver extends SolverClient {
  /** The plans that were asked for, newest last. */
  readonly asked: { job: number; revision: number; plan: Project }[];
  tell(event: ClientEvent): void;
  /** Answers and ends the newest job. */
  finish(result: Partial<RunResult>, outcome?: Partial<Outcome>): void;
}

export function fakeSolver(): FakeSolver {
  const handlers = new Set<(event: ClientEvent) => void>();
  const asked: FakeSolver['asked'] = [];
  let busy = false;
  const tell = (event: ClientEvent): void => {
    if (event.type === 'done' || event.type === 'failed') busy = false;
    handlers.forEach((handler) => handler(event));
  };
  return {
    asked,
    tell,
    finish(result, outcome = {}) {
      const { job, revision } = asked[asked.length - 1];
      const whole: Outcome = { reason: 'finished', reached_s: 100, stage: null, message: null, ...outcome };
      tell({ type: 'answers', job, revision, case: 0, final: true, result: { ...(result as RunResult), outcome: whole } });
      tell({ type: 'done', job, revision, outcomes: [whole] });
    },
    solve(cases, revision) {
      asked.push({ job: asked.length + 1, revision, plan: cases[0] });
      busy = true;
      return asked.length;
    },
    cancel() {
      if (!busy) return;
      const { job, revision } = asked[asked.length - 1];
      tell({ type: 'done', job, revision, outcomes: [{ reason: 'cancelled', reached_s: 40, stage: null, message: 'Stopped.' }] });
    },
    busy: () => busy,
    listen(handler) {
      handlers.add(handler);
      return () => void handlers.delete(handler);
    },
    close: () => handlers.clear(),
  };
}
