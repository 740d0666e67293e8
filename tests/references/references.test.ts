/**
 * The solver's word on its own error, on random plans from all the trades with answers by an independent solver.
 *
 * An answer counts where the reference knows it: its levels agree on the verdict and its own doubt is stated. What the
 * reference doubts is allowed on top of an interval, and an answer counts for a ratio only where its error is well beyond it.
 */
import { beforeAll, describe, expect, it } from 'vitest';
import { startRefining, startSolve } from '../../solver/planning';
import type { Answer, Requirement } from '../../solver/model';
import { physicsOf, randomPlan } from './plans';
import { digestOf, PLANS, readStored, type StoredPlan } from './store';
import type { Extrapolated } from './reference';

/** An answer beside its reference. */
interface Compared {
  readonly seed: number;
  readonly answer: Answer;
  readonly requirement: Requirement;
  readonly accuracy: number;
  readonly reference: Extrapolated;
}

const stored = readStored();
const compared: Compared[] = [];
const failed: string[] = [];

function compare({ seed, answers }: StoredPlan): void {
  const plan = randomPlan(seed);
  const solving = startSolve(plan);
  solving.advance(() => false);
  const base = solving.result();
  if (base.outcome.reason !== 'finished') {
    failed.push(`${seed}: ${base.outcome.message} (${physicsOf(plan).join(', ')})`);
    return;
  }
  const refining = startRefining(plan, base);
  refining.advance(() => false);
  refining.result().answers.forEach((answer, i) => {
    const requirement = plan.requirements[i];
    compared.push({ seed, answer, requirement, accuracy: plan.settings.accuracy, reference: answers[i] });
  });
}

interface Figure {
  readonly error: number;
  readonly doubt: number;
  readonly uncertainty: number | null;
}

/** Margins that both have, with the error of ours. */
const margins = (): (Figure & Compared)[] =>
  compared.flatMap((one) => {
    const { answer, reference } = one;
    if (answer.margin === null || reference.margin === null || reference.marginDoubt === null) return [];
    return [
      {
        ...one,
        error: Math.abs(answer.margin - reference.margin),
        doubt: reference.marginDoubt,
        uncertainty: answer.uncertainty,
      },
    ];
  });

/** Times of crossings that both have. */
const times = (): Figure[] =>
  compared.flatMap(({ answer, reference }) => {
    if (answer.time_uncertainty_s === null || answer.time_s === null || reference.time === null || reference.timeDoubt === null)
      return [];
    return [
      { error: Math.abs(answer.time_s - reference.time), doubt: reference.timeDoubt, uncertainty: answer.time_uncertainty_s },
    ];
  });

/** Far below anything that the numbers could be read to. */
const ROUNDING = 1e-9;

const covered = ({ error, doubt, uncertainty }: Figure): boolean => error <= (uncertainty ?? Infinity) + doubt + ROUNDING;
const shareOf = <T>(list: readonly T[], good: (one: T) => boolean): number => list.filter(good).length / list.length;

function medianRatio(figures: readonly Figure[]): number {
  const ratios = figures
    .filter(({ error, doubt, uncertainty }) => uncertainty !== null && error > 3 * doubt + ROUNDING)
    .map(({ error, uncertainty }) => (uncertainty ?? NaN) / error)
    .sort((a, b) => a - b);
  return ratios[ratios.length >> 1];
}

/** The error of an answer as a temperature, K: a time by how fast it changed there; null where that is not known. */
function kelvinsOf({ answer, error, reference }: Figure & Compared): number | null {
  if (answer.margin_unit === 'K') return error;
  return reference.slope === null ? null : error * reference.slope;
}

describe(`answers of ${PLANS} random plans beside an independent solver`, () => {
  beforeAll(() => stored.plans.forEach(compare), 600_000);

  it('are of the plans that the references were made for', () => {
    expect(stored.plans).toHaveLength(PLANS);
    const changed = stored.plans.filter(({ seed, digest }) => digestOf(seed) !== digest).map(({ seed }) => seed);
    expect(changed, 'plans that ask for npm run references').toEqual([]);
  });

  it('come from all the physics there is', () => {
    const count = new Map<string, number>();
    for (const { seed } of stored.plans)
      for (const kind of physicsOf(randomPlan(seed))) count.set(kind, (count.get(kind) ?? 0) + 1);
    expect(count.size).toBeGreaterThanOrEqual(18);
    for (const [kind, plans] of count) expect(plans, kind).toBeGreaterThanOrEqual(4);
  });

  it('rest on references that know their numbers to a part of the accuracy asked for', () => {
    const doubtful = margins().filter((one) => (kelvinsOf({ ...one, error: one.doubt }) ?? 0) > 0.1 * one.accuracy);
    expect(doubtful.length / margins().length).toBeLessThan(0.02);
    expect(stored.left.length).toBeLessThan(0.1 * PLANS);
  });

  it('are all come to: no plan ends in a failure', () => {
    expect(failed).toEqual([]);
  });

  it('lie within the uncertainty stated in at least 95 %', () => {
    const figures = margins();
    const missed = figures
      .filter((one) => !covered(one))
      .map(({ seed, requirement, error, uncertainty }) => `${seed} ${requirement.id}: ${error} beyond ${uncertainty}`);
    console.log(
      `margins: ${figures.length}, within ${(100 * shareOf(figures, covered)).toFixed(1)} %, median ratio ${medianRatio(figures).toFixed(2)}\n${missed.join('\n')}`,
    );
    expect(figures.length).toBeGreaterThan(2 * PLANS);
    expect(shareOf(figures, covered)).toBeGreaterThanOrEqual(0.95);
    expect(shareOf(figures, ({ uncertainty }) => uncertainty !== null)).toBeGreaterThan(0.95);
  });

  it('have an uncertainty that is not ten times the error in the median', () => {
    expect(medianRatio(margins())).toBeLessThanOrEqual(10);
    expect(medianRatio(times())).toBeLessThanOrEqual(10);
  });

  it('have times of crossings that lie within their uncertainty in at least 95 %', () => {
    expect(times().length).toBeGreaterThan(PLANS / 3);
    console.log(
      `times: ${times().length}, within ${(100 * shareOf(times(), covered)).toFixed(1)} %, median ratio ${medianRatio(times()).toFixed(2)}`,
    );
    expect(shareOf(times(), covered)).toBeGreaterThanOrEqual(0.95);
  });

  it('meet the accuracy asked for in at least 95 % of the plans', () => {
    const worst = new Map<number, number>();
    for (const one of margins()) {
      const kelvins = kelvinsOf({ ...one, error: Math.max(0, one.error - one.doubt) });
      if (kelvins !== null) worst.set(one.seed, Math.max(worst.get(one.seed) ?? 0, kelvins / one.accuracy));
    }
    const beyond = [...worst].filter(([, part]) => part > 1);
    console.log(
      `accuracy met in ${worst.size - beyond.length} of ${worst.size} plans${beyond.map(([seed, part]) => `\n${seed}: ${part.toFixed(2)} times`).join('')}`,
    );
    expect(worst.size).toBeGreaterThan(0.9 * PLANS);
    expect(beyond.length / worst.size).toBeLessThanOrEqual(0.05);
  });

  it('come to the same verdict wherever the limit lies outside the uncertainty', () => {
    const clear = margins().filter(
      ({ reference, uncertainty, doubt }) => Math.abs(reference.margin ?? 0) > (uncertainty ?? Infinity) + doubt + ROUNDING,
    );
    const other = clear
      .filter(({ answer, reference }) => answer.met !== (reference.verdict === 'met'))
      .map(({ seed, requirement }) => `${seed} ${requirement.id}`);
    expect(clear.length).toBeGreaterThan(PLANS);
    expect(other.length / clear.length, other.join(', ')).toBeLessThanOrEqual(0.05);
  });
});
