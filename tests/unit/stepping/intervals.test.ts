import { describe, expect, it } from 'vitest';
import { layCycle, type Exposure } from '../../../solver/model';
import { intervalsOf } from '../../../solver/stepping/intervals';
import { depth, roundedDown, seconds } from '../../../solver/stepping/words';
import { course, film, flux, held, insulated, wall, type StageSpec } from '../../support';

const of = (stages: StageSpec[]) =>
  intervalsOf(layCycle(wall({ layers: [{ thickness: 1, conductivity: 1, density: 1, heatCapacity: 1 }], initial: 20, stages })));
const table = (stages: StageSpec[]): [number, number, number, boolean][] =>
  of(stages).map(({ stage, from, to, jumped }) => [stage, from, to, jumped]);
const filmWith = (more: object): Exposure => ({ ...film(10, 20), ...more }) as Exposure;

describe('the intervals of a cycle', () => {
  it('are cut at stage edges and at kinks of either face, and begin with a jump at the start', () => {
    const start = filmWith({ surroundings: course(20, [{ to: 100, duration: 30 }]) });
    const end: Exposure = { kind: 'flux', flux: course(0, [{ to: 5, duration: 50 }]) };
    expect(
      table([
        { lasts: 100, start, end },
        { lasts: 20, start: filmWith({ surroundings: 100 }), end: flux(5) },
      ]),
    ).toEqual([
      [0, 0, 30, true],
      [0, 30, 50, false],
      [0, 50, 100, false],
      [1, 100, 120, false],
    ]);
  });

  it('begin with a jump where a schedule jumps inside a stage', () => {
    const start = filmWith({ coefficient: course(10, [{ hold: 40 }, { to: 90, duration: 0 }, { hold: 10 }]) });
    expect(table([{ lasts: 100, start }])).toEqual([
      [0, 0, 40, true],
      [0, 40, 50, true],
      [0, 50, 100, false],
    ]);
  });

  it.each<[string, Exposure, Exposure, boolean]>([
    ['the same film', film(10, 20), film(10, 20), false],
    ['another coefficient', film(10, 20), film(11, 20), true],
    ['another fluid', film(10, 20), film(10, 21), true],
    ['another kind', film(10, 20), held(20), true],
    [
      'a held temperature that carries on',
      held(50),
      { kind: 'temperature', temperature: course(50, [{ to: 80, duration: 5 }]) },
      false,
    ],
    ['insulation, as before', insulated, insulated, false],
  ])('between stages jump or not: %s', (_, before, after, jumped) => {
    const found = of([
      { lasts: 10, start: before },
      { lasts: 10, start: after },
    ]).find(({ stage }) => stage === 1);
    expect(found?.jumped).toBe(jumped);
  });
});

describe('figures in messages', () => {
  it('have three digits, millimetres below a metre', () => {
    expect([depth(0.0123456), depth(0.5), depth(2.3456), seconds(0.41987)]).toEqual(['12.3 mm', '500 mm', '2.35 m', '0.42 s']);
  });

  it.each([
    [0.4198, 0.41],
    [0.42, 0.42],
    [1, 1],
    [0.0999, 0.099],
    [123.4, 120],
    [1e-7, 1e-7],
    [9.99e9, 9.9e9],
  ])('round %f down to %f, two digits and never above', (value, expected) => {
    expect(roundedDown(value)).toBe(expected);
    expect(roundedDown(value)).toBeLessThanOrEqual(value);
  });
});
