import { describe, expect, it } from 'vitest';
import {
  layCycle,
  lineAt,
  newProject,
  rampDuration,
  type Cycle,
  type Exposure,
  type Line,
  type Ramp,
  type Stage,
} from '../../../solver/model';

const insulated: Exposure = { kind: 'insulated' };
const follow = { follow: 'setPoint' as const, offset: 0 };

/** A stage; an hour long and insulated unless told otherwise. */
const stage = (more: Partial<Stage> & { id: string }): Stage => ({
  name: more.id,
  end: { after: 3600 },
  exposures: { start: insulated, end: insulated },
  ...more,
});
const facing = (start: Exposure, end: Exposure = insulated): Stage['exposures'] => ({ start, end });

function lay(stages: Stage[], start = 20) {
  const cycle: Cycle = { setPoint: { name: 'Set-point', start }, stages };
  return layCycle({ ...newProject(), cycle });
}
const points = (line: Line): [number, number][] => line.time.map((time, index) => [time, line.value[index]]);

describe('a line', () => {
  const line: Line = { time: [10, 20, 20, 30], value: [0, 100, 40, 40] };
  it.each([
    ['before its first point it holds the first value', 0, 0, 0],
    ['at its first point', 10, 0, 0],
    ['between two points it is straight', 15, 50, 50],
    ['at a jump it has two values', 20, 100, 40],
    ['after the jump it goes on', 25, 40, 40],
    ['after its last point it holds the last value', 99, 40, 40],
  ])('%s', (_, time, before, after) => {
    expect(lineAt(line, time, 'before')).toBe(before);
    expect(lineAt(line, time, 'after')).toBe(after);
    expect(lineAt(line, time)).toBe(after);
  });

  it('of two points at one time is a jump from the very start', () => {
    const jump: Line = { time: [0, 0], value: [20, 90] };
    expect([lineAt(jump, 0, 'before'), lineAt(jump, 0), lineAt(jump, 5)]).toEqual([20, 90, 90]);
  });
});

describe('how long a ramp lasts', () => {
  it.each<[string, Ramp, number, number]>([
    ['by its rate, up', { segments: [{ to: 120, rate: 0.5 }] }, 20, 200],
    ['by its rate, down', { segments: [{ to: 20, rate: 0.5 }] }, 120, 200],
    ['by its duration', { segments: [{ to: 500, duration: 90 }] }, 20, 90],
    ['with holds', { segments: [{ to: 120, rate: 1 }, { hold: 50 }, { to: 20, rate: 2 }] }, 20, 100 + 50 + 50],
    ['from its own start', { start: 100, segments: [{ to: 120, rate: 1 }] }, 20, 20],
    ['a jump lasts no time', { segments: [{ to: 500, duration: 0 }, { hold: 5 }] }, 20, 5],
    ['a ramp to where it is lasts no time', { segments: [{ to: 20, rate: 1 }] }, 20, 0],
    ['nothing lasts no time', { segments: [] }, 20, 0],
  ])('%s', (_, ramp, start, length) => expect(rampDuration(ramp, start)).toBe(length));
});

describe('a cycle on the time axis', () => {
  it('puts stages one after the other, on cycle time', () => {
    const laid = lay([stage({ id: 'a' }), stage({ id: 'b', end: { after: 60 } }), stage({ id: 'c', end: { after: 1 } })]);
    expect(laid.stages.map(({ id, start, end }) => [id, start, end])).toEqual([
      ['a', 0, 3600],
      ['b', 3600, 3660],
      ['c', 3660, 3661],
    ]);
    expect(laid.end).toBe(3661);
  });

  it('carries the set-point on over stages: what has no segments holds the last value', () => {
    const laid = lay([
      stage({ id: 'up', setPoint: { segments: [{ to: 120, duration: 600 }] } }),
      stage({ id: 'hold' }),
      stage({ id: 'down', end: { after: 100 }, setPoint: { segments: [{ to: 20, rate: 1 }] } }),
    ]);
    expect(points(laid.stages[0].setPoint)).toEqual([[0, 20], [600, 120], [3600, 120]]); // prettier-ignore
    expect(points(laid.stages[1].setPoint)).toEqual([[3600, 120], [7200, 120]]); // prettier-ignore
    expect(points(laid.stages[2].setPoint)).toEqual([[7200, 120], [7300, 20]]); // prettier-ignore
    expect(lineAt(laid.setPoint, 7250)).toBe(70);
    expect(lineAt(laid.setPoint, 300)).toBe(70);
  });

  it('cuts a schedule at the end of its stage; the next one starts from where it was cut', () => {
    const laid = lay([
      stage({ id: 'short', end: { after: 30 }, setPoint: { segments: [{ to: 120, duration: 100 }] } }),
      stage({ id: 'next', setPoint: { segments: [{ to: 60, rate: 1 }] } }),
    ]);
    expect(points(laid.stages[0].setPoint)).toEqual([[0, 20], [30, 50]]); // prettier-ignore
    expect(points(laid.stages[1].setPoint)).toEqual([[30, 50], [40, 60], [3630, 60]]); // prettier-ignore
  });

  it('lets the set-point jump where a stage gives its own start', () => {
    const laid = lay([stage({ id: 'a' }), stage({ id: 'b', setPoint: { start: 200, segments: [] } })]);
    expect(lineAt(laid.setPoint, 3600, 'before')).toBe(20);
    expect(lineAt(laid.setPoint, 3600, 'after')).toBe(200);
  });

  it('ends a stage at target: when the longest of all its schedules is done', () => {
    const done = { whenScheduleDone: true as const };
    const own: Exposure = { kind: 'flux', flux: { start: 0, segments: [{ to: 900, duration: 700 }] } };
    const laid = lay([
      stage({ id: 'a', end: done, setPoint: { segments: [{ to: 120, rate: 0.5 }] } }),
      stage({ id: 'b', end: done, setPoint: { segments: [{ to: 220, rate: 0.5 }] }, exposures: facing(insulated, own) }),
    ]);
    expect(laid.stages.map(({ end }) => end)).toEqual([200, 900]);
    expect(points(laid.stages[1].setPoint)).toEqual([[200, 120], [400, 220], [900, 220]]); // prettier-ignore
  });

  it('lets exposures follow the set-point, with an offset in K', () => {
    const exposure: Exposure = { kind: 'film', coefficient: 25, surroundings: { follow: 'setPoint', offset: -6 } };
    const laid = lay([stage({ id: 'a', setPoint: { segments: [{ to: 120, duration: 600 }] }, exposures: facing(exposure) })]);
    const film = laid.stages[0].exposures.start;
    expect(film.kind === 'film' && points(film.surroundings)).toEqual([[0, 14], [600, 114], [3600, 114]]); // prettier-ignore
    expect(film.kind === 'film' && points(film.coefficient)).toEqual([[0, 25], [3600, 25]]); // prettier-ignore
  });

  it("carries a face's own schedule on from the same quantity of the same face, over stages of another kind", () => {
    const ramp = (to: number, start?: number): Ramp => ({
      ...(start === undefined ? {} : { start }),
      segments: [{ to, duration: 100 }],
    });
    const laid = lay([
      stage({ id: 'a', exposures: facing({ kind: 'temperature', temperature: ramp(300, 20) }, { kind: 'temperature', temperature: 55 }) }),
      stage({ id: 'b', exposures: facing({ kind: 'film', coefficient: 10, surroundings: 40 }, insulated) }),
      stage({ id: 'c', exposures: facing({ kind: 'temperature', temperature: ramp(80) }, { kind: 'film', coefficient: 5, surroundings: ramp(0, 9) }) }),
      stage({ id: 'd', exposures: facing({ kind: 'film', coefficient: ramp(50), surroundings: ramp(90) }, insulated) }),
    ]); // prettier-ignore
    const [, , c, d] = laid.stages;
    expect(c.exposures.start.kind === 'temperature' && points(c.exposures.start.temperature)[0]).toEqual([7200, 300]);
    expect(d.exposures.start.kind === 'film' && points(d.exposures.start.coefficient)[0]).toEqual([10800, 10]);
    expect(d.exposures.start.kind === 'film' && points(d.exposures.start.surroundings)[0]).toEqual([10800, 40]);
  });

  it('follows a jump of the set-point in the middle of a stage', () => {
    const setPoint: Ramp = { segments: [{ hold: 100 }, { to: 90, duration: 0 }, { hold: 50 }] };
    const laid = lay([stage({ id: 'a', setPoint, exposures: facing({ kind: 'temperature', temperature: follow }) })]);
    const face = laid.stages[0].exposures.start;
    const line = face.kind === 'temperature' ? face.temperature : { time: [], value: [] };
    expect([lineAt(line, 100, 'before'), lineAt(line, 100, 'after'), lineAt(line, 3600)]).toEqual([20, 90, 90]);
    expect(line.time).toEqual([...line.time].sort((a, b) => a - b));
  });

  it('throws for a schedule that cannot know its start, which crossCheck would have found', () => {
    const exposure: Exposure = { kind: 'flux', flux: { segments: [{ to: 5, duration: 1 }] } };
    expect(() => lay([stage({ id: 'a', exposures: facing(exposure) })])).toThrow(RangeError);
  });
});
