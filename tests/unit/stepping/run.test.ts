/** A run as its observer sees it: where steps end, what they show, how runs end. */
import { describe, expect, it } from 'vitest';
import { stencilAt } from '../../../solver/grid';
import type { Exposure, Project, Settings } from '../../../solver/model';
import { createRun, succeeded, type Run, type Step } from '../../../solver/stepping';
import { course, film, flux, held, insulated, toTheEnd, wall, type LayerSpec, type StageSpec } from '../../support';

const steel: LayerSpec = { thickness: 0.01, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = { thickness: 0.05, conductivity: 1.2, density: 2000, heatCapacity: 900 };

const schemes: [string, Partial<Settings>][] = [
  ['automatic', { scheme: 'automatic' }],
  ['automatic on cells', { scheme: 'automatic', grid: { cells: 6 } }],
  ['explicit', { scheme: 'explicit', step: 0.3, grid: { nodes: 4 } }],
  ['implicit', { scheme: 'implicit', step: 17, grid: { nodes: 6 } }],
  ['Crank–Nicolson', { scheme: 'crankNicolson', step: 17, grid: { nodes: 6 } }],
  ['Crank–Nicolson on cells', { scheme: 'crankNicolson', step: 17, grid: { cells: 6 } }],
];

/** Schedules with kinks at 100, 130, 250 and 390 s, a jump at 300 s, and stage edges at 200 and 400 s. */
const stages: StageSpec[] = [
  {
    lasts: 200,
    start: {
      kind: 'film',
      coefficient: course(10, [{ to: 60, duration: 100 }]),
      surroundings: course(20, [{ to: 600, duration: 130 }]),
    },
    end: film(10, 20),
  },
  {
    lasts: 200,
    start: {
      kind: 'film',
      coefficient: course(60, [{ hold: 100 }, { to: 300, duration: 0 }, { hold: 90 }, { to: 10, duration: 10 }]),
      surroundings: 20,
    },
    end: { kind: 'temperature', temperature: course(40, [{ to: 90, duration: 50 }]) },
  },
];
const edges = [100, 130, 200, 250, 300, 390, 400];
const plan = (settings: Partial<Settings>, more: StageSpec[] = stages): Project =>
  wall({ layers: [steel, { ...brick, contact: 1e-3 }, steel], initial: [20, 20, 60], stages: more, settings });

function watch(project: Project, look: (step: Step, run: Run) => void): Run {
  const run: Run = createRun(project, (step) => look(step, run));
  expect(toTheEnd(run).reason).toBe('finished');
  return run;
}

describe.each(schemes)('a run of the scheme: %s', (_, settings) => {
  it('goes from 0 to the end without a gap, and ends a step on every edge, kink and jump', () => {
    const ends: number[] = [0];
    watch(plan(settings), (step) => {
      expect(step.from).toBe(ends[ends.length - 1]);
      expect(step.to).toBeGreaterThan(step.from);
      for (const edge of edges) expect(step.from < edge && edge < step.to).toBe(false);
      expect(step.stage).toBe(step.to <= 200 ? 0 : 1);
      ends.push(step.to);
    });
    for (const edge of edges) expect(ends).toContain(edge);
  });

  it('shows a dense output that meets both ends of the step and is continuous from step to step', () => {
    let last: Float64Array | null = null;
    let faces = 0;
    const field = new Float64Array(1000);
    watch(plan(settings), (step) => {
      step.at(0, field);
      step.before.forEach((value, i) => expect(Math.abs(field[i] - value)).toBeLessThan(1e-9));
      step.at(1, field);
      step.after.forEach((value, i) => expect(Math.abs(field[i] - value)).toBeLessThan(1e-9));
      if (last !== null) {
        const inner = step.before.subarray(1, -1);
        inner.forEach((value, i) => expect(value).toBe(last?.[i + 1]));
        if (step.before[0] !== last[0] || step.before[last.length - 1] !== last[last.length - 1]) faces++;
      }
      last = Float64Array.from(step.after);
    });
    // Only a held temperature that jumps, or faces without heat of their own, move at once.
    expect(faces).toBeLessThanOrEqual(edges.length);
  });

  it('shows the same temperature at a point alone, in a combination and in the whole field', () => {
    const field = new Float64Array(1000);
    watch(plan(settings), (step, { points }) => {
      for (const fraction of [0, 0.3, 0.9]) {
        step.at(fraction, field);
        const { length } = points.position;
        for (const point of [0, 1, points.layerStart[1], length - 1]) {
          expect(step.combinationAt([point], [1], fraction)).toBeCloseTo(field[point], 9);
        }
        const { points: chosen, weights } = stencilAt(points, 0.033);
        const expected = chosen.reduce((sum, point, i) => sum + weights[i] * field[point], 0);
        expect(step.combinationAt(chosen, weights, fraction)).toBeCloseTo(expected, 9);
      }
    });
  });

  it('has a dense output of at most the fourth degree at every point while coefficients hold', () => {
    const constant = plan(settings, [
      { lasts: 300, start: { ...stages[0].start, coefficient: 40 } as Exposure, end: film(10, 20) },
    ]);
    const nodes = [0, 0.25, 0.5, 0.75, 1];
    const fields = nodes.map(() => new Float64Array(1000));
    const other = new Float64Array(1000);
    watch(constant, (step, { points }) => {
      nodes.forEach((fraction, i) => step.at(fraction, fields[i]));
      step.at(0.6, other);
      const lagrange = nodes.map((at, i) => nodes.reduce((w, x, j) => (i === j ? w : (w * (0.6 - x)) / (at - x)), 1));
      for (let point = 0; point < points.position.length; point++) {
        const byFive = lagrange.reduce((sum, weight, i) => sum + weight * fields[i][point], 0);
        expect(Math.abs(byFive - other[point])).toBeLessThan(1e-8);
      }
    });
  });

  it('shows at a film the flux that its law gives from the temperatures shown, and an imposed flux as it is', () => {
    const given = plan(settings, [
      { lasts: 300, start: film(40, 500), end: { kind: 'flux', flux: course(0, [{ to: 3000, duration: 300 }]) } },
    ]);
    watch(given, (step) => {
      for (const fraction of [0, 0.4, 1]) {
        const face = step.combinationAt([0], [1], fraction);
        expect(step.faceFluxAt('start', fraction)).toBeCloseTo(40 * (500 - face), 6);
        expect(step.faceFluxAt('end', fraction)).toBeCloseTo(10 * (step.from + fraction * (step.to - step.from)), 6);
      }
    });
  });

  it('gives the same digits every time', () => {
    const digits = (): number[] => {
      const all: number[] = [];
      watch(plan(settings), (step) => all.push(step.to, ...step.after, step.faceFluxAt('start', 0.5)));
      return all;
    };
    expect(digits()).toEqual(digits());
  });

  it('starts from the temperatures given, before any exposure acts', () => {
    const run = createRun(plan(settings, [{ lasts: 10, start: held(500), end: film(1000, 900) }]), () => undefined);
    expect(run.start[0]).toBe(20);
    expect(run.start[run.start.length - 1]).toBe(60);
    expect(run.time).toBe(0);
  });

  it('counts what it does', () => {
    let steps = 0;
    const run = watch(plan(settings), () => steps++);
    const figures = run.figures();
    expect(figures.steps).toBe(steps);
    expect(figures.scheme).toBe(settings.scheme);
    expect(figures.volumes).toBeGreaterThanOrEqual(10);
    expect(figures.factorisations).toBeGreaterThan(0);
    expect(figures.factorisations).toBeLessThanOrEqual(steps + figures.rejected);
    expect(figures.method.length).toBeGreaterThan(5);
  });
});

describe('the steps of a scheme with a chosen step', () => {
  const lengths = (settings: Partial<Settings>, of: StageSpec[]): number[] => {
    const all: number[] = [];
    watch(wall({ layers: [brick], initial: 20, stages: of, settings: { grid: { nodes: 5 }, ...settings } }), (step) =>
      all.push(Number((step.to - step.from).toPrecision(9))),
    );
    return all;
  };

  it('are that step where it fits, and equally shorter where it does not', () => {
    const of = [
      { lasts: 60, start: film(10, 100) },
      { lasts: 25, start: film(10, 100) },
    ];
    expect(lengths({ scheme: 'implicit', step: 20 }, of)).toEqual([20, 20, 20, 12.5, 12.5]);
  });

  it('are one short one where a stage is shorter than the step', () => {
    expect(lengths({ scheme: 'implicit', step: 20 }, [{ lasts: 3 }, { lasts: 20 }])).toEqual([3, 20]);
  });

  it('begin with damped half steps after a jump in Crank–Nicolson, and only there', () => {
    const kinked = film(10, 100);
    const of: StageSpec[] = [
      { lasts: 60, start: kinked },
      { lasts: 40, start: kinked },
      { lasts: 60, start: film(10, 20) },
    ];
    expect(lengths({ scheme: 'crankNicolson', step: 20 }, of)).toEqual([10, 10, 10, 10, 20, 20, 20, 10, 10, 10, 10, 20]);
    expect(lengths({ scheme: 'crankNicolson', step: 20, dampedSteps: 0 }, of)).toEqual([20, 20, 20, 20, 20, 20, 20, 20]);
    expect(lengths({ scheme: 'crankNicolson', step: 20, dampedSteps: 1 }, of).slice(0, 4)).toEqual([
      10, 16.6666667, 16.6666667, 16.6666667,
    ]);
  });

  it('carry damping that is still due over a kink', () => {
    const early: Exposure = {
      kind: 'film',
      coefficient: 10,
      surroundings: course(100, [{ hold: 20 }, { to: 300, duration: 80 }]),
    };
    expect(lengths({ scheme: 'crankNicolson', step: 20 }, [{ lasts: 100, start: early }])).toEqual([10, 10, 10, 10, 20, 20, 20]);
  });

  it('factorise once a step size while coefficients hold', () => {
    const run = watch(
      wall({
        layers: [brick],
        initial: 20,
        stages: [{ lasts: 2000, start: film(10, 100) }],
        settings: { scheme: 'implicit', step: 2 },
      }),
      () => undefined,
    );
    expect(run.figures()).toMatchObject({ steps: 1000, factorisations: 1 });
  });
});

describe('a held face', () => {
  it.each<[string, Partial<Settings>]>([
    ['automatic', { scheme: 'automatic' }],
    ['implicit', { scheme: 'implicit', step: 5 }],
    ['explicit', { scheme: 'explicit', step: 0.5, grid: { nodes: 11 } }],
    ['Crank–Nicolson on cells', { scheme: 'crankNicolson', step: 5, grid: { cells: 9 } }],
  ])('has its temperature to the digit at every step, from the jump on: %s', (_, settings) => {
    const project = wall({ layers: [brick], initial: 20, stages: [{ lasts: 100, start: held(500) }], settings });
    watch(project, (step) => {
      expect(step.before[0]).toBeCloseTo(500, 9);
      expect(step.after[0]).toBeCloseTo(500, 9);
      expect(step.combinationAt([0], [1], 0.5)).toBeCloseTo(500, 9);
    });
  });

  it('does not push its neighbours to the other side, at any instant', () => {
    const field = new Float64Array(1000);
    const layersOf: LayerSpec[] = [{ ...steel, thickness: 0.01 }, brick];
    for (const grid of ['automatic', { nodes: 9 }] as Settings['grid'][]) {
      for (const accuracy of [1, 0.1]) {
        let lowest = Infinity;
        let highest = -Infinity;
        const stagesOf = [{ lasts: 3600, start: held(500), end: held(20) }];
        watch(wall({ layers: layersOf, initial: 20, stages: stagesOf, settings: { accuracy, grid } }), (step, { points }) => {
          for (const fraction of [0, 0.1, 0.5, 1]) {
            step.at(fraction, field);
            const used = field.subarray(0, points.position.length);
            lowest = Math.min(lowest, ...used);
            highest = Math.max(highest, ...used);
          }
        });
        expect(lowest).toBeGreaterThan(20 - 0.1);
        expect(highest).toBeLessThan(500 + 0.1);
      }
    }
  });
});

describe('the end of a run', () => {
  it('comes with the last step, and nothing comes after it', () => {
    const project = wall({ layers: [brick], initial: 20, stages: [{ lasts: 10 }], settings: { scheme: 'implicit', step: 5 } });
    let steps = 0;
    const run = createRun(project, () => steps++);
    expect(run.advance()).toBeNull();
    const outcome = run.advance();
    expect(outcome).toEqual({ reason: 'finished', reached_s: 10, stage: 's0', message: null });
    expect(steps).toBe(2);
    expect(outcome !== null && succeeded(outcome)).toBe(true);
    expect(() => run.advance()).toThrow('ended');
  });

  it('can be left before it comes: energy, figures and time are those so far', () => {
    const run = createRun(plan({ scheme: 'implicit', step: 17 }), () => undefined);
    run.advance();
    expect(run.time).toBeGreaterThan(0);
    expect(run.figures().steps).toBe(1);
    expect(run.energy().closure).toBeLessThan(1e-12);
  });

  it('finds insulated walls, fluxes both ways and thirty layers no trouble', () => {
    const thirty = Array.from({ length: 30 }, (_, i) => (i % 2 === 0 ? { ...steel, thickness: 0.002, contact: 1e-4 } : brick));
    for (const of of [
      [{ lasts: 3600, start: film(30, 600), end: film(10, 20) }],
      [{ lasts: 100 }],
      [{ lasts: 100, start: flux(1e4), end: flux(-1e4) }],
      [{ lasts: 100, start: insulated, end: held(80) }],
    ]) {
      const run = watch(wall({ layers: thirty, initial: 20, stages: of }), () => undefined);
      expect(run.figures().volumes).toBeGreaterThanOrEqual(100);
      expect(run.figures().steps).toBeLessThan(200);
    }
  });
});
