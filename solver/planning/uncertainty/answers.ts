/** Answers of all runs on the ladders, drawn together into answers with their uncertainty. */
import { placeOf, type Answer, type Project, type Refinement, type Requirement, type RunResult, type Warning } from '../../model';
import { estimate, type Sample } from './estimate';
import { slopeOf } from './slopes';

export interface LadderAnswers {
  readonly of: 'accuracy' | 'grid' | 'step';
  readonly order: number;
  /** From coarse to fine; size 1 among them. */
  readonly rungs: readonly { readonly size: number; readonly answers: readonly Answer[] }[];
}

/** Numbers that differ by less than this part are the same. */
const ROUNDING = 1e-12;
/**
 * Below this part of the accuracy the automatic scheme's numbers scatter: grids and steps chosen anew fall a little differently
 * each time. Runs that happen to agree better than this agree by chance.
 */
const SCATTER = 5e-4;

/** The answers with their uncertainty, thin where the limit lies inside the interval; and what has to be said in words. */
export function estimated(
  project: Project,
  base: RunResult,
  ladders: readonly LadderAnswers[],
): { answers: Answer[]; warnings: Warning[]; refinement: Refinement } {
  const orders: number[][] = ladders.map(() => []);
  const warnings: Warning[] = [];
  const answers = base.answers.map((answer, index): Answer => {
    const finer = ladders.flatMap(({ rungs }) => rungs.filter(({ size }) => size < 1).map((rung) => rung.answers[index]));
    const other = finer.find((one) => differs(answer, one));
    if (other !== undefined) {
      warnings.push(unsettled(answer, other, index));
      return { ...answer, verdict: answer.verdict === 'met' ? 'thin' : answer.verdict };
    }
    const requirement = project.requirements[index];
    const kelvins = SCATTER * project.settings.accuracy;
    const seconds = Math.min(kelvins / slopeOf(answer, requirement, base), base.outcome.reached_s);
    const of = (figure: keyof Answer & ('margin' | 'value' | 'time_s'), unit: string): number | null =>
      uncertaintyOf(
        ladders.map(({ of, order, rungs }) => ({
          order,
          scatter: of === 'accuracy' ? (unit === 's' ? seconds : kelvins) : 0,
          rungs: rungs.map((rung) => ({ size: rung.size, value: rung.answers[index][figure] })),
        })),
        (ladder, order) => orders[ladder].push(order),
      );
    const uncertainty = of('margin', answer.margin_unit);
    const thin = answer.verdict === 'met' && answer.margin !== null && uncertainty !== null && answer.margin < uncertainty;
    return {
      ...answer,
      verdict: thin ? 'thin' : answer.verdict,
      uncertainty,
      value_uncertainty: of('value', answer.unit),
      time_uncertainty_s: hasCrossing(requirement) ? of('time_s', 's') : null,
    };
  });
  const refinement: Refinement = ladders.map(({ of, rungs }, i) => ({ of, runs: rungs.length, order: median(orders[i]) }));
  return { answers, warnings, refinement };
}

/** Whether `time_s` is the time of a crossing: not that of an extreme, nor of a stage's end. */
const hasCrossing = ({ must, counts }: Requirement): boolean =>
  counts.kind !== 'stageEnd' && (must.kind === 'reaches' || must.kind === 'heldFor');

/** Answers that differ by more than a number: one has a margin, or a time, and the other has none. */
const differs = (a: Answer, b: Answer): boolean =>
  (a.margin === null) !== (b.margin === null) || (a.time_s === null) !== (b.time_s === null);

interface LadderNumbers {
  readonly order: number;
  /** Least uncertainty of a number that refinement changes at all. */
  readonly scatter: number;
  readonly rungs: readonly { readonly size: number; readonly value: number | null }[];
}

/** The sum over ladders; null where there is no number, or no finer one. */
function uncertaintyOf(ladders: readonly LadderNumbers[], noteOrder: (ladder: number, order: number) => void): number | null {
  let sum = 0;
  for (const [index, { order, scatter, rungs }] of ladders.entries()) {
    const samples = rungs.filter((rung): rung is Sample => rung.value !== null);
    const found = estimate(samples, order);
    if (found === null) return null;
    const rounding = ROUNDING * Math.max(...samples.map(({ value }) => Math.abs(value)));
    if (found.uncertainty <= rounding) sum += rounding;
    else {
      if (found.order !== null) noteOrder(index, found.order);
      sum += Math.max(found.uncertainty, scatter);
    }
  }
  return sum;
}

function unsettled(answer: Answer, finer: Answer, index: number): Warning {
  const words = {
    met: 'meets it',
    thin: 'meets it',
    'not-met': 'does not',
    'never-reached': 'never reaches it',
    'cannot-be-judged': 'cannot tell',
  };
  const [here, there] = [words[answer.verdict], words[finer.verdict]];
  const message =
    here === there
      ? `"${answer.name}" hangs on grid and step: a finer run comes to another number. Ask for a finer accuracy.`
      : `"${answer.name}" hangs on grid and step: this run ${here}, a finer one ${there}. Ask for a finer accuracy.`;
  return { code: 'answer-unsettled', message, place: placeOf(['requirements', index]) };
}

function median(numbers: readonly number[]): number | null {
  if (numbers.length === 0) return null;
  const sorted = [...numbers].sort((a, b) => a - b);
  return sorted[sorted.length >> 1];
}
