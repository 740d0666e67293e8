import { describe, expect, it } from 'vitest';
import { buildReport, reportSchema, type Exposure, type Project, type Requirement } from '../../../solver/model';
import { solve, startSolve } from '../../../solver/planning';
import { wallTheta } from '../../support/wallSeries';
import { plan, requirement, type PlanParts } from '../../support/plan';

const insulated: Exposure = { kind: 'insulated' };
const film = (coefficient: number, surroundings: number): Exposure => ({ kind: 'film', coefficient, surroundings });

/** A sheet so thin that it has one temperature: T = 500 − 480 exp(−t/τ), from 20 °C in gas of 500 °C. */
const sheet = (requirements: Requirement[], more: PlanParts = {}): Project =>
  plan({
    layers: [1e-4],
    stages: [600],
    exposures: { start: film(5, 500), end: insulated },
    requirements,
    settings: { accuracy: 0.01 },
    ...more,
  });
/** ρ c L / h, s. */
const TAU = (8000 * 500 * 1e-4) / 5;
const whenAt = (temperature: number): number => TAU * Math.log(480 / (500 - temperature));
const at = (time: number): number => 500 - 480 * Math.exp(-time / TAU);

describe('a sheet of one temperature in hot gas', () => {
  const schemes: Record<string, PlanParts['settings']> = {
    automatic: { accuracy: 0.01 },
    'Crank–Nicolson': { scheme: 'crankNicolson', step: 0.5 },
  };
  for (const [name, settings] of Object.entries(schemes)) {
    it(`crosses its limit at the time of the closed form, within 1e-4 of it: ${name}`, () => {
      const { answers, outcome } = solve(sheet([requirement({ kind: 'reaches', sense: 'atLeast', limit: 300 })], { settings }));
      expect(outcome.reason).toBe('finished');
      expect(answers[0].verdict).toBe('met');
      expect(Math.abs((answers[0].time_s ?? NaN) / whenAt(300) - 1)).toBeLessThan(1e-4);
    });
  }

  it('has been held long enough when the hold is over, and is closed when 95 % of the change is', () => {
    const { answers, first, stages } = solve(
      sheet([requirement({ kind: 'heldFor', sense: 'atLeast', limit: 300, duration: 200 })]),
    );
    expect(Math.abs((answers[0].time_s ?? NaN) / (whenAt(300) + 200) - 1)).toBeLessThan(1e-4);
    expect(Math.abs((answers[0].value ?? NaN) / (600 - whenAt(300)) - 1)).toBeLessThan(1e-4);
    const open = 0.05 * (at(600) - 20);
    expect(Math.abs((first.slowest?.time_s ?? NaN) / whenAt(at(600) - open) - 1)).toBeLessThan(1e-4);
    expect(stages[0].slowest).toEqual(first.slowest);
    expect(first.hottest?.time_s).toBe(600);
    expect(first.hottest?.temperature_C).toBeCloseTo(at(600), 1);
  });

  it('misses a limit by what the closed form says', () => {
    const { answers } = solve(sheet([requirement({ kind: 'reaches', sense: 'atLeast', limit: 499.9 })]));
    expect(answers[0].verdict).toBe('never-reached');
    expect(answers[0].margin).toBeCloseTo(at(600) - 499.9, 1);
  });
});

describe('a wall heated on both faces alike', () => {
  const wall = (nodes: number): Project =>
    plan({
      layers: [0.2],
      stages: [7200],
      exposures: { start: film(200, 500), end: film(200, 500) },
      requirements: [requirement({ kind: 'reaches', sense: 'atLeast', limit: 400 }, { kind: 'cycle' }, { point: 'coldest' })],
      settings: nodes === 0 ? { accuracy: 0.01 } : { scheme: 'crankNicolson', step: 5, grid: { nodes } },
    });
  /** When the middle has θ = (T − 500)/(20 − 500), by the exact series: h L/k = 0.5, L²/α = 1000 s. */
  const seriesTime = (theta: number): number => {
    let [low, high] = [0, 7200];
    for (let i = 0; i < 60; i++) {
      const middle = 0.5 * (low + high);
      if (wallTheta(0.5, middle / 1000, 0) > theta) low = middle;
      else high = middle;
    }
    return low;
  };

  it('is slowest and coldest in its middle, whether a node lies there or not, at the times of the exact series', () => {
    const end = wallTheta(0.5, 7.2, 0);
    for (const { first, answers } of [0, 40, 41].map((nodes) => solve(wall(nodes)))) {
      expect(first.slowest?.position_m).toBeCloseTo(0.1, 4);
      expect(Math.abs((first.slowest?.time_s ?? NaN) / seriesTime(end + 0.05 * (1 - end)) - 1)).toBeLessThan(5e-4);
      expect(answers[0].position_m).toBeCloseTo(0.1, 4);
      expect(Math.abs((answers[0].time_s ?? NaN) / seriesTime(100 / 480) - 1)).toBeLessThan(5e-4);
      expect(first.largestDifference?.between.map((depth) => Math.min(depth, 0.2 - depth).toFixed(3))).toEqual([
        '0.100',
        '0.000',
      ]);
    }
  });
});

describe('a solve', () => {
  const twoStages = (): Project =>
    plan({
      layers: [0.05, 0.02],
      materials: ['a', 'b'],
      stages: [1800, 600],
      exposures: { start: film(100, 400), end: film(20, 100) },
      probes: [
        { id: 'p', name: 'Face', at: { face: 'start' } },
        { id: 'q', name: 'Middle', at: { fraction: 0.5 } },
      ],
      requirements: [requirement({ kind: 'reaches', sense: 'atLeast', limit: 200 }, { kind: 'stage', stage: 's2' })],
    });

  it('gives the same digits in slices as in one go', () => {
    const whole = solve(twoStages());
    const solving = startSolve(twoStages());
    let slices = 0;
    while (!solving.advance(() => true)) slices++;
    expect(slices).toBeGreaterThan(3);
    expect(solving.result()).toEqual(whole);
  });

  it('tells its way, never backwards, and what is known by now', () => {
    const solving = startSolve(twoStages());
    let fraction = 0;
    while (!solving.advance(() => true)) {
      const progress = solving.progress();
      expect(progress.fraction).toBeGreaterThanOrEqual(fraction);
      expect(progress.end_s).toBe(2400);
      fraction = progress.fraction;
      const { answers, probes, stages } = solving.result();
      expect(answers[0].verdict === 'cannot-be-judged' || progress.stage === 's2').toBe(true);
      expect(probes[0].time_s.at(-1)).toBe(progress.time_s);
      expect(stages.at(-1)?.end_s).toBe(progress.time_s);
    }
    expect(solving.progress()).toEqual({ time_s: 2400, end_s: 2400, stage: 's2', fraction: 1 });
  });

  it('keeps what it knows when it is cancelled, and stays ended', () => {
    const solving = startSolve(twoStages());
    for (let i = 0; i < 3; i++) solving.advance(() => true);
    const reached = solving.progress().time_s;
    solving.cancel();
    expect(solving.advance(() => false)).toBe(true);
    const result = solving.result();
    expect(result.outcome).toMatchObject({ reason: 'cancelled', reached_s: reached, stage: 's1' });
    expect(result.answers[0]).toMatchObject({ verdict: 'cannot-be-judged', met: null });
    expect(result.warnings.map(({ code }) => code)).toContain('not-judged');
    expect(result.probes[0].time_s.at(-1)).toBe(reached);
    expect(result.frames.time_s.at(-1)).toBeLessThanOrEqual(reached);
    expect(result.energy.closure).toBeLessThan(1e-9);
  });

  it('is not cancelled after its end', () => {
    const solving = startSolve(twoStages());
    solving.advance(() => false);
    solving.cancel();
    expect(solving.result().outcome.reason).toBe('finished');
  });

  it('of an explicit step above its limit gives the limit and nothing judged', () => {
    const project = {
      ...twoStages(),
      settings: { ...twoStages().settings, scheme: 'explicit' as const, step: 1000, grid: { nodes: 20 } },
    };
    const result = solve(project);
    expect(result.outcome.reason).toBe('step-above-limit');
    expect(result.stability?.explicit_limit_s).toBeLessThan(1000);
    expect(result.outcome.remedy?.step_s).toBeLessThan(result.stability?.explicit_limit_s ?? 0);
    expect(result.answers.map(({ verdict }) => verdict)).toEqual(['cannot-be-judged']);
    expect(result.probes.map(({ time_s }) => time_s.length)).toEqual([0, 0]);
    expect(result.frames.time_s.length).toBe(0);
    expect(result.stages).toEqual([]);
    expect(result.first).toEqual({
      slowest: null,
      hottest: null,
      largestDifference: null,
      largestDifferenceInMaterial: null,
    });
    expect(reportSchema.safeParse(buildReport(project, result)).error).toBeUndefined();
  });

  it('counts the time it took on the clock it was given, pauses left out', () => {
    let now = 0;
    const solving = startSolve(twoStages(), { now: () => (now += 500) });
    while (!solving.advance(() => true)) now += 1e6;
    const { wall_s, steps } = solving.result().solver;
    expect(wall_s).toBeGreaterThan(0.5 * steps);
    expect(wall_s).toBeLessThan(0.5 * (steps + 3));
    expect(solve(twoStages()).solver.wall_s).toBe(0);
  });

  it('refuses a plan that was not checked, in plain words', () => {
    const project = twoStages();
    project.probes[0].at = { depth: 5 };
    expect(() => solve(project)).toThrow('probes[0].at.depth must be at most 0.07 m, the thickness of the part, got 5');
  });

  it('ends with a report that its schema accepts and JSON keeps', () => {
    const project = twoStages();
    const result = solve(project);
    const report = buildReport(project, result);
    expect(JSON.parse(JSON.stringify(report))).toEqual(report);
    expect(reportSchema.parse(report)).toEqual(report);
    expect(report.layers).toEqual([
      { layer: 'l1', name: 'Layer 1', from_m: 0, to_m: 0.05 },
      { layer: 'l2', name: 'Layer 2', from_m: 0.05, to_m: 0.07 },
    ]);
    expect(report.probes[0].time_s).toEqual([...result.probes[0].time_s]);
    expect(report.answers[0]).not.toHaveProperty('spans');
  });
});
