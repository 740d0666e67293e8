import { describe, expect, it } from 'vitest';
import type { Answer, Project, Requirement, RunResult, Settings } from '../../../solver/model';
import { solve, startRefining } from '../../../solver/planning';
import { estimated, type LadderAnswers } from '../../../solver/planning/uncertainty/answers';
import { plan, requirement } from '../../support/plan';

const heated: Parameters<typeof plan>[0] = {
  layers: [0.05],
  stages: [3600],
  exposures: { start: { kind: 'film', coefficient: 100, surroundings: 500 }, end: { kind: 'insulated' } },
  probes: [{ id: 'p', name: 'Far face', at: { face: 'end' } }],
  requirements: [
    requirement({ kind: 'reaches', sense: 'atLeast', limit: 300 }, { kind: 'within', time: 3000 }),
    { ...requirement({ kind: 'staysBelow', limit: 480 }), id: 'r2' },
  ],
};

function refined(project: Project): RunResult {
  const refining = startRefining(project, solve(project));
  while (!refining.advance(() => true));
  return refining.result();
}

describe('the uncertainty of answers', () => {
  const textbook: Partial<Settings>[] = [
    { scheme: 'explicit', step: 0.5, grid: { nodes: 9 } },
    { scheme: 'implicit', step: 30, grid: { nodes: 9 } },
    { scheme: 'crankNicolson', step: 30, grid: { nodes: 9 } },
    { scheme: 'crankNicolson', step: 30, grid: { cells: 8 } },
    { scheme: 'automatic', accuracy: 1, grid: { nodes: 9 } },
    { scheme: 'automatic', accuracy: 1 },
  ];

  it.each(textbook)('covers the true error and is not ten times it: %j', (settings) => {
    const exact = solve(plan({ ...heated, settings: { scheme: 'automatic', accuracy: 1e-4 } }));
    const { answers, refinement } = refined(plan({ ...heated, settings }));
    answers.forEach((answer, i) => {
      const error = Math.abs((answer.margin ?? NaN) - (exact.answers[i].margin ?? NaN));
      expect(answer.uncertainty).toBeGreaterThanOrEqual(error);
      expect(answer.uncertainty).toBeLessThan(10 * error + 1e-3);
    });
    expect(answers[0].time_uncertainty_s).toBeCloseTo(answers[0].uncertainty ?? NaN, 9);
    expect(answers[1].time_uncertainty_s).toBeNull();
    expect(refinement?.map(({ of }) => of)).toEqual(
      settings.scheme === 'automatic' ? (settings.grid ? ['accuracy', 'grid'] : ['accuracy']) : ['step', 'grid'],
    );
  });

  it('is found in slices as in one go, and its progress never runs back', () => {
    const project = plan(heated);
    const base = solve(project);
    const whole = startRefining(project, base);
    whole.advance(() => false);
    const sliced = startRefining(project, base);
    let last = 0;
    do {
      expect(sliced.progress()).toBeGreaterThanOrEqual(last);
      last = sliced.progress();
    } while (!sliced.advance(() => true));
    expect(sliced.progress()).toBe(1);
    expect(sliced.result()).toEqual(whole.result());
  });

  it('leaves values, times and frames as they were', () => {
    const project = plan(heated);
    const base = solve(project);
    const refining = startRefining(project, base);
    refining.advance(() => false);
    const { answers, refinement, ...rest } = refining.result();
    expect(rest).toEqual({ ...base, answers: undefined, refinement: undefined });
    expect(refinement).not.toBeNull();
    answers.forEach(({ value, margin, time_s }, i) =>
      expect([value, margin, time_s]).toEqual([base.answers[i].value, base.answers[i].margin, base.answers[i].time_s]),
    );
  });

  it('stays unknown when it is cancelled', () => {
    const project = plan(heated);
    const base = solve(project);
    const refining = startRefining(project, base);
    refining.advance(() => true);
    refining.cancel();
    expect(refining.advance(() => true)).toBe(true);
    expect(refining.result()).toBe(base);
  });

  it('is not sought for a run that did not finish, nor where nothing is asked', () => {
    const refused = plan({ ...heated, settings: { scheme: 'explicit', step: 1e4, grid: { nodes: 9 } } });
    const nothing = plan({ ...heated, requirements: [] });
    for (const project of [refused, nothing]) {
      const base = solve(project);
      const refining = startRefining(project, base);
      expect(refining.advance(() => false)).toBe(true);
      expect(refining.result()).toBe(base);
    }
  });
});

describe('answers of all runs drawn together', () => {
  const answer = (over: Partial<Answer>): Answer => ({
    requirement: 'r',
    name: 'It',
    verdict: 'met',
    met: true,
    time_s: 50,
    stage: 's1',
    stage_time_s: 50,
    value: 310,
    limit: 300,
    margin: 10,
    unit: '°C',
    margin_unit: 'K',
    uncertainty: null,
    value_uncertainty: null,
    time_uncertainty_s: null,
    position_m: null,
    spans: [{ from_s: 0, to_s: 100, kind: 'counting' }],
    ...over,
  });
  const drawn = (
    base: Answer,
    finer: Partial<Answer>,
    rule: Requirement = requirement({ kind: 'reaches', sense: 'atLeast', limit: 300 }),
  ) => {
    const project = plan({ requirements: [rule], settings: { accuracy: 0.1 } });
    const ladder: LadderAnswers = {
      of: 'accuracy',
      order: 1,
      rungs: [
        { size: 1, answers: [base] },
        { size: 1 / 2, answers: [{ ...base, ...finer }] },
      ],
    };
    const { answers, warnings } = estimated(project, { ...solve(project), answers: [base] }, [ladder]);
    return { answer: answers[0], warnings };
  };

  it('are thin where the limit lies inside the interval', () => {
    expect(drawn(answer({ margin: 5 }), { margin: 4 }).answer).toMatchObject({ verdict: 'thin', met: true, uncertainty: 6 });
    expect(drawn(answer({ margin: 7 }), { margin: 6 }).answer).toMatchObject({ verdict: 'met', met: true, uncertainty: 6 });
  });

  it('stay not met where the interval reaches the limit', () => {
    const missed = answer({ verdict: 'not-met', met: false, margin: -0.1 });
    expect(drawn(missed, { margin: 2 }).answer).toMatchObject({ verdict: 'not-met', met: false });
  });

  it('that scatter less than grids chosen anew do are not taken for better than that', () => {
    expect(drawn(answer({}), { margin: 10 + 1e-9 }).answer.uncertainty).toBeCloseTo(0.1 * 5e-4, 12);
  });

  it('that no run changes are exact up to rounding', () => {
    expect(drawn(answer({}), {}).answer.uncertainty).toBeLessThan(1e-10);
  });

  it('are said to be unsettled where a finer run reaches what this one does not', () => {
    const never = answer({ verdict: 'never-reached', met: false, time_s: null, margin: null });
    const { answer: told, warnings } = drawn(never, { verdict: 'met', met: true, time_s: 20, margin: 3 });
    expect(told).toMatchObject({ verdict: 'never-reached', uncertainty: null });
    expect(warnings).toMatchObject([{ code: 'answer-unsettled', place: 'requirements[0]' }]);
    expect(warnings[0].message).toContain('this run never reaches it, a finer one meets it');
  });

  it('are thin where they are met by a hair that a finer run does not reach', () => {
    const { answer: told, warnings } = drawn(answer({}), { verdict: 'never-reached', met: false, time_s: null });
    expect(told).toMatchObject({ verdict: 'thin', met: true, uncertainty: null });
    expect(warnings).toHaveLength(1);
  });
});
