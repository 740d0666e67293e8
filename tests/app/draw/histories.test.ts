import { describe, expect, it } from 'vitest';
import { crossings, decimate, extent, historyAt, indexAt, indexOfLargest } from '../../../app/draw';

const ramp = { time: [0, 10, 20, 30], value: [0, 100, 100, 40] };

describe('histories', () => {
  it('find the last time at or before a time', () => {
    expect([-1, 0, 5, 10, 30, 99].map((time) => indexAt(ramp.time, time))).toEqual([-1, 0, 0, 1, 3, 3]);
  });

  it('are straight between their points and unknown outside', () => {
    expect(historyAt(ramp, 5)).toBe(50);
    expect(historyAt(ramp, 30)).toBe(40);
    expect(historyAt(ramp, 30.001)).toBeNull();
    expect(historyAt(ramp, -1)).toBeNull();
    expect(historyAt({ time: [], value: [] }, 0)).toBeNull();
  });

  it('take the value after a jump at the time of the jump', () => {
    expect(historyAt({ time: [0, 10, 10, 20], value: [0, 0, 50, 50] }, 10)).toBe(50);
  });

  it('cross a limit going up and going down, and do not cross by touching', () => {
    expect(crossings(ramp, 70)).toEqual([7, 25]);
    expect(crossings(ramp, 100)).toEqual([10]);
    expect(crossings({ time: [0, 1, 2], value: [5, 3, 5] }, 3)).toEqual([1]);
    expect(crossings(ramp, 101)).toEqual([]);
  });

  it('know their largest value and their extent without minding gaps', () => {
    expect(indexOfLargest(ramp.value)).toBe(1);
    expect(indexOfLargest([])).toBe(-1);
    expect(extent([[3, Number.NaN, 9], [1]])).toEqual([1, 9]);
    expect(extent([[], [Number.NaN]])).toBeNull();
  });
});

describe('decimate', () => {
  const count = 20000;
  const time = Float64Array.from({ length: count }, (_, i) => i);
  const value = Float64Array.from({ length: count }, (_, i) => Math.sin(i / 900));
  value[7777] = 50;
  value[12345] = -50;

  it('keeps every peak and stays under four points a column', () => {
    const points = decimate({ time, value }, 0, count, 400);
    expect(points.time.length).toBeLessThanOrEqual(1604);
    expect(Math.max(...points.value)).toBe(50);
    expect(Math.min(...points.value)).toBe(-50);
    expect(points.value[points.time.indexOf(7777)]).toBe(50);
  });

  it('keeps the order of time', () => {
    const points = decimate({ time, value }, 0, count, 100);
    expect(points.time.every((t, i) => i === 0 || t >= points.time[i - 1])).toBe(true);
  });

  it('runs on to one point beyond either end of the window', () => {
    const points = decimate({ time, value }, 100.5, 200.5, 1000);
    expect(points.time[0]).toBe(100);
    expect(points.time[points.time.length - 1]).toBe(201);
  });

  it('gives a short history back whole, and an empty one for nothing to draw', () => {
    expect(decimate(ramp, 0, 30, 10)).toEqual(ramp);
    expect(decimate({ time: [], value: [] }, 0, 30, 10).time).toEqual([]);
    expect(decimate(ramp, 30, 30, 10).time).toEqual([]);
  });
});
