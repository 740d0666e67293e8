/** Plans with tiny and huge numbers: solved, or refused with a reason; never thrown, never endless. */
import { describe, expect, it } from 'vitest';
import type { Exposure, Project, Settings } from '../../../solver/model';
import { createRun, OUTCOMES, succeeded } from '../../../solver/stepping';
import { film, flux, held, toTheEnd, wall, type LayerSpec } from '../../support';

const steel: LayerSpec = { thickness: 0.01, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = { thickness: 0.1, conductivity: 1.2, density: 2000, heatCapacity: 900 };

interface Absurd {
  layers?: LayerSpec[];
  initial?: number;
  lasts?: number;
  start?: Exposure;
  settings?: Partial<Settings>;
}
const planOf = ({ layers, initial, lasts, start, settings }: Absurd): Project =>
  wall({
    layers: layers ?? [brick],
    initial: initial ?? 20,
    stages: [{ lasts: lasts ?? 3600, start: start ?? film(20, 500), end: film(10, 20) }],
    settings,
  });

/** Runs to the end, whatever that is, in a bounded number of steps. */
function endOf(absurd: Absurd) {
  let finite = true;
  const run = createRun(planOf(absurd), (step) => {
    finite &&= step.after.every(Number.isFinite);
  });
  const outcome = toTheEnd(run);
  return {
    outcome,
    finite,
    steps: run.figures().steps,
    energy: run.energy(),
    stability: run.stability,
    warnings: run.warnings(),
  };
}

describe('absurd plans that are solved', () => {
  it.each<[string, Absurd]>([
    ['a foil of 10 µm on brick', { layers: [{ ...steel, thickness: 1e-5 }, brick] }],
    ['a film of 1 nm between thick layers', { layers: [brick, { ...steel, thickness: 1e-9 }, brick] }],
    ['a kilometre of brick', { layers: [{ ...brick, thickness: 1000 }] }],
    ['a conductivity of 1e6', { layers: [{ ...steel, conductivity: 1e6 }, brick] }],
    ['a conductivity of 1e-6', { layers: [{ ...steel, conductivity: 1e-6 }, brick] }],
    ['a heavy layer', { layers: [{ ...steel, density: 1e9 }, brick] }],
    ['a contact of 1e9', { layers: [{ ...steel, contact: 1e9 }, brick] }],
    ['a contact of 1e-12', { layers: [{ ...steel, contact: 1e-12 }, brick] }],
    ['a film coefficient of 1e9', { start: film(1e9, 500) }],
    ['a film coefficient of 0', { start: film(0, 500) }],
    ['surroundings of a million degrees', { start: film(20, 1e6) }],
    ['a flux of a gigawatt', { start: flux(1e9) }],
    ['a stage of a nanosecond', { lasts: 1e-9 }],
    ['a stage of thirty thousand years', { lasts: 1e12 }],
    ['an accuracy of 1e-12 K', { settings: { accuracy: 1e-12 } }],
    ['an accuracy of 100 K', { settings: { accuracy: 100 } }],
    ['a held jump in a micrometre', { layers: [{ ...steel, thickness: 1e-6 }], start: held(500) }],
    ['a step far longer than the cycle', { settings: { scheme: 'implicit', step: 1e15 } }],
    ['two nodes', { settings: { scheme: 'crankNicolson', step: 60, grid: { nodes: 2 } } }],
    ['two nodes, automatic', { settings: { grid: { nodes: 2 } } }],
  ])('%s', (_, absurd) => {
    const { outcome, finite, steps, energy } = endOf(absurd);
    expect(outcome.reason).toBe('finished');
    expect(finite).toBe(true);
    expect(steps).toBeLessThan(3000);
    expect(energy.closure).toBeLessThan(1e-9);
  });
});

describe('absurd plans that are refused', () => {
  it.each<[string, Absurd, string, string]>([
    [
      'a thickness below the smallest numbers',
      { layers: [{ ...brick, thickness: 1e-320 }] },
      'invalid-project',
      'too small or too large',
    ],
    [
      'a layer lost beside another',
      {
        layers: [
          { ...brick, thickness: 1e9 },
          { ...steel, thickness: 1e-9 },
        ],
      },
      'invalid-project',
      'Layer 1',
    ],
    [
      'a density beyond all numbers',
      { layers: [{ ...steel, density: 1e300, heatCapacity: 1e300 }] },
      'invalid-project',
      'Layer 0',
    ],
    ['a conductivity beyond all numbers', { layers: [{ ...steel, conductivity: 1e308 }] }, 'invalid-project', 'Layer 0'],
    [
      'millions of nodes',
      { layers: [brick, brick, brick], settings: { grid: { nodes: 100000 } } },
      'invalid-project',
      '300000 nodes',
    ],
    ['a step of a nanosecond', { settings: { scheme: 'implicit', step: 1e-9 } }, 'too-many-steps', 'Take a longer step'],
    [
      'an explicit step of an hour',
      { settings: { scheme: 'explicit', step: 3600, grid: { nodes: 11 } } },
      'step-above-limit',
      'stability limit',
    ],
  ])('%s', (_, absurd, reason, words) => {
    const { outcome, steps } = endOf(absurd);
    expect(outcome.reason).toBe(reason);
    expect(outcome.message).toContain(words);
    expect(steps).toBe(0);
    expect(succeeded(outcome)).toBe(false);
  });

  it.each<[string, Absurd]>([
    ['a film beyond all numbers', { start: film(1e300, 1e300) }],
    ['a flux beyond all numbers', { start: flux(1e308) }],
    ['a fluid at 1e308 °C', { start: film(1e3, 1e308), settings: { scheme: 'implicit', step: 60 } }],
  ])('%s: an outcome, with the place and the time', (_, absurd) => {
    const { outcome } = endOf(absurd);
    expect(['not-finite', 'step-too-small', 'invalid-project']).toContain(outcome.reason);
    expect(outcome.message).toMatch(/layer|Layer/);
  });
});

describe('what is said of a run', () => {
  it('has an entry for every outcome, and finished alone is a success', () => {
    const successes = Object.entries(OUTCOMES).filter(([, { success }]) => success);
    expect(successes.map(([reason]) => reason)).toEqual(['finished']);
    for (const { success, causes, whatToDo, meaning } of Object.values(OUTCOMES)) {
      expect(meaning.endsWith('.') && whatToDo.endsWith('.')).toBe(true);
      expect(success || causes.length > 0).toBe(true);
    }
  });

  const codes = (absurd: Absurd): string[] => endOf(absurd).warnings.map((warning) => warning.code);

  it('warns of an accuracy in the rounding of the numbers, and says which was used', () => {
    expect(codes({ settings: { accuracy: 1e-12 } })).toEqual(['accuracy-limited']);
    expect(codes({ settings: { accuracy: 0.01 } })).toEqual([]);
  });

  it('warns of a step that is long beside a piece of the cycle', () => {
    const settings: Partial<Settings> = { scheme: 'implicit', grid: { nodes: 4 } };
    expect(codes({ lasts: 100, settings: { ...settings, step: 60 } })).toEqual(['few-steps']);
    expect(codes({ lasts: 100, settings: { ...settings, step: 50 } })).toEqual([]);
  });

  it('warns of an explicit step that is stable and can overshoot', () => {
    const settings: Partial<Settings> = { scheme: 'explicit', grid: { nodes: 4 } };
    const of = (step: number): Absurd => ({ start: film(2000, 500), lasts: 600, settings: { ...settings, step } });
    const { stability } = endOf(of(1));
    const [stable, smooth] = [stability?.explicit_limit_s ?? 0, stability?.no_overshoot_s ?? 0];
    expect(smooth).toBeLessThan(0.9 * stable);
    expect(codes(of(0.95 * stable))).toEqual(['overshoot']);
    expect(codes(of(0.95 * smooth))).toEqual([]);
  });
});

describe('Crank–Nicolson after a jump', () => {
  const quench = (dampedSteps: number, step: number): Absurd => ({
    layers: [{ ...steel, thickness: 0.02 }],
    initial: 800,
    lasts: 60,
    start: held(20),
    settings: { scheme: 'crankNicolson', step, dampedSteps, grid: { nodes: 41 } },
  });

  /** How often the node next to the quenched face turns round. */
  function turns(absurd: Absurd): number {
    const course: number[] = [];
    const run = createRun(planOf(absurd), (step) => course.push(step.after[1]));
    toTheEnd(run);
    const slopes = course.slice(1).map((value, i) => value - course[i]);
    return slopes.slice(1).filter((slope, i) => slope * slopes[i] < 0).length;
  }

  it('rings at a long step without damped steps, and says so', () => {
    expect(turns(quench(0, 2))).toBeGreaterThan(10);
    const { warnings } = endOf(quench(0, 2));
    expect(warnings).toMatchObject([{ code: 'ringing', place: 'settings.dampedSteps' }]);
    expect(warnings[0].message).toMatch(/^Crank–Nicolson, 2 s, without damped steps: temperatures can ring/);
  });

  it('does not ring with its damped start, nor warn', () => {
    expect(turns(quench(4, 2))).toBe(0);
    expect(endOf(quench(4, 2)).warnings).toEqual([]);
  });

  it('does not ring at a step below the limit of the explicit scheme, nor warn', () => {
    expect(turns(quench(0, 0.005))).toBe(0);
    expect(endOf(quench(0, 0.005)).warnings).toEqual([]);
  });
});
