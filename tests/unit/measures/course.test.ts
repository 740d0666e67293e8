import { describe, expect, it } from 'vitest';
import { Course } from '../../../solver/measures/course';
import { quarticThrough } from '../../../solver/measures/quartic';

const QUARTERS = [0, 0.25, 0.5, 0.75, 1];
const courseOf = (f: (u: number) => number): Course => {
  const [a, b, c, d, e] = QUARTERS.map(f);
  return Course.through(a, b, c, d, e);
};
const whole = { from: 0, to: 1 };

describe('a course over a step', () => {
  it('holds between its two crossings, though both ends lie on the wrong side', () => {
    const course = courseOf((u) => 100 - 80 * (u - 0.4) ** 2);
    const [stretch, ...more] = course.holds({ sense: 'atLeast', limit: 99.2 }, whole);
    expect(more).toEqual([]);
    expect(stretch.from).toBeCloseTo(0.3, 10);
    expect(stretch.to).toBeCloseTo(0.5, 10);
  });

  it('does not miss a touch: reaching a limit exactly at a turning point counts', () => {
    const course = courseOf((u) => 100 - 80 * (u - 0.4) ** 2);
    const touches = course.holds({ sense: 'atLeast', limit: 100 }, whole);
    expect(touches).toHaveLength(1);
    expect(touches[0].from).toBeCloseTo(0.4, 4);
    expect(course.holds({ sense: 'atLeast', limit: 100.0001 }, whole)).toEqual([]);
  });

  it('holds everywhere when it equals the limit all the time', () => {
    expect(courseOf(() => 80).holds({ sense: 'atMost', limit: 80 }, whole)).toEqual([whole]);
    expect(courseOf(() => 80).holds({ sense: 'atLeast', limit: 80 }, whole)).toEqual([whole]);
  });

  it('holds twice when a dip lies between', () => {
    const stretches = courseOf((u) => (u - 0.5) ** 2).holds({ sense: 'atLeast', limit: 0.04 }, whole);
    expect(stretches.map(({ from, to }) => [from, to].map((u) => Number(u.toFixed(9))))).toEqual([
      [0, 0.3],
      [0.7, 1],
    ]);
  });

  it('is looked at only where asked', () => {
    const course = courseOf((u) => 10 * u);
    expect(course.holds({ sense: 'atLeast', limit: 5 }, { from: 0, to: 0.4 })).toEqual([]);
    expect(course.holds({ sense: 'atLeast', limit: 5 }, { from: 0.6, to: 0.8 })).toEqual([{ from: 0.6, to: 0.8 }]);
    expect(course.holds({ sense: 'atLeast', limit: 5 }, { from: 1, to: 1 })).toEqual([{ from: 1, to: 1 }]);
    expect(course.samplesIn({ from: 0.25, to: 0.5 }).map(({ value }) => value)).toEqual([2.5, 5]);
  });

  it('passes over the joints of its pieces', () => {
    const rising = quarticThrough(0, 0.25, 0.5, 0.75, 1);
    const falling = quarticThrough(1, 0.75, 0.5, 0.25, 0);
    const tent = new Course([
      { from: 0, to: 0.5, shape: rising },
      { from: 0.5, to: 1, shape: falling },
    ]);
    expect(tent.at(0.5)).toBe(1);
    const [stretch, ...more] = tent.holds({ sense: 'atLeast', limit: 0.5 }, whole);
    expect(more).toEqual([]);
    expect(stretch.from).toBeCloseTo(0.25, 12);
    expect(stretch.to).toBeCloseTo(0.75, 12);
    expect(tent.samples().map(({ fraction }) => fraction)).toEqual([0, 0.5, 1]);
  });
});
