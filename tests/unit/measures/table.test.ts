import { describe, expect, it } from 'vitest';
import { Table } from '../../../solver/measures/table';

describe('the rows of a history', () => {
  it('are all kept, one for every step, up to twenty thousand', () => {
    const table = new Table(1, 20000);
    for (let i = 0; i < 20000; i++) table.add([i, 2 * i], true);
    expect(table.column(0).length).toBe(20000);
    expect(table.column(1)[19999]).toBe(39998);
  });

  it('stay in the tens of thousands after millions of steps, with the last step at any moment', () => {
    const steps = 1_000_000;
    const table = new Table(1, steps);
    for (let i = 0; i <= steps; i++) table.add([i, -i], true);
    const times = table.column(0);
    expect(times.length).toBeLessThan(40100);
    expect(times.at(-1)).toBe(steps);
    expect(table.last(1)).toBe(-steps);
    expect(times.every((time, i) => i === 0 || time > times[i - 1])).toBe(true);
  });

  it('leave out no extreme, no output row and no jump, and the step before one stays', () => {
    const table = new Table(1, 1e6);
    for (let i = 0; i < 20010; i++) table.add([i * 1e-3, 0], true);
    const before = table.column(0).length;
    table.add([20.0095, 7], false);
    table.add([20.0095, 8], false);
    expect([...table.column(0).slice(before - 1)]).toEqual([20.009, 20.0095, 20.0095]);
    expect([...table.column(1).slice(before)]).toEqual([7, 8]);
  });
});
