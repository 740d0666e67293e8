/**
 * A tridiagonal matrix that may hold a second entry to the left or right on some rows, factorised and solved.
 *
 *   row i:  farLower x[i-2] + lower x[i-1] + diagonal x[i] + upper x[i+1] + farUpper x[i+2]
 *
 * Elimination without pivoting: the matrices of heat conduction are dominated by their diagonal. It never fills in beyond the
 * second neighbours. Cost: 3 operations a row to factorise and 5 to solve, a few more on rows with a second neighbour.
 * A matrix that cannot be factorised gives figures that are not finite, which the caller sees in the solution.
 */
export class BandMatrix {
  readonly size: number;
  /** Entries, one per row; those outside the matrix are not read. */
  readonly farLower: Float64Array;
  readonly lower: Float64Array;
  readonly diagonal: Float64Array;
  readonly upper: Float64Array;
  readonly farUpper: Float64Array;

  // The factors: rows of the unit lower triangle, and of the upper one with its diagonal inverted.
  private readonly farMultiplier: Float64Array;
  private readonly multiplier: Float64Array;
  private readonly inversePivot: Float64Array;
  private readonly right: Float64Array;
  private readonly farRight: Float64Array;

  constructor(size: number) {
    const column = () => new Float64Array(size);
    this.size = size;
    this.farLower = column();
    this.lower = column();
    this.diagonal = column();
    this.upper = column();
    this.farUpper = column();
    this.farMultiplier = column();
    this.multiplier = column();
    this.inversePivot = column();
    this.right = column();
    this.farRight = column();
  }

  /** Factorises the entries as they are now; they are kept. */
  factorise(): void {
    const { size, farMultiplier, multiplier, inversePivot, right, farRight } = this;
    for (let i = 0; i < size; i++) {
      let left = i > 0 ? this.lower[i] : 0;
      let pivot = this.diagonal[i];
      let next = i < size - 1 ? this.upper[i] : 0;
      const far = i > 1 ? this.farLower[i] : 0;
      if (far !== 0) {
        const m = far * inversePivot[i - 2];
        left -= m * right[i - 2];
        pivot -= m * farRight[i - 2];
        farMultiplier[i] = m;
      } else {
        farMultiplier[i] = 0;
      }
      if (i > 0) {
        const m = left * inversePivot[i - 1];
        pivot -= m * right[i - 1];
        next -= m * farRight[i - 1];
        multiplier[i] = m;
      }
      inversePivot[i] = 1 / pivot;
      right[i] = next;
      farRight[i] = i < size - 2 ? this.farUpper[i] : 0;
    }
  }

  /** Solves for the right-hand side in `b` by the factors of the last `factorise`; the solution takes its place. */
  solve(b: Float64Array): void {
    const { size, farMultiplier, multiplier, inversePivot, right, farRight } = this;
    let previous = b[0];
    for (let i = 1; i < size; i++) {
      let value = b[i] - multiplier[i] * previous;
      if (farMultiplier[i] !== 0) value -= farMultiplier[i] * b[i - 2];
      b[i] = value;
      previous = value;
    }
    let next = b[size - 1] * inversePivot[size - 1];
    let afterNext = 0;
    b[size - 1] = next;
    for (let i = size - 2; i >= 0; i--) {
      let value = b[i] - right[i] * next;
      if (farRight[i] !== 0) value -= farRight[i] * afterNext;
      afterNext = next;
      next = value * inversePivot[i];
      b[i] = next;
    }
  }

  /** Takes factor × another matrix away from this one's entries. */
  subtract(factor: number, other: BandMatrix): void {
    for (let i = 0; i < this.size; i++) {
      this.farLower[i] -= factor * other.farLower[i];
      this.lower[i] -= factor * other.lower[i];
      this.diagonal[i] -= factor * other.diagonal[i];
      this.upper[i] -= factor * other.upper[i];
      this.farUpper[i] -= factor * other.farUpper[i];
    }
  }

  /** out = matrix × x, by the entries as they are now. */
  times(x: ArrayLike<number>, out: Float64Array): void {
    const { size, lower, diagonal, upper, farLower, farUpper } = this;
    let left = 0;
    let here = x[0];
    for (let i = 0; i < size - 1; i++) {
      const right = x[i + 1];
      let value = lower[i] * left + diagonal[i] * here + upper[i] * right;
      if (farLower[i] !== 0 && i > 1) value += farLower[i] * x[i - 2];
      if (farUpper[i] !== 0 && i < size - 2) value += farUpper[i] * x[i + 2];
      out[i] = value;
      left = here;
      here = right;
    }
    const last = size - 1;
    out[last] = lower[last] * left + diagonal[last] * here;
    if (last > 1) out[last] += farLower[last] * x[last - 2];
  }
}
