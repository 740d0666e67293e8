import { describe, expect, it } from 'vitest';
import type { Exposure, Warning } from '../../../solver/model';
import { createRun } from '../../../solver/stepping';
import { automatic, film, toTheEnd, wall, type StageSpec } from '../../support';

const plate = (length: number, surroundings: number): Exposure => ({
  kind: 'film',
  coefficient: { correlation: 'naturalPlateUp', fluid: 'air', length },
  surroundings,
});
const wind = (velocity: number, surroundings: number): Exposure => ({
  kind: 'film',
  coefficient: { correlation: 'forcedPlate', fluid: 'air', length: 2, velocity },
  surroundings,
});

function warningsOf(stages: StageSpec[]): Warning[] {
  const project = wall({
    layers: [{ thickness: 0.02, conductivity: 45, density: 7850, heatCapacity: 500 }],
    initial: 300,
    stages,
  });
  const run = createRun(automatic(1).under(project), () => undefined);
  expect(toTheEnd(run).reason).toBe('finished');
  return run.warnings().filter(({ code }) => code === 'correlation-range');
}

describe('a run with film correlations', () => {
  it('says nothing where they stay in their ranges', () => {
    expect(warningsOf([{ lasts: 600, start: plate(0.1, 20), end: wind(10, 20) }])).toEqual([]);
  });

  it('says once a face and stage how far one came out of its range, and what it is for', () => {
    const warnings = warningsOf([
      { lasts: 600, start: plate(0.005, 20), end: plate(0.1, 20) },
      { lasts: 600, start: plate(0.005, 20), end: film(10, 20) },
    ]);
    expect(warnings.map(({ place }) => place)).toEqual([
      'cycle.stages[0].exposures.start.coefficient',
      'cycle.stages[1].exposures.start.coefficient',
    ]);
    expect(warnings[0].message).toMatch(
      /^At the start face in stage Stage 0, Ra came to \d+; natural convection on a horizontal plate facing up \(.*Lloyd and Moran 1974\) holds for Ra from 10000 to 1e11\./,
    );
  });

  it('looks where the stage begins, before a step is taken', () => {
    // Once cooled the film temperature is inside the table again.
    const [warning, ...more] = warningsOf([{ lasts: 1, start: wind(10, 5000) }]);
    expect(more).toEqual([]);
    expect(warning.message).toContain('the film temperature came to 2650 °C');
    expect(warning.message).toContain('holds for film temperature from -50 to 2000 °C');
  });

  it('names large numbers by their power of ten', () => {
    const [warning] = warningsOf([{ lasts: 10, end: wind(2000, 20) }]);
    expect(warning.message).toMatch(/Re came to \d\.\d+e8; .* holds for Re up to 1e8\./);
  });
});
