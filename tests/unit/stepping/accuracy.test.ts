/** The automatic scheme keeps the accuracy it is asked for, with settings of its own choosing, at faces, interfaces and inside. */
import { describe, expect, it } from 'vitest';
import { stencilAt } from '../../../solver/grid';
import type { Exposure, Project, Settings } from '../../../solver/model';
import { createRun } from '../../../solver/stepping';
import {
  course,
  film,
  flux,
  held,
  heldFaceTheta,
  insulated,
  toTheEnd,
  wall,
  wallTheta,
  type LayerSpec,
  type WallSpec,
} from '../../support';

const steel: LayerSpec = { thickness: 0.01, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = { thickness: 0.1, conductivity: 1.2, density: 2000, heatCapacity: 900 };
const wool: LayerSpec = { thickness: 0.05, conductivity: 0.06, density: 120, heatCapacity: 1000 };
const filmOn = (coefficient: number, start: number, segments: { to: number; duration: number }[]): Exposure => ({
  kind: 'film',
  coefficient,
  surroundings: course(start, segments),
});

const OUTPUTS = 200;
const PLACES = [0, 0.13, 0.4, 0.75, 1];

/** Temperatures at places in every layer, both edges included, at equal times over the cycle. */
function sampled(project: Project): { rows: number[][]; closure: number; steps: number; volumes: number } {
  const rows: number[][] = [];
  const run = createRun(project, (step) => {
    for (;;) {
      const time = ((rows.length + 1) * run.cycle.end) / OUTPUTS;
      if (rows.length === OUTPUTS || time > step.to * (1 + 1e-12)) return;
      const fraction = Math.min(1, (time - step.from) / (step.to - step.from));
      rows.push(stencils.map(({ points, weights }) => step.combinationAt(points, weights, fraction)));
    }
  });
  let depth = 0;
  const stencils = project.part.layers.flatMap(({ thickness }, layer) => {
    const from = depth;
    depth += thickness;
    return PLACES.map((place) => stencilAt(run.points, from + place * thickness, layer));
  });
  expect(toTheEnd(run).reason).toBe('finished');
  const { steps, volumes } = run.figures();
  return { rows, closure: run.energy().closure, steps, volumes };
}

const worst = (found: number[][], expected: number[][]): number =>
  Math.max(...found.flatMap((row, i) => row.map((value, j) => Math.abs(value - expected[i][j]))));

const settled = (spec: WallSpec, settings: Partial<Settings>): Project => wall({ ...spec, settings });

const problems: [string, WallSpec][] = [
  [
    'a lining heated, held and cooled',
    {
      layers: [
        { thickness: 0.15, conductivity: 2.1, density: 2650, heatCapacity: 1050 },
        { thickness: 0.1, conductivity: 0.27, density: 800, heatCapacity: 980, contact: 2e-3 },
        { ...steel, thickness: 0.006 },
      ],
      initial: 20,
      stages: [
        {
          lasts: 28800,
          start: filmOn(25, 20, [
            { to: 1100, duration: 7200 },
            { to: 1100, duration: 7200 },
            { to: 100, duration: 7200 },
          ]),
          end: film(8, 25),
        },
      ],
    },
  ],
  [
    'a jump of a held face through three layers',
    { layers: [steel, brick, wool], initial: 20, stages: [{ lasts: 7200, start: held(500), end: held(20) }] },
  ],
  [
    'two layers with a contact under a step of the fluid',
    {
      layers: [
        { thickness: 0.02, conductivity: 160, density: 2700, heatCapacity: 900, contact: 5e-4 },
        { thickness: 0.012, conductivity: 0.25, density: 1200, heatCapacity: 1300 },
      ],
      initial: 20,
      stages: [{ lasts: 3600, start: film(400, 180), end: film(15, 20) }],
    },
  ],
  [
    'a thick wall under a slow course',
    {
      layers: [{ thickness: 0.6, conductivity: 1.7, density: 2350, heatCapacity: 950 }],
      initial: 20,
      stages: [
        {
          lasts: 345600,
          start: filmOn(15, 20, [
            { to: 80, duration: 36000 },
            { to: 80, duration: 144000 },
            { to: 20, duration: 36000 },
          ]),
          end: film(5, 20),
        },
      ],
    },
  ],
  ['a pulse of flux', { layers: [brick], initial: 20, stages: [{ lasts: 600, start: flux(5000) }, { lasts: 3000 }] }],
  [
    'a quench, then still air',
    {
      layers: [{ ...steel, thickness: 0.04 }],
      initial: 850,
      stages: [
        { lasts: 60, start: film(4000, 40), end: film(4000, 40) },
        { lasts: 600, start: film(20, 20), end: film(20, 20) },
      ],
    },
  ],
  [
    'films that jump in the middle of the cycle',
    {
      layers: [brick],
      initial: 20,
      stages: [
        { lasts: 3600, start: film(30, 300) },
        { lasts: 1800, start: film(300, 20) },
        { lasts: 3600, start: film(10, 300), end: film(10, 20) },
      ],
    },
  ],
  [
    'a film coefficient on a ramp that jumps back within its stage',
    {
      layers: [{ ...steel, thickness: 0.03 }],
      initial: 20,
      stages: [
        {
          lasts: 3600,
          start: {
            kind: 'film',
            coefficient: course(10, [{ to: 300, duration: 1200 }, { hold: 600 }, { to: 20, duration: 0 }]),
            surroundings: course(20, [{ to: 600, duration: 1800 }]),
          },
        },
      ],
    },
  ],
  [
    'two bodies brought into contact',
    { layers: [{ ...steel, thickness: 0.05 }, brick], initial: [500, 20], stages: [{ lasts: 1800 }] },
  ],
  [
    'two bodies with a contact resistance',
    { layers: [{ ...steel, thickness: 0.05, contact: 1e-3 }, brick], initial: [500, 20], stages: [{ lasts: 1800 }] },
  ],
  [
    'very thin layers between thick ones',
    {
      layers: [
        { ...steel, thickness: 0.003 },
        { thickness: 0.0002, conductivity: 0.2, density: 1200, heatCapacity: 1500, contact: 1e-4 },
        { thickness: 0.02, conductivity: 200, density: 2700, heatCapacity: 900 },
        { ...wool, thickness: 1e-5 },
        wool,
      ],
      initial: 20,
      stages: [
        {
          lasts: 7200,
          start: filmOn(200, 20, [
            { to: 180, duration: 600 },
            { to: 180, duration: 3000 },
            { to: 40, duration: 100 },
          ]),
          end: film(8, 20),
        },
      ],
    },
  ],
  [
    'a held face on a ramp, then let go',
    {
      layers: [{ ...brick, thickness: 0.05 }, wool],
      initial: 20,
      stages: [
        { lasts: 3600, start: { kind: 'temperature', temperature: course(20, [{ to: 800, duration: 3000 }]) }, end: film(8, 20) },
        { lasts: 3600, start: insulated, end: film(8, 20) },
      ],
    },
  ],
];

describe.each(problems)('%s', (_, spec) => {
  const reference = sampled(settled(spec, { accuracy: 5e-4 })).rows;

  it.each([10, 1, 0.1, 0.01])('is within the %f K asked for, of a solution that is far finer', (accuracy) => {
    const { rows, closure, steps } = sampled(settled(spec, { accuracy }));
    expect(worst(rows, reference)).toBeLessThan(accuracy);
    expect(closure).toBeLessThan(1e-12);
    expect(steps).toBeLessThan(250);
  });
});

describe('a solution that is far finer', () => {
  it.each([problems[0], problems[6], problems[11]])('is that of another scheme on another grid as well: %s', (_, spec) => {
    const automatic = sampled(settled(spec, { accuracy: 5e-4 })).rows;
    const end = spec.stages.reduce((sum, stage) => sum + stage.lasts, 0);
    const other = sampled(settled(spec, { scheme: 'crankNicolson', step: end / 6000, grid: { cells: 160 } })).rows;
    expect(worst(automatic, other)).toBeLessThan(0.06);
  });
});

describe('the automatic scheme against exact solutions', () => {
  it.each([1, 0.1, 0.01])('a wall in a fluid, asked for %f K', (accuracy) => {
    const [h, thickness] = [50, 0.1];
    const biot = (h * thickness) / 1.2;
    const alpha = 1.2 / (2000 * 900);
    const { rows } = sampled(
      settled({ layers: [brick], initial: 20, stages: [{ lasts: 7200, end: film(h, 500) }] }, { accuracy }),
    );
    const exact = rows.map((_row, i) => {
      const fourier = (alpha * 7200 * (i + 1)) / OUTPUTS / thickness ** 2;
      return PLACES.map((place) => 500 - 480 * wallTheta(biot, fourier, place));
    });
    expect(worst(rows.slice(4), exact.slice(4))).toBeLessThan(accuracy);
  });

  it.each([1, 0.1, 0.01])('a half space whose face is held, asked for %f K', (accuracy) => {
    const depth = 0.5;
    const { rows } = sampled(
      settled(
        { layers: [{ ...brick, thickness: depth }], initial: 20, stages: [{ lasts: 3600, start: held(500) }] },
        { accuracy },
      ),
    );
    const solid = { conductivity: 1.2, diffusivity: 1.2 / (2000 * 900) };
    const exact = rows.map((_row, i) =>
      PLACES.map((place) => 20 + 480 * heldFaceTheta(place * depth, (3600 * (i + 1)) / OUTPUTS, solid)),
    );
    expect(worst(rows, exact)).toBeLessThan(accuracy);
  });

  it('work grows by no more than three times a decade of accuracy', () => {
    const work = [1, 0.1, 0.01].map((accuracy) => {
      const { steps, volumes } = sampled(settled(problems[0][1], { accuracy }));
      return steps * volumes;
    });
    expect(work[1] / work[0]).toBeLessThan(3.5);
    expect(work[2] / work[1]).toBeLessThan(3.5);
  });
});
