/**
 * Identities that the coefficients of RODAS5P must keep: a digit lost in copying breaks one of them.
 * Transformed form, Hairer & Wanner, Solving ODEs II, IV.7: Γ = (1/γ I − C)⁻¹, α = a Γ, b = m Γ.
 */
import { describe, expect, it } from 'vitest';
import { COUPLING, DENSE, GAMMA, POINTS, TIMES, TIME_SLOPES } from '../../../solver/stepping/rodas5pCoefficients';
import { denseSolve } from '../../support/solverTools';

const STAGES = 8;
const square = (rows: readonly (readonly number[])[]): number[][] =>
  Array.from({ length: STAGES }, (_, i) => Array.from({ length: STAGES }, (__, j) => rows[i][j] ?? 0));
const product = (a: number[][], b: number[][]): number[][] =>
  a.map((row) => b[0].map((_, j) => row.reduce((sum, value, k) => sum + value * b[k][j], 0)));
const times = (a: number[][], x: readonly number[]): number[] =>
  a.map((row) => row.reduce((sum, value, j) => sum + value * x[j], 0));
const sum = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0);
const dot = (a: readonly number[], b: readonly number[]): number => sum(a.map((value, i) => value * b[i]));

const inverse = square(COUPLING).map((row, i) => row.map((c, j) => (i === j ? 1 / GAMMA : 0) - c));
const columns = Array.from({ length: STAGES }, (_, j) =>
  denseSolve(
    inverse,
    Array.from({ length: STAGES }, (__, i) => Number(i === j)),
  ),
);
/** Γ: lower triangular with γ on its diagonal. */
const gamma = Array.from({ length: STAGES }, (_, i) => columns.map((column) => column[i]));
const alpha = product(square(POINTS), gamma);
const beta = alpha.map((row, i) => row.map((value, j) => value + gamma[i][j]));
/** The step adds the last point's stages and the last stage itself. */
const weights = times(
  gamma[0].map((_, j) => gamma.map((row) => row[j])),
  [...POINTS[7], 1],
);
const ALL = TIMES.map(() => 1);
const square2 = (values: readonly number[]): number[] => values.map((value) => value * value);

describe('the coefficients of RODAS5P', () => {
  it('have nodes that are the row sums of α, and slopes that are those of Γ', () => {
    times(alpha, ALL).forEach((value, i) => expect(value).toBeCloseTo(TIMES[i], 12));
    times(gamma, ALL).forEach((value, i) => expect(value).toBeCloseTo(TIME_SLOPES[i], 11));
  });

  it('have weights that sum to one', () => {
    expect(sum(weights)).toBeCloseTo(1, 12);
  });

  it('keep the conditions up to the fifth order for y′ = f(t)', () => {
    // ∫ t^(p−1) over the step is 1/p. A stage's own time is that of its point, its derivative weighs with the slope.
    for (let p = 2; p <= 5; p++) {
      const stage = TIMES.map((time, i) => time ** (p - 1) + (p - 1) * TIME_SLOPES[i] * 0 ** (p - 2));
      expect(dot(weights, stage)).toBeCloseTo(1 / p, 11);
    }
  });

  it('keep the conditions of the linear trees: b β … β 1 = 1/p!', () => {
    let chain: number[] = ALL;
    let factorial = 1;
    for (let p = 1; p <= 5; p++) {
      factorial *= p;
      expect(dot(weights, chain)).toBeCloseTo(1 / factorial, 11);
      chain = times(beta, chain);
    }
  });

  it('keep the conditions of third and fourth order with a bent f', () => {
    const rowSums = times(alpha, ALL);
    const slopes = times(beta, ALL);
    expect(dot(weights, square2(rowSums))).toBeCloseTo(1 / 3, 11);
    expect(
      dot(
        weights,
        rowSums.map((c, i) => c * times(alpha, slopes)[i]),
      ),
    ).toBeCloseTo(1 / 8, 11);
    expect(dot(weights, times(beta, square2(rowSums)))).toBeCloseTo(1 / 12, 11);
  });

  it('are stiffly accurate: what a step adds is the last row of β', () => {
    weights.forEach((weight, j) => expect(weight).toBeCloseTo(beta[7][j], 12));
  });

  it('damp what is infinitely stiff within one step', () => {
    // Stability function at infinity: 1 − b β⁻¹ 1.
    expect(1 - dot(weights, denseSolve(beta, ALL))).toBeCloseTo(0, 10);
  });

  it('have a dense output that is exact for a constant slope, and right at both ends by construction', () => {
    const transposed = gamma[0].map((_, j) => gamma.map((row) => row[j]));
    for (const row of DENSE) expect(sum(times(transposed, row))).toBeCloseTo(0, 10);
  });

  it('have a dense output of fourth order for y′ = t^(p−1)', () => {
    const transposed = gamma[0].map((_, j) => gamma.map((row) => row[j]));
    for (let p = 2; p <= 4; p++) {
      const stage = TIMES.map((time, i) => time ** (p - 1) + (p - 1) * TIME_SLOPES[i] * 0 ** (p - 2));
      const [k1, k2, k3] = DENSE.map((row) => dot(times(transposed, row), stage));
      for (const x of [0.25, 0.5, 0.8]) {
        expect(x * (1 / p + (1 - x) * (k1 + x * (k2 + x * k3)))).toBeCloseTo(x ** p / p, 10);
      }
    }
  });
});
