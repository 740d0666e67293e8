/** The explicit limit: 2/λmax of the very system that is marched, its place, and what a run says of a step above it. */
import { describe, expect, it } from 'vitest';
import { gridOf, temperatureRange, wallLayers } from '../../../solver/grid';
import { wallVolumes } from '../../../solver/heat';
import { layCycle, type Exposure, type Project, type Settings } from '../../../solver/model';
import { createRun, makeScheme } from '../../../solver/stepping';
import { course, film, flux, held, insulated, systemOf, toTheEnd, wall, type LayerSpec, type StageSpec } from '../../support';
import { denseOf, symmetricEigenvalues } from '../../support/solverTools';

const steel: LayerSpec = { thickness: 0.006, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = { thickness: 0.1, conductivity: 1.2, density: 2000, heatCapacity: 900 };
const wool: LayerSpec = { thickness: 0.05, conductivity: 0.06, density: 120, heatCapacity: 1000 };

const planOf = (layers: LayerSpec[], stages: StageSpec[], settings: Partial<Settings>): Project =>
  wall({ layers, initial: 20, stages, settings: { scheme: 'explicit', step: 1e-3, ...settings } });

const limitOf = (project: Project) => createRun(project, () => undefined).stability;

/** λmax of C⁻¹ K, assembled densely from the system that a run marches, held rows left out. */
function largestRate(project: Project): number {
  const { system, state } = systemOf(project, 'plain');
  const free = Array.from({ length: system.size }, (_, row) => row).filter((row) => !system.heldRows.includes(row));
  system.linearise(state.unknowns, 0);
  const capacity = denseOf(system.size, (x, out) => system.capacityTimes(x, out));
  const none = new Float64Array(system.size);
  const inflowOf = (x: Float64Array): Float64Array => {
    system.evaluate(x, 0);
    return Float64Array.from(system.inflow);
  };
  const atZero = inflowOf(none);
  const conduction = denseOf(system.size, (x, out) => inflowOf(x).forEach((value, row) => (out[row] = value - atZero[row])));
  const symmetric = free.map((i) => free.map((j) => -conduction[i][j] / Math.sqrt(capacity[i][i] * capacity[j][j])));
  return symmetricEigenvalues(symmetric)[free.length - 1];
}

const films: [string, Exposure, Exposure][] = [
  ['films', film(25, 500), film(8, 20)],
  ['a strong film', film(2e4, 500), insulated],
  ['a held face', held(500), film(8, 20)],
  ['both faces held', held(500), held(20)],
  ['a flux', flux(5000), insulated],
];
const grids: [string, Settings['grid']][] = [
  ['nodes', { nodes: [7, 5, 4] }],
  ['cells', { cells: [6, 4, 3] }],
];
const cases = films.flatMap(([faces, start, end]) => grids.map(([kind, grid]) => ({ faces, start, end, kind, grid })));

describe.each(cases)('three layers with a contact, $faces, $kind', ({ start, end, grid }) => {
  const layers = [brick, { ...wool, contact: 2e-3 }, steel];
  const project = planOf(layers, [{ lasts: 100, start, end }], { grid });
  const exact = 2 / largestRate(project);

  it('has the limit of the system assembled densely, rounded down by 0.1 %', () => {
    expect((limitOf(project)?.explicit_limit_s ?? 0) / exact).toBeCloseTo(0.999, 9);
  });

  it('stays bounded at 0.99 of the limit and grows at 1.02 of it', () => {
    const largestAfter = (step: number): number => {
      const { system, state } = systemOf(project, 'plain');
      const scheme = makeScheme({ scheme: 'explicit', step }, system, state, 3000 * step);
      scheme.begin(0, true);
      // A shake of all free unknowns, so that the fastest mode is there.
      state.unknowns.forEach((value, row) => {
        if (!system.heldRows.includes(row)) state.unknowns[row] = value + (row % 2 === 0 ? 1 : -1);
      });
      system.evaluate(state.unknowns, 0);
      state.stored.set(system.storage);
      for (let i = 0; i < 3000; i++) if (scheme.attempt(0, step).kind !== 'accepted') return Infinity;
      return Math.max(...state.unknowns.map(Math.abs));
    };
    expect(largestAfter(0.99 * exact)).toBeLessThan(2e4);
    expect(largestAfter(1.02 * exact)).toBeGreaterThan(1e9);
  });
});

describe('the place that sets the limit', () => {
  it('is the thin steel shell in a lining, to the node', () => {
    const stability = limitOf(planOf([brick, wool, steel], [{ lasts: 100, start: film(25, 500) }], { grid: { nodes: 5 } }));
    expect(stability?.set_by.layer).toBe('Layer 2');
    expect(stability?.set_by.position_m).toBeGreaterThan(0.15);
    expect(stability?.set_by.position_m).toBeLessThan(0.156);
  });

  it('is the face under a film that is strong beside its volume', () => {
    const stability = limitOf(planOf([brick], [{ lasts: 100, end: film(5000, 500) }], { grid: { nodes: 11 } }));
    expect(stability?.set_by.position_m).toBeCloseTo(0.1, 9);
  });

  it('is where the vector of the dense system is largest', () => {
    const project = planOf([brick, wool, steel], [{ lasts: 100, start: film(25, 500) }], { grid: { nodes: [4, 9, 3] } });
    const layers = wallLayers(project);
    const cycle = layCycle(project);
    const grid = gridOf(project.settings, layers, cycle, temperatureRange(layers, cycle));
    const { capacity, loss, beside, depth } = wallVolumes(layers, grid, cycle.stages[0], temperatureRange(layers, cycle));
    // Power iteration on the symmetric system, by its three diagonals.
    let vector = Array.from(depth, (_, i) => 1 + 0.1 * (i % 3));
    for (let iteration = 0; iteration < 3000; iteration++) {
      const next = vector.map((value, i) => {
        let sum = (loss[i] / capacity[i]) * value;
        if (i > 0) sum -= (beside[i - 1] / Math.sqrt(capacity[i] * capacity[i - 1])) * vector[i - 1];
        if (i + 1 < vector.length) sum -= (beside[i] / Math.sqrt(capacity[i] * capacity[i + 1])) * vector[i + 1];
        return sum;
      });
      const norm = Math.hypot(...next);
      vector = next.map((value) => value / norm);
    }
    const largest = vector.map(Math.abs).indexOf(Math.max(...vector.map(Math.abs)));
    expect(limitOf(project)?.set_by.position_m).toBeCloseTo(depth[largest], 12);
  });
});

describe('the limit of a cycle', () => {
  const stages = (...starts: Exposure[]): StageSpec[] => starts.map((start) => ({ lasts: 100, start }));
  const settings: Partial<Settings> = { grid: { nodes: 11 } };

  it('is the worst of its stages', () => {
    const [weak, strong] = [film(10, 500), film(5000, 20)];
    const of = (...starts: Exposure[]): number => limitOf(planOf([brick], stages(...starts), settings))?.explicit_limit_s ?? 0;
    expect(of(weak, strong, weak)).toBe(of(strong));
    expect(of(weak)).toBeGreaterThan(1.1 * of(strong));
  });

  it('takes the largest film coefficient that a schedule reaches', () => {
    const rising: Exposure = {
      kind: 'film',
      coefficient: course(10, [
        { to: 5000, duration: 50 },
        { to: 10, duration: 10 },
      ]),
      surroundings: 500,
    };
    const of = (start: Exposure): number => limitOf(planOf([brick], stages(start), settings))?.explicit_limit_s ?? 0;
    expect(of(rising)).toBe(of(film(5000, 500)));
  });

  it('shows the step without overshoot beside it, the smallest capacity over conductance', () => {
    const dx = 0.01;
    const capacity = 2000 * 900 * dx;
    const stability = limitOf(planOf([brick], stages(film(500, 500)), settings));
    expect(stability?.no_overshoot_s).toBeCloseTo(Math.min(capacity / ((2 * 1.2) / dx), capacity / 2 / (1.2 / dx + 500)), 9);
    expect(stability?.no_overshoot_s).toBeLessThanOrEqual(stability?.explicit_limit_s ?? 0);
  });

  it('of an automatic run is that of plain volumes on the same grid', () => {
    const nodes: Partial<Settings> = { grid: { nodes: [5, 7] } };
    const exposed: StageSpec[] = [{ lasts: 100, start: film(25, 500), end: held(20) }];
    const [explicit, automatic] = (['explicit', 'automatic'] as const).map((scheme) =>
      limitOf(planOf([steel, brick], exposed, { ...nodes, scheme })),
    );
    expect(automatic).toEqual(explicit);
    expect(automatic?.explicit_limit_s).toBeGreaterThan(0);
  });

  it('is none where both nodes of a wall are held', () => {
    expect(limitOf(planOf([brick], [{ lasts: 100, start: held(1), end: held(2) }], { grid: { nodes: 2 } }))).toBeNull();
  });
});

describe('an explicit step above the limit', () => {
  const named = (step: number, grid: Settings['grid'] = { nodes: [9, 7] }): Project => {
    const project = planOf([brick, steel], [{ lasts: 3600, start: film(25, 500) }], { step, grid });
    project.part.layers[1].name = 'Shell';
    return project;
  };

  it('is not run: the outcome says the limit, the layer and depth that set it, and what would do', () => {
    const run = createRun(named(0.2), () => {
      throw new Error('a step was shown');
    });
    const outcome = toTheEnd(run);
    const limit = run.stability?.explicit_limit_s ?? 0;
    expect(outcome).toMatchObject({ reason: 'step-above-limit', reached_s: 0, stage: null });
    expect(outcome.message).toMatch(
      /^Explicit, 0\.2 s: not run\. The stability limit is 0\.0\d+ s, set by layer Shell at \d+ mm\. Take 0\.0\d+ s or less, or 3 nodes in that layer, or the automatic scheme\.$/,
    );
    expect(outcome.remedy?.step_s).toBeLessThanOrEqual(limit);
    expect(outcome.remedy?.step_s).toBeGreaterThan(0.9 * limit);
    expect(run.figures().steps).toBe(0);
    expect(run.energy()).toMatchObject({ in_J: 0, stored_J: 0, closure: 0 });
  });

  it('runs with each remedy that was offered: the step, or the nodes', () => {
    const { remedy } = toTheEnd(createRun(named(0.2), () => undefined));
    expect(toTheEnd(createRun(named(remedy?.step_s ?? 0), () => undefined)).reason).toBe('finished');
    const nodes = remedy?.nodes ?? 0;
    expect(toTheEnd(createRun(named(0.2, { nodes: [9, nodes] }), () => undefined)).reason).toBe('finished');
    expect(toTheEnd(createRun(named(0.2, { nodes: [9, nodes + 1] }), () => undefined)).reason).toBe('step-above-limit');
  });

  it('offers cells where the grid is of cells', () => {
    const outcome = toTheEnd(createRun(named(0.2, { cells: [9, 7] }), () => undefined));
    expect(outcome.message).toContain(`or ${outcome.remedy?.nodes} cells in that layer`);
  });

  it('offers no nodes where no number of them would do', () => {
    const outcome = toTheEnd(createRun(named(60), () => undefined));
    expect(outcome.remedy?.nodes).toBeNull();
    expect(outcome.message).not.toContain('in that layer');
  });

  it('cannot be advanced after it was refused', () => {
    const run = createRun(named(60), () => undefined);
    run.advance();
    expect(() => run.advance()).toThrow('ended');
  });

  it('at the limit itself is run', () => {
    const limit = limitOf(named(1e-3))?.explicit_limit_s ?? 0;
    const run = createRun(
      { ...named(limit), cycle: { ...named(limit).cycle, stages: [{ ...named(1).cycle.stages[0], end: { after: 5 } }] } },
      () => undefined,
    );
    expect(toTheEnd(run).reason).toBe('finished');
  });
});
