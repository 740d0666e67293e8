import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { setStep, setThickness, setTitle } from '../../../app/commands';
import { useProjectStore, useRunStore } from '../../../app/stores';
import type { Frames } from '../../../solver/model';
import type { Answered } from '../../../solver/service/protocol';
import { fakeSolver, type FakeSolver } from '../support/fakeSolver';
import { lining } from '../support/lining';

let solver: FakeSolver;
const thickness = (value: number) => setThickness(lining().part.layers[0], { value, text: '' });

beforeEach(() => {
  vi.useFakeTimers();
  setActivePinia(createPinia());
  useProjectStore().open(lining(), null);
  solver = fakeSolver();
  useRunStore().connect(solver);
  vi.advanceTimersByTime(0);
});
afterEach(() => vi.useRealTimers());

/** The first run is done. */
function solved(): void {
  solver.finish({ answers: [], stability: null });
}

describe('a run', () => {
  it('is asked for at once where there are no answers yet', () => {
    expect(solver.asked).toHaveLength(1);
    expect(useRunStore().state).toBe('solving');
    solved();
    expect([useRunStore().state, useRunStore().outdated]).toEqual(['live', false]);
  });

  it('shows its values while their uncertainty is still on the way, and takes that over when it comes', () => {
    const about = { job: 1, revision: solver.asked[0].revision, case: 0 };
    const result = { answers: [], stability: null, warnings: [] } as unknown as Answered;
    const frames = { time_s: new Float64Array([0]) } as Frames;
    solver.tell({ type: 'answers', ...about, final: false, refining: true, result });
    solver.tell({ type: 'frames', ...about, frames });
    expect([useRunStore().state, useRunStore().waiting]).toEqual(['live', false]);
    solver.tell({ type: 'progress', ...about, time_s: 1, end_s: 2, stage: 'heat', state: 'refining', fraction: 0.5 });
    expect(useRunStore().progress).toBeNull();
    const doubted = { answers: [], stability: null, warnings: [{ code: 'doubt' }] } as unknown as Answered;
    solver.tell({ type: 'answers', ...about, final: true, result: doubted });
    const outcome = { reason: 'finished', reached_s: 100, stage: null, message: null } as const;
    solver.tell({ type: 'done', job: 1, revision: about.revision, outcomes: [outcome] });
    expect(useRunStore().result).toEqual(doubted);
    expect(useRunStore().frames).toEqual(frames);
  });

  it('waits for a pause in typing, and is asked for once', () => {
    solved();
    for (const value of [0.16, 0.17, 0.18]) {
      useProjectStore().tryDraft(thickness(value));
      vi.advanceTimersByTime(30);
    }
    expect(useRunStore().state).toBe('stale');
    vi.advanceTimersByTime(40);
    expect(solver.asked).toHaveLength(2);
    expect(solver.asked[1].plan.part.layers[0].thickness).toBe(0.18);
  });

  it('is asked for now and then under a drag that never pauses', () => {
    solved();
    for (let step = 0; step < 50; step++) {
      useProjectStore().tryDraft(thickness(0.16 + step * 1e-4));
      vi.advanceTimersByTime(10);
    }
    expect(solver.asked.length).toBeGreaterThan(3);
    expect(solver.asked.length).toBeLessThan(8);
  });

  it('keeps the last answers, marked stale, until the next are complete', () => {
    solved();
    const before = useRunStore().result;
    useProjectStore().commit(thickness(0.2));
    expect(useRunStore().result).toBe(before);
    vi.advanceTimersByTime(60);
    const { job, revision } = solver.asked[1];
    solver.tell({ type: 'answers', job, revision, case: 0, final: true, result: { answers: [1] } as never });
    expect(useRunStore().result).toBe(before);
    expect([useRunStore().outdated, useRunStore().state]).toEqual([true, 'solving']);
    solver.tell({ type: 'done', job, revision, outcomes: [{ reason: 'finished', reached_s: 1, stage: null, message: null }] });
    expect(useRunStore().result).not.toBe(before);
    expect(useRunStore().state).toBe('live');
  });

  it('that is overtaken by an edit is not taken for the answers of the new plan', () => {
    solved();
    useProjectStore().commit(thickness(0.2));
    vi.advanceTimersByTime(60);
    useProjectStore().commit(thickness(0.3));
    solver.finish({ answers: [], stability: null });
    expect([useRunStore().state, useRunStore().outdated]).toEqual(['stale', true]);
  });

  it('whose job was superseded is not heard any more', () => {
    solved();
    useProjectStore().commit(thickness(0.2));
    vi.advanceTimersByTime(60);
    useProjectStore().commit(thickness(0.3));
    vi.advanceTimersByTime(60);
    const before = useRunStore().result;
    const late = solver.asked[1];
    solver.tell({ type: 'answers', ...late, case: 0, final: true, result: { answers: [] } as never });
    solver.tell({ type: 'done', ...late, outcomes: [{ reason: 'finished', reached_s: 1, stage: null, message: null }] });
    expect(useRunStore().result).toBe(before);
    expect(useRunStore().state).toBe('solving');
  });

  it('is not needed when undo brings back the plan that the answers are of', () => {
    solved();
    useProjectStore().commit(setTitle('Other'));
    useProjectStore().undo();
    expect(useRunStore().state).toBe('live');
    vi.advanceTimersByTime(1000);
    expect(solver.asked).toHaveLength(1);
  });
});

describe('what keeps a run from being done', () => {
  it('a plan with a problem is not asked for, and its old answers are stale', () => {
    solved();
    useProjectStore().commit(thickness(-1));
    vi.advanceTimersByTime(1000);
    expect(solver.asked).toHaveLength(1);
    expect([useRunStore().state, useRunStore().laid]).toEqual(['stale', null]);
  });

  it('a refused step fails, says why, and leaves the answers before it', () => {
    solved();
    const before = useRunStore().result;
    useProjectStore().commit(setStep({ value: 60, text: '60 s' }));
    vi.advanceTimersByTime(60);
    const remedy = { step_s: 0.4, nodes: null };
    solver.finish(
      { answers: [], stability: { explicit_limit_s: 0.42, no_overshoot_s: 0.2, set_by: { layer: 'Shell', position_m: 0.2 } } },
      { reason: 'step-above-limit', reached_s: 0, message: 'Explicit, 60 s: not run.', remedy },
    );
    const run = useRunStore();
    expect([run.state, run.message, run.outcome?.remedy]).toEqual(['failed', 'Explicit, 60 s: not run.', remedy]);
    expect(run.result).toBe(before);
    expect(run.stability?.explicit_limit_s).toBe(0.42);
  });

  it('a cancelled run keeps what it reached, marked', () => {
    useRunStore().cancel();
    expect(useRunStore().state).toBe('cancelled');
    expect(useRunStore().outcome?.reached_s).toBe(40);
    useRunStore().again();
    expect(useRunStore().state).toBe('solving');
  });

  it('a solver that failed says so; the plan is unchanged', () => {
    const { job, revision } = solver.asked[0];
    solver.tell({ type: 'failed', job, revision, code: 'solver-gone', message: 'The solver ended.' });
    expect([useRunStore().state, useRunStore().message]).toEqual(['failed', 'The solver ended.']);
  });
});

it('answers of one document are never shown for another', () => {
  solved();
  useProjectStore().newPlan();
  expect([useRunStore().result, useRunStore().state]).toEqual([null, 'idle']);
});

it('waiting is only said when it lasts', () => {
  solved();
  useProjectStore().commit(thickness(0.2));
  vi.advanceTimersByTime(150);
  expect(useRunStore().waiting).toBe(false);
  vi.advanceTimersByTime(100);
  expect(useRunStore().waiting).toBe(true);
  solved();
  expect(useRunStore().waiting).toBe(false);
});

it('progress tells the part that is done and the time that is left', () => {
  const { job, revision } = solver.asked[0];
  vi.advanceTimersByTime(1000);
  solver.tell({ type: 'progress', job, revision, case: 0, time_s: 10, end_s: 40, stage: 'heat', fraction: 0.25 });
  expect(useRunStore().progress).toMatchObject({ fraction: 0.25, stage: 'heat' });
  expect(useRunStore().progress?.left_s).toBeCloseTo(3, 1);
});
