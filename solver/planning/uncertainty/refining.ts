/** Runs a plan again on finer and coarser grids and steps, and puts the numerical uncertainty into its answers. */
import type { Outcome, Project, RunResult, Warning } from '../../model';
import { startSolve, type Solving } from '../solve';
import { estimated, type LadderAnswers } from './answers';
import { laddersOf, type Ladder } from './ladders';

export interface Refining {
  /** Takes steps until all runs have ended or `shouldPause` says so, at least one; true when they have. */
  advance(shouldPause: () => boolean): boolean;
  /** 0 to 1, never backwards. */
  progress(): number;
  /** The result refined, its answers with their uncertainty. Before `advance` gave true, or after `cancel`: as it was. */
  result(): RunResult;
  /** Ends it here; the answers keep no uncertainty. Nothing happens if it has ended. */
  cancel(): void;
}

/** One of the runs, for the rungs that ask for the same. */
interface Extra {
  readonly project: Project;
  /** Work, relative to that of the run refined; roughly, for the progress only. */
  readonly work: number;
  solving: Solving | null;
  result: RunResult | null;
}

/** Begins the refinement of a result; of one that did not finish, or answers nothing, there is nothing to refine. */
export function startRefining(project: Project, base: RunResult): Refining {
  const ladders = base.outcome.reason === 'finished' && base.answers.length > 0 ? laddersOf(project, base) : [];
  const extras = extrasOf(ladders, project);
  const whole = extras.reduce((sum, { work }) => sum + work, 0);
  let refined: RunResult | null = ladders.length === 0 ? base : null;
  let next = 0;
  let done = 0;

  return {
    advance(shouldPause) {
      while (refined === null) {
        const extra = extras[next];
        extra.solving ??= startSolve(extra.project);
        const ended = extra.solving.advance(shouldPause);
        if (ended) {
          extra.result = extra.solving.result();
          extra.solving = null;
          done += extra.work;
          next++;
          if (next === extras.length) refined = refinedFrom(project, base, ladders, extras);
        }
        if (!ended || shouldPause()) break;
      }
      return refined !== null;
    },
    progress() {
      if (refined !== null) return 1;
      const { work, solving } = extras[next];
      return (done + work * (solving?.progress().fraction ?? 0)) / whole;
    },
    result: () => refined ?? base,
    cancel() {
      refined ??= base;
    },
  };
}

/** Every run once. Only what requirements look at is measured in them. */
function extrasOf(ladders: readonly Ladder[], base: Project): Extra[] {
  const extras: Extra[] = [];
  for (const { of, rungs } of ladders) {
    for (const { size, project } of rungs) {
      if (project === base || extras.some((extra) => sameSettings(extra.project, project))) continue;
      extras.push({ project: asked(project), work: of === 'accuracy' ? size ** -0.4 : 1 / size, solving: null, result: null });
    }
  }
  return extras;
}

const sameSettings = (a: Project, b: Project): boolean => JSON.stringify(a.settings) === JSON.stringify(b.settings);

function asked(project: Project): Project {
  const probes = project.probes.filter(({ id }) => project.requirements.some(({ of }) => 'probe' in of && of.probe === id));
  return { ...project, probes };
}

function refinedFrom(project: Project, base: RunResult, ladders: readonly Ladder[], extras: readonly Extra[]): RunResult {
  const resultOf = (rung: Project): RunResult | null =>
    sameSettings(rung, project) ? base : (extras.find((extra) => sameSettings(extra.project, rung))?.result ?? null);
  const climbed: LadderAnswers[] = ladders.map(({ of, order, rungs }) => ({
    of,
    order,
    rungs: rungs.flatMap(({ size, project: rung }) => {
      const result = resultOf(rung);
      return result?.outcome.reason === 'finished' ? [{ size, answers: result.answers }] : [];
    }),
  }));
  const lacking = climbed.find(({ rungs }) => rungs.every(({ size }) => size >= 1));
  if (lacking !== undefined) {
    const failed = extras.flatMap(({ result }) =>
      result !== null && result.outcome.reason !== 'finished' ? [result.outcome] : [],
    );
    return { ...base, warnings: [...base.warnings, unknown(failed.at(-1) ?? null)] };
  }
  const { answers, warnings, refinement } = estimated(project, base, climbed);
  return { ...base, answers, refinement, warnings: [...base.warnings, ...warnings] };
}

const unknown = (outcome: Outcome | null): Warning => ({
  code: 'uncertainty-unknown',
  message: `How far the answers hang on grid and step is not known: no finer run came to its end.${outcome?.message ? ` ${outcome.message}` : ''}`,
  place: null,
});
