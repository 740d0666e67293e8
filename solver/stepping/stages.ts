/**
 * Stage vectors of a method with up to eight stages, node by node: stage j of row i stands at 8 i + j.
 *
 * A linear combination of stages is then one pass with a short fixed row. The passes are written out by the number of stages:
 * twice as fast as a loop over them, and this is where a run spends its time.
 */
const PLACES = 8;

export class Stages {
  private readonly values: Float64Array;
  private readonly rows: number;

  constructor(rows: number) {
    this.rows = rows;
    this.values = new Float64Array(rows * PLACES);
  }

  /** One value of one stage. */
  get(row: number, stage: number): number {
    return this.values[row * PLACES + stage];
  }

  set(row: number, stage: number, value: number): void {
    this.values[row * PLACES + stage] = value;
  }

  /** Stores a whole stage. */
  store(stage: number, vector: Float64Array): void {
    const { values, rows } = this;
    for (let row = 0, at = stage; row < rows; row++, at += PLACES) values[at] = vector[row];
  }

  /** Stores first − second as a stage. */
  storeDifference(stage: number, first: Float64Array, second: Float64Array): void {
    const { values, rows } = this;
    for (let row = 0, at = stage; row < rows; row++, at += PLACES) values[at] = first[row] - second[row];
  }

  /** out = base + stage. */
  addStage(base: Float64Array, stage: number, out: Float64Array): void {
    const { values, rows } = this;
    for (let row = 0, at = stage; row < rows; row++, at += PLACES) out[row] = base[row] + values[at];
  }

  /** Σ weights[j] × stage j of one row, over all weights. */
  sum(row: number, weights: readonly number[]): number {
    let sum = 0;
    for (let j = 0, at = row * PLACES; j < weights.length; j++) sum += weights[j] * this.values[at + j];
    return sum;
  }

  /** out = base + Σ weights[j] × stage j, over all weights (at least one, at most seven). `base` may be `out`. */
  combine(base: Float64Array, weights: readonly number[], out: Float64Array): void {
    const { values: v, rows } = this;
    const [a, b, c, d, e, f, g] = weights;
    switch (weights.length) {
      case 1:
        for (let row = 0, o = 0; row < rows; row++, o += PLACES) out[row] = base[row] + a * v[o];
        return;
      case 2:
        for (let row = 0, o = 0; row < rows; row++, o += PLACES) out[row] = base[row] + (a * v[o] + b * v[o + 1]);
        return;
      case 3:
        for (let row = 0, o = 0; row < rows; row++, o += PLACES) {
          out[row] = base[row] + (a * v[o] + b * v[o + 1]) + c * v[o + 2];
        }
        return;
      case 4:
        for (let row = 0, o = 0; row < rows; row++, o += PLACES) {
          out[row] = base[row] + (a * v[o] + b * v[o + 1]) + (c * v[o + 2] + d * v[o + 3]);
        }
        return;
      case 5:
        for (let row = 0, o = 0; row < rows; row++, o += PLACES) {
          out[row] = base[row] + (a * v[o] + b * v[o + 1]) + (c * v[o + 2] + d * v[o + 3]) + e * v[o + 4];
        }
        return;
      case 6:
        for (let row = 0, o = 0; row < rows; row++, o += PLACES) {
          out[row] = base[row] + (a * v[o] + b * v[o + 1]) + (c * v[o + 2] + d * v[o + 3]) + (e * v[o + 4] + f * v[o + 5]);
        }
        return;
      case 7:
        for (let row = 0, o = 0; row < rows; row++, o += PLACES) {
          const first = a * v[o] + b * v[o + 1] + (c * v[o + 2] + d * v[o + 3]);
          out[row] = base[row] + first + (e * v[o + 4] + f * v[o + 5]) + g * v[o + 6];
        }
        return;
      default:
        throw new RangeError(`a combination of ${weights.length} stages is not written out`);
    }
  }
}
