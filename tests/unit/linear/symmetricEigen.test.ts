import { describe, expect, it } from 'vitest';
import { eigenvaluesBelow, eigenvectorAt, largestEigenvalue, type SymmetricTridiagonal } from '../../../solver/linear';
import { seeded, symmetricEigenvalues } from '../../support/solverTools';

/** Second differences on n points: eigenvalues 2 − 2 cos(j π/(n + 1)). */
const secondDifferences = (n: number): SymmetricTridiagonal => ({
  diagonal: new Float64Array(n).fill(2),
  beside: new Float64Array(n - 1).fill(-1),
});

const dense = ({ diagonal, beside }: SymmetricTridiagonal): number[][] =>
  Array.from(diagonal, (value, i) =>
    Array.from(diagonal, (_, j) => (i === j ? value : Math.abs(i - j) === 1 ? beside[Math.min(i, j)] : 0)),
  );

function random(n: number, seed: number): SymmetricTridiagonal {
  const next = seeded(seed);
  const diagonal = Float64Array.from({ length: n }, () => 2 + 10 ** (6 * next() - 3));
  return { diagonal, beside: Float64Array.from({ length: n - 1 }, (_, i) => -Math.sqrt(diagonal[i] * diagonal[i + 1]) * 0.4) };
}

describe('eigenvalues of a symmetric tridiagonal matrix', () => {
  it('are counted below a value as known in closed form', () => {
    const n = 9;
    for (let j = 1; j <= n; j++) {
      const eigenvalue = 2 - 2 * Math.cos((j * Math.PI) / (n + 1));
      expect(eigenvaluesBelow(secondDifferences(n), eigenvalue - 1e-9)).toBe(j - 1);
      expect(eigenvaluesBelow(secondDifferences(n), eigenvalue + 1e-9)).toBe(j);
    }
  });

  it('are counted although a pivot vanishes on the way', () => {
    // Eigenvalues of [[1, 1], [1, 1]]: 0 and 2; at 1 the first pivot is exactly 0.
    expect(eigenvaluesBelow({ diagonal: Float64Array.of(1, 1), beside: Float64Array.of(1) }, 1)).toBe(1);
  });

  it.each([1, 2, 5, 50])('have the largest of the closed form, for %i rows', (n) => {
    const exact = 2 - 2 * Math.cos((n * Math.PI) / (n + 1));
    expect(largestEigenvalue(secondDifferences(n)) / exact).toBeCloseTo(1, 13);
  });

  it.each([1, 2, 3, 4])('have the largest that dense rotations find, entries over six decades (seed %i)', (seed) => {
    const matrix = random(14, seed);
    expect(largestEigenvalue(matrix) / symmetricEigenvalues(dense(matrix))[13]).toBeCloseTo(1, 12);
  });

  it('have none where an entry is not finite', () => {
    expect(largestEigenvalue({ diagonal: Float64Array.of(1, Infinity), beside: Float64Array.of(0) })).toBeNaN();
    expect(largestEigenvalue({ diagonal: Float64Array.of(1, NaN), beside: Float64Array.of(0) })).toBeNaN();
  });
});

describe('the vector of the largest eigenvalue', () => {
  it.each([1, 2, 3, 4])('is stretched by the eigenvalue in every entry (seed %i)', (seed) => {
    const matrix = random(20, seed);
    const value = largestEigenvalue(matrix);
    const vector = eigenvectorAt(matrix, value);
    const rows = dense(matrix);
    const largest = Math.max(...vector.map(Math.abs));
    rows.forEach((row, i) => {
      const stretched = row.reduce((sum, entry, j) => sum + entry * vector[j], 0);
      expect(Math.abs(stretched / value - vector[i])).toBeLessThan(1e-9 * largest);
    });
  });

  it('lies in the part that the eigenvalue belongs to', () => {
    const diagonal = Float64Array.of(1, 1, 1, 50, 50, 1, 1);
    const beside = Float64Array.of(-0.5, -0.5, -0.01, -20, -0.01, -0.5);
    const matrix = { diagonal, beside };
    const vector = eigenvectorAt(matrix, largestEigenvalue(matrix)).map(Math.abs);
    expect(vector[3]).toBeGreaterThan(100 * vector[2]);
    expect(vector[4]).toBeGreaterThan(100 * vector[5]);
  });
});
