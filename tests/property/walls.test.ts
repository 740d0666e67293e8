/** Properties of any layered wall under any cycle, from random plans; a seed that fails once stays as a test of its own. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { stencilAt } from '../../solver/grid';
import type { Exposure, Project, Settings } from '../../solver/model';
import { createRun, type Run } from '../../solver/stepping';
import { toTheEnd, wall, type LayerSpec, type StageSpec } from '../support';

const SEED = 20261201;

/** From `low` to `high`, as many in every decade. */
const decades = (low: number, high: number) =>
  fc.integer({ min: 0, max: 1000 }).map((part) => low * (high / low) ** (part / 1000));
const temperature = fc.integer({ min: -50, max: 1200 });

const layer: fc.Arbitrary<LayerSpec> = fc.record({
  thickness: decades(1e-4, 0.3),
  conductivity: decades(0.02, 400),
  density: decades(20, 9000),
  heatCapacity: decades(300, 3000),
  contact: fc.oneof(fc.constant(0), decades(1e-6, 1)),
});

/** A constant, or straight pieces with kinks and now and then a jump. */
const course = (value: fc.Arbitrary<number>) =>
  fc.oneof(
    value,
    fc.record({
      start: value,
      segments: fc.array(fc.record({ to: value, duration: fc.oneof(decades(1, 3600), fc.constant(0)) }), {
        minLength: 1,
        maxLength: 3,
      }),
    }),
  );
const insulated: fc.Arbitrary<Exposure> = fc.constant({ kind: 'insulated' });
const film: fc.Arbitrary<Exposure> = fc.record({
  kind: fc.constant('film' as const),
  coefficient: course(decades(0.1, 5000)),
  surroundings: course(temperature),
});
/** Without schedules: what happens within seconds is not for steps of 20 s. */
const steadyFilm: fc.Arbitrary<Exposure> = fc.record({
  kind: fc.constant('film' as const),
  coefficient: decades(0.1, 5000),
  surroundings: temperature,
});
const held: fc.Arbitrary<Exposure> = fc.record({ kind: fc.constant('temperature' as const), temperature: course(temperature) });
const flux: fc.Arbitrary<Exposure> = fc.record({
  kind: fc.constant('flux' as const),
  flux: course(fc.integer({ min: -5000, max: 5000 })),
});

const stagesOf = (face: fc.Arbitrary<Exposure>, shortest: number): fc.Arbitrary<StageSpec[]> =>
  fc.array(fc.record({ lasts: decades(shortest, 20000), start: face, end: face }), { minLength: 1, maxLength: 3 });

interface Plan {
  layers: LayerSpec[];
  initial: number[];
  stages: StageSpec[];
}
const planWith = (face: fc.Arbitrary<Exposure>, shortest = 10): fc.Arbitrary<Plan> =>
  fc.record({
    layers: fc.array(layer, { minLength: 1, maxLength: 6 }),
    initial: fc.array(temperature, { minLength: 6, maxLength: 6 }),
    stages: stagesOf(face, shortest),
  });

const projectOf = ({ layers, initial, stages }: Plan, settings: Partial<Settings>): Project =>
  wall({ layers, initial: initial.slice(0, layers.length), stages, settings });

interface Ran {
  run: Run;
  lowest: number;
  highest: number;
  last: Float64Array;
}

/** Runs to the end, and keeps the extremes of all points at every step and between its ends. */
function ran(project: Project): Ran {
  let [lowest, highest] = [Infinity, -Infinity];
  let last = new Float64Array();
  let backwards = 0;
  const field = new Float64Array(3000);
  const run = createRun(project, (step) => {
    if (!(step.to > step.from)) backwards++;
    for (const fraction of [0.3, 1]) {
      step.at(fraction, field);
      for (let i = 0; i < step.after.length; i++) {
        // Written so that NaN is an extreme.
        if (!(field[i] >= lowest)) lowest = field[i];
        if (!(field[i] <= highest)) highest = field[i];
      }
    }
    last = Float64Array.from(step.after);
  });
  const outcome = toTheEnd(run);
  expect(outcome.reason, outcome.message ?? '').toBe('finished');
  expect(backwards).toBe(0);
  expect(Number.isFinite(lowest) && Number.isFinite(highest)).toBe(true);
  return { run, lowest, highest, last };
}

/**
 * Temperatures at both edges and inside every layer, at forty equal times; none where a thousandth of the cycle ago anything
 * jumped or bent, for that is more than an automatic grid resolves.
 */
function courses(project: Project): number[][] {
  const rows: number[][] = [];
  const run = createRun(project, (step) => {
    for (;;) {
      const time = ((rows.length + 1) * run.cycle.end) / 40;
      if (rows.length === 40 || time > step.to * (1 + 1e-12)) return;
      const fraction = Math.min(1, (time - step.from) / (step.to - step.from));
      rows.push(stencils.map(({ points, weights }) => step.combinationAt(points, weights, fraction)));
    }
  });
  let edge = 0;
  const stencils = project.part.layers.flatMap(({ thickness }, layer) => {
    const from = edge;
    edge += thickness;
    return [0, 0.3, 0.9, 1].map((place) => stencilAt(run.points, from + place * thickness, layer));
  });
  expect(toTheEnd(run).reason).toBe('finished');
  const { stages, end } = run.cycle;
  const lines = stages.flatMap(({ exposures }) => [...Object.values(exposures.start), ...Object.values(exposures.end)]);
  const edges = lines.flatMap((line) => (typeof line === 'object' ? line.time : []));
  const early = (time: number): boolean => edges.some((edge) => time >= edge && time - edge < 1e-3 * end);
  return rows.filter((_, i) => !early(((i + 1) * end) / 40));
}

/** Everything that is met, °C. */
function met({ layers, initial, stages }: Plan): [number, number] {
  const values = initial.slice(0, layers.length);
  const note = (course: unknown): void => {
    if (typeof course === 'number') values.push(course);
    else {
      const { start, segments } = course as { start: number; segments: { to: number }[] };
      values.push(start, ...segments.map(({ to }) => to));
    }
  };
  for (const { start, end } of stages) {
    for (const face of [start, end]) {
      if (face?.kind === 'film') note(face.surroundings);
      if (face?.kind === 'temperature') note(face.temperature);
    }
  }
  return [Math.min(...values), Math.max(...values)];
}

const anyFace = fc.oneof(insulated, film, held, flux);
const passiveFace = fc.oneof(insulated, film, held);

/** Between what it meets, but for `slack` K. */
function expectBetween({ lowest, highest }: Ran, plan: Plan, slack: number): void {
  const [least, most] = met(plan);
  expect(lowest).toBeGreaterThan(least - slack);
  expect(highest).toBeLessThan(most + slack);
}
const expectKept = ({ run }: Ran, closure = 1e-9): void => expect(run.energy().closure).toBeLessThan(closure);
const longestStage = ({ stages }: Plan): number => Math.max(...stages.map(({ lasts }) => lasts));

describe(`any wall under any cycle, seed ${SEED}`, () => {
  const check = <T extends unknown[]>(numRuns: number, property: fc.IPropertyWithHooks<T>): void =>
    fc.assert(property, { seed: SEED, numRuns });

  it('is run to the end by the automatic scheme, and the heat is kept', () => {
    check(
      100,
      fc.property(planWith(anyFace), (plan) => {
        const one = ran(projectOf(plan, { accuracy: 0.5 }));
        expectKept(one);
        expect(one.run.figures().steps).toBeLessThan(3000);
      }),
    );
  });

  it('keeps between what it meets under the automatic scheme, but for its accuracy', () => {
    check(
      100,
      fc.property(planWith(passiveFace), (plan) => expectBetween(ran(projectOf(plan, { accuracy: 1 })), plan, 1)),
    );
  });

  it.each(['nodes', 'cells'] as const)('keeps between what it meets under the implicit scheme, whatever the step: %s', (kind) => {
    check(
      100,
      fc.property(planWith(passiveFace), decades(0.01, 10), fc.integer({ min: 2, max: 12 }), (plan, part, count) => {
        const grid = kind === 'nodes' ? { nodes: count } : { cells: count };
        const one = ran(projectOf(plan, { scheme: 'implicit', step: longestStage(plan) * part, grid }));
        expectBetween(one, plan, 1e-5);
        expectKept(one);
      }),
    );
  });

  it('keeps between what it meets under the explicit scheme, at the step that cannot overshoot', () => {
    check(
      80,
      fc.property(planWith(passiveFace), fc.integer({ min: 2, max: 6 }), (plan, nodes) => {
        const settings: Partial<Settings> = { scheme: 'explicit', grid: { nodes } };
        const { stability } = createRun(projectOf(plan, { ...settings, step: 1 }), () => undefined);
        if (stability === null) return;
        const step = 0.999 * Math.min(stability.no_overshoot_s, stability.explicit_limit_s);
        // As many steps as make a test: the cycle is cut to them.
        const cut = Math.min(1, (300 * step) / longestStage(plan));
        const short = { ...plan, stages: plan.stages.map((stage) => ({ ...stage, lasts: stage.lasts * cut })) };
        const one = ran(projectOf(short, { ...settings, step }));
        expectBetween(one, plan, 1e-6);
        expectKept(one);
      }),
    );
  });

  it('is run to the end by Crank–Nicolson with any damping, and the heat is kept', () => {
    check(
      80,
      fc.property(planWith(anyFace), decades(0.005, 2), fc.integer({ min: 0, max: 6 }), (plan, part, dampedSteps) => {
        const step = longestStage(plan) * part;
        // Undamped, it sends the heat of a jump to and fro through the stiffest contact at every step; rounding grows with it.
        const closure = dampedSteps === 0 ? 1e-7 : 1e-9;
        expectKept(ran(projectOf(plan, { scheme: 'crankNicolson', step, dampedSteps, grid: { nodes: 5 } })), closure);
      }),
    );
  });

  it('is within the accuracy asked for of a solution that is far finer, under the automatic scheme', () => {
    check(
      60,
      fc.property(planWith(anyFace), fc.constantFrom(3, 1, 0.3), (plan, accuracy) => {
        const [found, fine] = [accuracy, accuracy / 30].map((wanted) => courses(projectOf(plan, { accuracy: wanted })));
        let worst = 0;
        found.forEach((row, i) => row.forEach((value, j) => (worst = Math.max(worst, Math.abs(value - fine[i][j])))));
        expect(worst).toBeLessThan(accuracy);
      }),
    );
  });

  it('comes to the same end by two schemes on one grid', () => {
    check(
      20,
      fc.property(planWith(steadyFilm, 5000), (plan) => {
        const grid = { cells: 12 };
        const step = 20;
        const [least, most] = met(plan);
        const fine = ran(projectOf(plan, { accuracy: 0.01, grid })).last;
        const rough = ran(projectOf(plan, { scheme: 'crankNicolson', step, grid })).last;
        fine.forEach((value, i) => expect(Math.abs(value - rough[i])).toBeLessThan(0.02 * (most - least) + 0.1));
      }),
    );
  });
});
