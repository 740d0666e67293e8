import { describe, expect, it } from 'vitest';
import { timeTicks } from '../../../app/draw';

const hours = (n: number): number => n * 3600;
const labels = (from: number, to: number, width: number): string[] => timeTicks(from, to, width).major.map((tick) => tick.label);

describe('timeTicks', () => {
  it('counts a cycle of days in hours, whole days strong and with their unit', () => {
    const ticks = timeTicks(0, hours(60), 1150);
    expect(ticks.unit).toBe('h');
    expect(ticks.major.map((tick) => tick.label)).toEqual(['0', '6', '12', '18', '24 h', '30', '36', '42', '48 h', '54', '60']);
    expect(ticks.major.filter((tick) => tick.strong).map((tick) => tick.time)).toEqual([hours(24), hours(48)]);
  });

  it('puts a small tick at every hour between ticks of 6 h', () => {
    const { minor } = timeTicks(0, hours(60), 1150);
    expect(minor.slice(0, 6)).toEqual([1, 2, 3, 4, 5, 7].map(hours));
  });

  it('counts a quench in seconds and half an hour in minutes', () => {
    expect(labels(0, 20, 600)).toEqual(['0', '2', '4', '6', '8', '10', '12', '14', '16', '18', '20']);
    expect(timeTicks(0, 1800, 600).unit).toBe('min');
    expect(labels(0, 1800, 600)).toEqual(['0', '5', '10', '15', '20', '25', '30']);
  });

  it('spells the time out where plain minutes would be long numbers', () => {
    const ticks = timeTicks(hours(38), hours(39), 700);
    expect(ticks.unit).toBeNull();
    expect(ticks.major.map((tick) => tick.label)).toEqual([
      '38 h',
      '38 h 10 min',
      '38 h 20 min',
      '38 h 30 min',
      '38 h 40 min',
      '38 h 50 min',
      '39 h',
    ]);
  });

  it('steps below a second and above a week where the axis asks for it', () => {
    expect(labels(0, 1, 500)).toEqual(['0', '0.1', '0.2', '0.3', '0.4', '0.5', '0.6', '0.7', '0.8', '0.9', '1']);
    expect(timeTicks(0, 86400 * 200, 500)).toMatchObject({ unit: 'd' });
    expect(labels(0, 86400 * 200, 500).length).toBeLessThan(12);
  });

  it('keeps labels apart at any zoom', () => {
    for (let span = 0.5; span < 1e8; span *= 2.3) {
      const { major } = timeTicks(0, span, 900);
      const gap = (900 * (major[1].time - major[0].time)) / span;
      expect(gap, `span ${span} s`).toBeGreaterThanOrEqual(46);
    }
  });

  it('has no ticks on an axis without length', () => {
    expect(timeTicks(5, 5, 900).major).toEqual([]);
    expect(timeTicks(0, 10, 0).major).toEqual([]);
  });
});
