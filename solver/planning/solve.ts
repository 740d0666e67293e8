/**
 * The deep door: a checked plan in, everything known about it out.
 *
 * A solve is taken in slices, so that whoever runs it can listen to messages in between; `solve` takes it in one.
 */
import { crossCheck, wordProblem, type Outcome, type Project, type RunResult } from '../model';
import { createMeasures, type Measures } from '../measures';
import { createRun, type Run } from '../stepping';
import { planWarnings, runWarnings } from './warnings';

export interface SolveOptions {
  /** A clock that never runs backwards, ms, for `solver.wall_s`; without one that is 0. */
  now?: () => number;
}

export interface Progress {
  /** Cycle time reached, and where the cycle ends, s. */
  time_s: number;
  end_s: number;
  /** Id of the stage in hand. */
  stage: string;
  /** 0 to 1, never backwards. */
  fraction: number;
}

export interface Solving {
  /** Takes steps until the run has ended or `shouldPause` says so, at least one; true when it has ended. */
  advance(shouldPause: () => boolean): boolean;
  progress(): Progress;
  /** All that is known by now. Final once `advance` gave true; before, as if the run were cancelled here. */
  result(): RunResult;
  /** Ends the run where it is; what it knows is kept. Nothing happens if it has ended. */
  cancel(): void;
}

/** Begins the solve of a checked project. Throws RangeError for one that `crossCheck` refuses. */
export function startSolve(project: Project, options: SolveOptions = {}): Solving {
  const now = options.now ?? (() => 0);
  let spent = 0;
  const timed = <T>(work: () => T): T => {
    const began = now();
    const done = work();
    spent += now() - began;
    return done;
  };
  const { run, measures } = timed(() => begin(project));
  let outcome: Outcome | null = null;

  return {
    advance(shouldPause) {
      timed(() => {
        while (outcome === null) {
          outcome = run.advance();
          if (shouldPause()) break;
        }
      });
      return outcome !== null;
    },
    progress: () => ({
      time_s: run.time,
      end_s: run.cycle.end,
      stage: stageIn(run),
      fraction: outcome?.reason === 'finished' ? 1 : run.time / run.cycle.end,
    }),
    result: () => resultOf(project, run, measures, outcome ?? cancelledAt(run), spent / 1000),
    cancel() {
      outcome ??= cancelledAt(run);
    },
  };
}

/** Solves a checked project in one go. Throws RangeError for one that `crossCheck` refuses. */
export function solve(project: Project, options: SolveOptions = {}): RunResult {
  const solving = startSolve(project, options);
  solving.advance(() => false);
  return solving.result();
}

function begin(project: Project): { run: Run; measures: Measures } {
  const problems = crossCheck(project);
  if (problems.length > 0) throw new RangeError(problems.map(wordProblem).join('\n'));
  const run = createRun(project, (step) => measures.observe(step));
  const measures = createMeasures(project, run);
  return { run, measures };
}

function resultOf(project: Project, run: Run, measures: Measures, outcome: Outcome, wall_s: number): RunResult {
  const measured = measures.measured();
  const { scheme, method, steps, rejected, volumes, factorisations } = run.figures();
  return {
    outcome,
    ...measured,
    energy: run.energy(),
    stability: run.stability,
    solver: { scheme, method, steps, rejected, volumes, factorisations, kernels: 'typescript', wall_s },
    refinement: null,
    warnings: [...run.warnings(), ...planWarnings(project, run.cycle), ...runWarnings(outcome, measured.answers)],
  };
}

const cancelledAt = (run: Run): Outcome => ({
  reason: 'cancelled',
  reached_s: run.time,
  stage: stageIn(run),
  message: 'Cancelled. Answers up to there are kept.',
});

/** Id of the stage that the run is in; an edge belongs to the stage that ends there. */
const stageIn = ({ cycle, time }: Run): string =>
  (cycle.stages.find((stage) => time <= stage.end) ?? cycle.stages[cycle.stages.length - 1]).id;
