import { describe, expect, it } from 'vitest';
import { BandMatrix } from '../../../solver/linear';
import { denseOf, denseSolve, seeded } from '../../support/solverTools';

/** A matrix dominated by its diagonal; second neighbours on the rows named. */
function randomMatrix(size: number, farRows: readonly number[], seed: number): BandMatrix {
  const random = seeded(seed);
  const matrix = new BandMatrix(size);
  for (let i = 0; i < size; i++) {
    matrix.lower[i] = random() - 0.5;
    matrix.upper[i] = random() - 0.5;
    matrix.farLower[i] = farRows.includes(i) ? random() - 0.5 : 0;
    matrix.farUpper[i] = farRows.includes(i) ? random() - 0.5 : 0;
    matrix.diagonal[i] = 2.5 + random();
  }
  return matrix;
}

describe('a tridiagonal matrix with some second neighbours', () => {
  it.each([
    ['one row', 1, []],
    ['two rows', 2, [0, 1]],
    ['three rows, all with second neighbours', 3, [0, 1, 2]],
    ['no second neighbours', 12, []],
    ['second neighbours at both ends and at an inner edge', 12, [0, 5, 11]],
    ['second neighbours everywhere', 12, Array.from({ length: 12 }, (_, i) => i)],
  ])('solves what dense elimination solves: %s', (_, size, farRows) => {
    const matrix = randomMatrix(size, farRows, 7);
    const rightHandSide = Float64Array.from({ length: size }, (_, i) => Math.sin(i + 1));
    const expected = denseSolve(
      denseOf(size, (x, out) => matrix.times(x, out)),
      rightHandSide,
    );
    matrix.factorise();
    const found = Float64Array.from(rightHandSide);
    matrix.solve(found);
    found.forEach((value, i) => expect(value).toBeCloseTo(expected[i], 12));
  });

  it('multiplies by all five entries of a row', () => {
    const matrix = new BandMatrix(5);
    matrix.farLower[2] = 1;
    matrix.lower[2] = 10;
    matrix.diagonal[2] = 100;
    matrix.upper[2] = 1000;
    matrix.farUpper[2] = 10000;
    const out = new Float64Array(5);
    matrix.times([1, 2, 3, 4, 5], out);
    expect([...out]).toEqual([0, 0, 54321, 0, 0]);
  });

  it('does not read entries that would lie outside', () => {
    const matrix = randomMatrix(4, [0, 1, 2, 3], 3);
    const clean = randomMatrix(4, [0, 1, 2, 3], 3);
    clean.lower[0] = clean.farLower[0] = clean.farLower[1] = 0;
    clean.upper[3] = clean.farUpper[3] = clean.farUpper[2] = 0;
    const solved = [matrix, clean].map((m) => {
      const b = Float64Array.of(1, 2, 3, 4);
      m.factorise();
      m.solve(b);
      return [...b];
    });
    expect(solved[0]).toEqual(solved[1]);
  });

  it('keeps its factors when its entries change, until it is factorised again', () => {
    const matrix = randomMatrix(6, [0], 5);
    matrix.factorise();
    const before = new Float64Array(6).fill(1);
    matrix.solve(before);
    matrix.diagonal.fill(100);
    const after = new Float64Array(6).fill(1);
    matrix.solve(after);
    expect([...after]).toEqual([...before]);
  });

  it('has no finite solution where it is singular', () => {
    const matrix = new BandMatrix(2);
    matrix.diagonal.set([1, 1]);
    matrix.upper[0] = 1;
    matrix.lower[1] = 1;
    matrix.factorise();
    const b = Float64Array.of(1, 2);
    matrix.solve(b);
    expect([...b].some(Number.isFinite)).toBe(false);
  });
});
