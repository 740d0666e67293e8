import { describe, expect, it } from 'vitest';
import { gridOf, temperatureRange, wallLayers, type WallGrid } from '../../../solver/grid';
import { layCycle, type Project, type Settings } from '../../../solver/model';
import { course, film, flux, held, insulated, wall, type LayerSpec, type WallSpec } from '../../support';

const steel: LayerSpec = { thickness: 0.02, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = { thickness: 0.1, conductivity: 1.2, density: 2000, heatCapacity: 900 };

function gridFor(spec: WallSpec, settings: Partial<Settings> = {}): WallGrid {
  const project: Project = wall({ ...spec, settings });
  const cycle = layCycle(project);
  const layers = wallLayers(project);
  return gridOf(project.settings, layers, cycle, temperatureRange(layers, cycle));
}
const count = ({ elements }: WallGrid): number => elements.reduce((sum, lengths) => sum + lengths.length, 0);
const heated: WallSpec = { layers: [brick], initial: 20, stages: [{ lasts: 3600, start: film(50, 500) }] };

describe('the automatic grid', () => {
  it('fills every layer', () => {
    const { elements, thickness } = gridFor({ ...heated, layers: [steel, brick, steel] });
    elements.forEach((lengths, i) => expect(lengths.reduce((a, b) => a + b, 0) / thickness[i]).toBeCloseTo(1, 12));
  });

  it('has at least three elements in every layer, however thin', () => {
    const { elements } = gridFor({ ...heated, layers: [brick, { ...steel, thickness: 1e-5 }, brick] });
    expect(elements[1].length).toBe(3);
  });

  it('takes more elements for a finer accuracy: about 10^(1/4) times as many a decade', () => {
    const counts = [1, 0.1, 0.01, 0.001].map((accuracy) => count(gridFor(heated, { accuracy })));
    for (let i = 1; i < counts.length; i++) {
      expect(counts[i] / counts[i - 1]).toBeGreaterThan(1.3);
      expect(counts[i] / counts[i - 1]).toBeLessThan(2.8);
    }
  });

  it('is finest at the face that jumps, and finer for a stronger film', () => {
    const { elements } = gridFor(heated);
    expect(elements[0][0]).toBeLessThan(0.1 * Math.max(...elements[0]));
    const firstUnder = (coefficient: number): number =>
      gridFor({ ...heated, stages: [{ lasts: 3600, start: film(coefficient, 500) }] }).elements[0][0];
    expect(firstUnder(4)).toBeLessThan(0.6 * firstUnder(2));
  });

  it('sees a jump that comes in a later stage', () => {
    const late: WallSpec = { ...heated, stages: [{ lasts: 3600 }, { lasts: 3600, start: film(50, 500) }] };
    expect(gridFor(late).elements[0][0]).toBeLessThan(0.1 * Math.max(...gridFor(late).elements[0]));
  });

  it('is finer at a steep ramp than at a slow one', () => {
    const ramped = (duration: number): number =>
      gridFor({
        ...heated,
        stages: [{ lasts: 36000, start: { ...film(50, 0), surroundings: course(20, [{ to: 500, duration }]) } as never }],
      }).elements[0][0];
    expect(ramped(360)).toBeLessThan(0.7 * ramped(36000));
  });

  it('is finer where layers meet at different temperatures', () => {
    const bonded: WallSpec = { layers: [brick, brick], initial: [500, 20], stages: [{ lasts: 3600 }] };
    const alike: WallSpec = { ...bonded, initial: 20, stages: [{ lasts: 3600, start: film(50, 500) }] };
    const last = (grid: WallGrid): number => grid.elements[0][grid.elements[0].length - 1];
    expect(last(gridFor(bonded))).toBeLessThan(0.2 * last(gridFor(alike)));
  });

  it.each<[string, WallSpec]>([
    ['a film', heated],
    ['a held jump', { ...heated, stages: [{ lasts: 3600, start: held(500), end: film(10, 20) }] }],
    ['a flux', { ...heated, stages: [{ lasts: 3600, start: flux(5000) }] }],
    ['three layers', { ...heated, layers: [steel, brick, steel] }],
    ['unequal layers', { layers: [steel, brick], initial: [900, 20], stages: [{ lasts: 60 }] }],
  ])('grows so gently that storage weights of fourth order stay positive: %s', (_, spec) => {
    for (const accuracy of [10, 1, 0.1, 0.01]) {
      for (const lengths of gridFor(spec, { accuracy }).elements) {
        for (let i = 1; i < lengths.length; i++) {
          expect(Math.max(lengths[i] / lengths[i - 1], lengths[i - 1] / lengths[i])).toBeLessThan(1.618);
        }
      }
    }
  });

  it('asks for plain storage where a front is finer than the elements, and there only', () => {
    expect(gridFor({ ...heated, stages: [{ lasts: 3600, start: film(2, 500) }] }).plainRows).toEqual([{ start: 0, end: 0 }]);
    expect(gridFor({ ...heated, stages: [{ lasts: 3600, end: held(500) }] }).plainRows).toEqual([{ start: 0, end: 5 }]);
    expect(gridFor({ ...heated, stages: [{ lasts: 3600, end: held(20) }] }).plainRows).toEqual([{ start: 0, end: 0 }]);
    const behindSteel: WallSpec = { ...heated, layers: [{ ...steel, thickness: 0.005 }, brick, steel] };
    expect(gridFor(behindSteel, { grid: { nodes: 6 } }).plainRows?.map(({ start, end }) => [start, end])).toEqual([
      [5, 0],
      [5, 0],
      [0, 0],
    ]);
    expect(gridFor(heated, { grid: { nodes: 6 } }).plainRows).toEqual([{ start: 5, end: 0 }]);
    expect(gridFor({ layers: [brick, brick], initial: [500, 20], stages: [{ lasts: 60 }] }).plainRows).toEqual([
      { start: 0, end: 5 },
      { start: 5, end: 0 },
    ]);
  });

  it('is a handful of elements where nothing happens', () => {
    expect(count(gridFor({ layers: [brick], initial: 20, stages: [{ lasts: 3600, start: insulated }] }))).toBeLessThan(10);
  });
});

describe('the grid that settings ask for', () => {
  const twoLayers: WallSpec = { ...heated, layers: [steel, brick] };

  it('is equal within each layer for a scheme of the textbooks, with more elements in the thicker layer', () => {
    const { kind, elements } = gridFor(twoLayers, { scheme: 'implicit', step: 1 });
    expect(kind).toBe('nodes');
    for (const lengths of elements) expect(Math.max(...lengths) / Math.min(...lengths)).toBeCloseTo(1, 12);
    expect(elements[1].length).toBeGreaterThan(2 * elements[0].length);
  });

  it.each(['automatic', 'implicit'] as const)('has the nodes or cells it was given, one number or one a layer: %s', (scheme) => {
    const counts = (grid: Settings['grid']): number[] =>
      gridFor(twoLayers, { scheme, step: 1, grid }).elements.map((lengths) => lengths.length);
    expect(counts({ nodes: 5 })).toEqual([4, 4]);
    expect(counts({ nodes: [2, 9] })).toEqual([1, 8]);
    expect(counts({ cells: 5 })).toEqual([5, 5]);
    expect(counts({ cells: [3, 7] })).toEqual([3, 7]);
  });
});

describe('the range of temperatures', () => {
  const rangeOf = (spec: WallSpec) => {
    const project = wall(spec);
    return temperatureRange(wallLayers(project), layCycle(project));
  };

  it('spans the start and everything met', () => {
    const stages = [
      { lasts: 60, start: film(10, 300), end: held(-40) },
      { lasts: 60, start: film(10, 20) },
    ];
    expect(rangeOf({ ...heated, stages })).toEqual({ lowest: -40, highest: 300 });
  });

  it('is widened by a flux about as far as it heats', () => {
    // 5000 W/m² for 600 s into 0.1 m of brick: 17 K over the whole, and a hot face 2 q √(t/π)/√(k ρ c) = 94 K above it.
    const { lowest, highest } = rangeOf({ ...heated, stages: [{ lasts: 600, start: flux(5000) }] });
    expect(lowest).toBe(20);
    expect(highest).toBeCloseTo(20 + 16.7 + 94, 0);
    expect(rangeOf({ ...heated, stages: [{ lasts: 600, start: flux(-5000) }] }).lowest).toBeCloseTo(20 - 16.7 - 94, 0);
  });

  it('is not widened further than the other face lets it', () => {
    // A year of 100 W/m² into brick with a film behind it: no more than q (R + 1/h), twice for the surface.
    const stages = [{ lasts: 3.15e7, start: flux(100), end: film(10, 20) }];
    const { highest } = rangeOf({ ...heated, stages });
    expect(highest).toBeLessThan(20 + 100 * (0.1 / 1.2 + 0.1) * 2);
  });
});
