/**
 * A temperature made up beforehand, T = 500 + 150 sin(20 x) (1 + t/1000), and the source and the enclosures that make it true:
 * what is found then has an exact error, with radiating faces and a source that follows place, time and temperature.
 */
import { describe, expect, it } from 'vitest';
import type { Exposure, Part, Project, Settings } from '../../solver/model';
import { expectOrder, solved, wall } from '../support';

const THICKNESS = 0.1; // m
const CONDUCTIVITY = 1; // W/(m·K)
const CAPACITY = 1e6; // J/(m³·K)
const END = 500; // s
const exact = (x: number, t: number): number => 500 + 150 * Math.sin(20 * x) * (1 + t / 1000);

const SIGMA = 5.670374419e-8;
/** An enclosure from which a face at the exact temperature takes the exact flux, by expressions of t. */
const enclosureFor = (temperature: string, flux: string): Exposure => ({
  kind: 'radiation',
  emissivity: 0.8,
  enclosure: { expression: `pow((${temperature} + 273.15)^4 + (${flux})/(0.8*${SIGMA}), 0.25) - 273.15` },
});

/** The part; curvature gives the source of a cylinder another term, k/r dT/dr, with r = 0.05 m + x. */
function made(kind: Part['kind'], settings: Partial<Settings>): Project {
  const curvature = kind === 'wall' ? '' : ` - ${CONDUCTIVITY}*3000*cos(20*x)*(1 + t/1000)/(0.05 + x)`;
  const power =
    `${CAPACITY}*0.15*sin(20*x) + ${CONDUCTIVITY}*60000*sin(20*x)*(1 + t/1000)${curvature}` +
    // Nothing where the temperature is the exact one, and a pull towards it or away from it elsewhere.
    ` + 2e3*(T - 500 - 150*sin(20*x)*(1 + t/1000))`;
  const slopeAtEnd = 3000 * Math.cos(20 * THICKNESS);
  return wall({
    kind,
    innerRadius: kind === 'wall' ? 0 : 0.05,
    layers: [{ thickness: THICKNESS, conductivity: CONDUCTIVITY, density: 1000, heatCapacity: CAPACITY / 1000 }],
    initial: 500,
    stages: [
      {
        lasts: END,
        start: enclosureFor('500', '-3000*(1 + t/1000)'),
        end: enclosureFor(`500 + 150*${Math.sin(20 * THICKNESS)}*(1 + t/1000)`, `${slopeAtEnd}*(1 + t/1000)`),
        sources: [{ layer: 'l0', power: { expression: power } }],
      },
    ],
    settings,
  });
}

/** The same, started from the exact profile at time 0. */
function started(project: Project): Project {
  const profile = Array.from({ length: 200 }, (_, i): [number, number] => {
    const x = (i / 199) * THICKNESS;
    return [x, exact(x, 0)];
  });
  return { ...project, initial: { profile } };
}

const depths = [0, 0.013, 0.037, 0.05, 0.081, THICKNESS];

/** Largest error at the end of the cycle, K. */
function errorOf(kind: Part['kind'], settings: Partial<Settings>): number {
  const [profile] = solved(started(made(kind, settings)), [END]).profiles;
  return Math.max(...depths.map((x) => Math.abs(profile(x) - exact(x, END))));
}

describe.each(['wall', 'cylinder'] as const)('a %s with radiating faces and a source', (kind) => {
  it.each([1, 0.1, 0.01])('is met within the accuracy asked for: %d K', (accuracy) => {
    expect(errorOf(kind, { scheme: 'automatic', accuracy, grid: 'automatic' })).toBeLessThan(accuracy);
  });

  it('is met to fourth order in space by the automatic scheme', () => {
    const nodes = [9, 17, 33];
    const errors = nodes.map((count) => errorOf(kind, { scheme: 'automatic', accuracy: 1e-6, grid: { nodes: count } }));
    expectOrder(4, [8, 16, 32], errors, 0.6);
  });

  it.each(['nodes', 'cells'] as const)('is met to second order in space with plain volumes: %s', (grid) => {
    const counts = [10, 20, 40];
    const errors = counts.map((count) =>
      errorOf(kind, {
        scheme: 'crankNicolson',
        step: 0.5,
        grid: grid === 'nodes' ? { nodes: count + 1 } : { cells: count },
      }),
    );
    expectOrder(2, counts, errors, 0.3);
  });
});
