/** Heat is kept: by the audit of every scheme at every step, and by a balance that knows nothing of the audit. */
import { describe, expect, it } from 'vitest';
import { stencilAt, type FieldPoints } from '../../../solver/grid';
import type { Exposure, Project, Settings } from '../../../solver/model';
import { createRun, type Step } from '../../../solver/stepping';
import { course, film, flux, held, insulated, toTheEnd, wall, type LayerSpec, type StageSpec } from '../../support';

const steel: LayerSpec = { thickness: 0.01, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = { thickness: 0.05, conductivity: 1.2, density: 2000, heatCapacity: 900 };
const layers: LayerSpec[] = [brick, { ...steel, contact: 1e-3 }, brick];

const changing: Exposure = {
  kind: 'film',
  coefficient: course(10, [{ to: 80, duration: 300 }, { hold: 200 }, { to: 20, duration: 0 }, { hold: 100 }]),
  surroundings: course(20, [
    { to: 600, duration: 400 },
    { to: 100, duration: 200 },
  ]),
};
const cycles: [string, StageSpec[]][] = [
  ['films that change, and jump', [{ lasts: 600, start: changing, end: film(10, 20) }]],
  [
    'a flux, then a quench',
    [
      { lasts: 300, start: flux(20000) },
      { lasts: 300, start: film(800, 20), end: film(800, 20) },
    ],
  ],
  [
    'a held face that jumps, follows a ramp, and is let go',
    [
      { lasts: 200, start: held(300), end: held(20) },
      { lasts: 200, start: { kind: 'temperature', temperature: course(300, [{ to: 500, duration: 150 }]) }, end: held(20) },
      { lasts: 200, start: film(10, 20), end: insulated },
    ],
  ],
  ['nothing at all', [{ lasts: 600 }]],
];
const schemes: [string, Partial<Settings>][] = [
  ['automatic', { scheme: 'automatic', accuracy: 0.1 }],
  ['automatic, coarse', { scheme: 'automatic', accuracy: 10 }],
  ['automatic on cells', { scheme: 'automatic', grid: { cells: 5 } }],
  ['explicit', { scheme: 'explicit', step: 0.1, grid: { nodes: 5 } }],
  ['explicit on cells', { scheme: 'explicit', step: 0.1, grid: { cells: 4 } }],
  ['implicit', { scheme: 'implicit', step: 20, grid: { nodes: 6 } }],
  ['Crank–Nicolson', { scheme: 'crankNicolson', step: 20, grid: { nodes: 6 } }],
  ['Crank–Nicolson, plain, on cells', { scheme: 'crankNicolson', step: 20, dampedSteps: 0, grid: { cells: 6 } }],
];

describe.each(schemes)('the audit of %s', (_, settings) => {
  it.each(cycles)('closes to 1e-9 at every step: %s', (_cycle, stages) => {
    let worst = 0;
    let lag = 0;
    const run = createRun(wall({ layers, initial: [20, 20, 250], stages, settings }), () => {
      const { closure, lag_K } = run.energy();
      worst = Math.max(worst, closure);
      lag = Math.max(lag, lag_K);
    });
    expect(toTheEnd(run).reason).toBe('finished');
    expect(worst).toBeLessThan(1e-9);
    expect(lag).toBeLessThan(1e-6);
    const { in_J, stored_J, byFace_J } = run.energy();
    expect(byFace_J.start + byFace_J.end).toBe(in_J);
    expect(Math.abs(stored_J - in_J)).toBeLessThan(1e-6 + 1e-9 * (Math.abs(byFace_J.start) + Math.abs(byFace_J.end)));
  });
});

describe('the audit', () => {
  it('has a closure of 0 where nothing is exchanged, though layers at different temperatures even out', () => {
    const run = createRun(wall({ layers, initial: [20, 20, 250], stages: [{ lasts: 600 }] }), () => undefined);
    toTheEnd(run);
    expect(run.energy()).toMatchObject({ basis: 'J/m²', in_J: 0, closure: 0 });
    expect(Math.abs(run.energy().stored_J)).toBeLessThan(1e-12 * 0.05 * 2000 * 900 * 230);
  });

  it('is that of the heat content of the first step after a quench, with next to nothing exchanged', () => {
    const closures: number[] = [];
    const run = createRun(wall({ layers, initial: 850, stages: [{ lasts: 60, start: film(4000, 20) }] }), () => {
      closures.push(run.energy().closure);
    });
    run.advance();
    expect(run.time).toBeLessThan(0.01);
    expect(closures[0]).toBeLessThan(1e-9);
  });
});

const GAUSS = [
  [0.046910077030668, 0.118463442528095],
  [0.230765344947158, 0.239314335249683],
  [0.5, 0.284444444444444],
  [0.769234655052842, 0.239314335249683],
  [0.953089922969332, 0.118463442528095],
];

/** Heat content from a reported field alone, J/m²: its own polynomials, integrated point to point. */
function heatContent(points: FieldPoints, field: Float64Array): number {
  let heat = 0;
  layers.forEach(({ density, heatCapacity }, layer) => {
    for (let i = points.layerStart[layer]; i + 1 < points.layerStart[layer + 1]; i++) {
      const width = points.position[i + 1] - points.position[i];
      for (const [place, weight] of GAUSS) {
        const stencil = stencilAt(points, points.position[i] + place * width, layer);
        const temperature = stencil.points.reduce((sum, point, j) => sum + stencil.weights[j] * field[point], 0);
        heat += weight * width * density * heatCapacity * temperature;
      }
    }
  });
  return heat;
}

/** Heat through both faces in a step by the fluxes of its dense output, J/m². */
const heatIn = (step: Step): { net: number; gross: number } => {
  let net = 0;
  let gross = 0;
  for (const [place, weight] of GAUSS) {
    const [start, end] = [step.faceFluxAt('start', place), step.faceFluxAt('end', place)];
    net += weight * (step.to - step.from) * (start + end);
    gross += weight * (step.to - step.from) * (Math.abs(start) + Math.abs(end));
  }
  return { net, gross };
};

describe('a balance from reported temperatures and fluxes alone', () => {
  const project = (settings: Partial<Settings>): Project =>
    wall({
      layers,
      initial: 20,
      stages: [
        {
          lasts: 1800,
          start: { kind: 'film', coefficient: 60, surroundings: course(20, [{ to: 600, duration: 1200 }]) },
          end: film(15, 20),
        },
      ],
      settings,
    });

  it.each<[string, Partial<Settings>, number]>([
    ['automatic', { scheme: 'automatic', accuracy: 0.01 }, 3e-5],
    ['automatic with 1 K', { scheme: 'automatic', accuracy: 1 }, 3e-3],
    ['explicit', { scheme: 'explicit', step: 0.2, grid: { nodes: [21, 5, 21] } }, 1e-3],
    ['implicit', { scheme: 'implicit', step: 1, grid: { nodes: [41, 21, 41] } }, 1e-3],
    ['Crank–Nicolson', { scheme: 'crankNicolson', step: 5, grid: { nodes: [41, 21, 41] } }, 3e-4],
    ['Crank–Nicolson on cells', { scheme: 'crankNicolson', step: 5, grid: { cells: [40, 20, 40] } }, 3e-4],
  ])('agrees with what was stored: %s', (_, settings, tolerance) => {
    let net = 0;
    let gross = 0;
    let last = new Float64Array();
    const run = createRun(project(settings), (step) => {
      const heat = heatIn(step);
      net += heat.net;
      gross += heat.gross;
      last = Float64Array.from(step.after);
    });
    toTheEnd(run);
    const stored = heatContent(run.points, last) - heatContent(run.points, run.start);
    expect(gross).toBeGreaterThan(1e6);
    expect(Math.abs(stored - net)).toBeLessThan(tolerance * gross);
    // The audit's figures as well, each by its own.
    expect(Math.abs(stored - run.energy().stored_J)).toBeLessThan(tolerance * gross);
    expect(Math.abs(net - run.energy().in_J)).toBeLessThan(tolerance * gross);
  });

  it('agrees for a held face, whose flux is the rate of the heat sent through it', () => {
    let net = 0;
    const plan = wall({
      layers,
      initial: 20,
      stages: [{ lasts: 900, start: { kind: 'temperature', temperature: course(20, [{ to: 400, duration: 600 }]) } }],
    });
    for (const settings of [
      { scheme: 'automatic' },
      { scheme: 'implicit', step: 1, grid: { nodes: 21 } },
    ] as Partial<Settings>[]) {
      net = 0;
      const run = createRun({ ...plan, settings: { ...plan.settings, ...settings } }, (step) => {
        net += heatIn(step).net;
      });
      toTheEnd(run);
      expect(net / run.energy().in_J).toBeCloseTo(1, 6);
    }
  });
});
