import { describe, expect, it } from 'vitest';
import { equalTimes, layCycle, rowTimes, type Project } from '../../../solver/model';
import { plan } from '../../support/plan';

const rowsOf = (stages: number[], interval?: number): number[] => {
  const project: Project = { ...plan({ stages }), output: { interval } };
  return [...rowTimes(project, layCycle(project))];
};

describe('rows of tables', () => {
  it('are 200 equal parts of the cycle and its stage edges, where no interval is asked for', () => {
    const rows = rowsOf([100, 0.3, 100]);
    expect(rows).toHaveLength(203);
    expect(rows).toContain(100.3);
    expect(rows[0]).toBe(0);
    expect(rows.at(-1)).toBe(200.3);
  });

  it('are every interval from the start on, and the end in any case', () => {
    expect(rowsOf([10], 3)).toEqual([0, 3, 6, 9, 10]);
    expect(rowsOf([4, 8], 4)).toEqual([0, 4, 8, 12]);
    expect(rowsOf([1], 5)).toEqual([0, 1]);
  });

  it('have an edge once, with its own number, though a multiple of the interval only nears it', () => {
    const rows = rowsOf([0.1 + 0.2, 0.3], 0.1);
    expect(rows).toHaveLength(7);
    expect(rows).toContain(0.1 + 0.2);
    expect(rows).toEqual([...rows].sort((a, b) => a - b));
  });

  it('are at most some twenty thousand, whatever interval is asked for', () => {
    expect(rowsOf([1e6], 1).length).toBeLessThan(20100);
  });
});

describe('equal times', () => {
  it('are so many parts, and the edges between', () => {
    const cycle = layCycle(plan({ stages: [1, 3] }));
    expect([...equalTimes(cycle, 4)]).toEqual([0, 1, 2, 3, 4]);
    expect([...equalTimes(cycle, 2)]).toEqual([0, 1, 2, 4]);
  });
});
