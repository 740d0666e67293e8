/** A plan on screen with the answers of the real solver. */
import { useProjectStore, useRunStore } from '../../../app/stores';
import type { Project, RunResult } from '../../../solver/model';
import { solve } from '../../../solver/planning';
import { fakeSolver, type FakeSolver } from './fakeSolver';

/** Answers the newest plan that was asked for as the solver would. */
export function answer(solver: FakeSolver): RunResult {
  const { job, revision, plan } = solver.asked[solver.asked.length - 1];
  const whole = solve(plan);
  const { frames, ...result } = whole;
  solver.tell({ type: 'answers', job, revision, case: 0, final: true, result });
  solver.tell({ type: 'frames', job, revision, case: 0, frames });
  solver.tell({ type: 'done', job, revision, outcomes: [whole.outcome] });
  return whole;
}

/** Opens a plan and connects a solver that answers when told; needs fake timers for the pause before a run. */
export function openPlan(plan: Project): FakeSolver {
  const solver = fakeSolver();
  useProjectStore().open(plan, null);
  useRunStore().connect(solver);
  return solver;
}
