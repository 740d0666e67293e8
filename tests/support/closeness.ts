/** Tables of figures against figures. */
import { expect } from 'vitest';

/** Every entry within `tolerance`; says which was worst, and by how much. */
export function expectWithin(found: number[][], expected: number[][], tolerance: number): void {
  expect(found.map((row) => row.length)).toEqual(expected.map((row) => row.length));
  let worst = { row: 0, column: 0, error: -1 };
  found.forEach((cells, row) =>
    cells.forEach((value, column) => {
      const error = Math.abs(value - expected[row][column]);
      if (!(error <= worst.error)) worst = { row, column, error };
    }),
  );
  const { row, column, error } = worst;
  const message = `row ${row}, column ${column}: ${found[row][column]} against ${expected[row][column]}`;
  expect(error, message).toBeLessThanOrEqual(tolerance);
}

/** Largest change that a table of temperatures shows from a starting temperature, K. */
export const largestChange = (temperatures: number[][], from: number): number =>
  Math.max(...temperatures.flat().map((temperature) => Math.abs(temperature - from)));
