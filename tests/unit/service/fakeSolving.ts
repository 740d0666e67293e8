/** A made-up run that takes a fixed number of steps, each of which costs time on a made-up clock. */
import type { Frames, RunResult } from '../../../solver/model';
import type { Refining, Solving } from '../../../solver/planning';

export interface FakeRun {
  steps: number;
  step_ms: number;
  /** Step that throws. */
  faultAt?: number;
}

export function fakeSolving(clock: { pass(ms: number): void }, run: FakeRun): Solving & { longest_ms: number; taken: number } {
  let cancelled = false;
  const fake = {
    longest_ms: 0,
    taken: 0,
    advance(shouldPause: () => boolean): boolean {
      let spent = 0;
      while (fake.taken < run.steps && !cancelled) {
        if (fake.taken === run.faultAt) throw new Error('the matrix has no pivot');
        fake.taken++;
        clock.pass(run.step_ms);
        spent += run.step_ms;
        if (shouldPause()) break;
      }
      fake.longest_ms = Math.max(fake.longest_ms, spent);
      return cancelled || fake.taken === run.steps;
    },
    progress: () => ({ time_s: fake.taken, end_s: run.steps, stage: 's1', fraction: fake.taken / run.steps }),
    result: () => resultOf(fake.taken, cancelled),
    cancel: () => void (cancelled = true),
  };
  return fake;
}

function resultOf(reached: number, cancelled: boolean): RunResult {
  const frames: Frames = {
    time_s: new Float64Array([0, reached]),
    position_m: new Float64Array(2),
    layerStart: new Int32Array([0, 2]),
    temperature_C: new Float32Array(4),
    faceFlux_W_m2: new Float32Array(4),
  };
  const outcome = {
    reason: cancelled ? ('cancelled' as const) : ('finished' as const),
    reached_s: reached,
    stage: null,
    message: null,
  };
  return { outcome, answers: [], stages: [], refinement: null, frames } as unknown as RunResult;
}

/** A made-up refining, in as many steps; refined, a result has an empty list in place of null. */
export function fakeRefining(clock: { pass(ms: number): void }, run: FakeRun, base: RunResult): Refining {
  const solving = fakeSolving(clock, run);
  let cancelled = false;
  return {
    advance: (shouldPause) => solving.advance(shouldPause),
    progress: () => solving.progress().fraction,
    result: () => (cancelled || solving.taken < run.steps ? base : { ...base, refinement: [] }),
    cancel() {
      cancelled = true;
      solving.cancel();
    },
  };
}
