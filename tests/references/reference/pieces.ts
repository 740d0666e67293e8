/**
 * A property over temperature and its integral, as cubics piece by piece.
 *
 * A cubic through four points inside each piece is exact for a product of two tables between their merged corners. An
 * expression is cut into many short pieces.
 */

/** Places of the four points in a piece, 0 to 1: the Gauss points, so that no end of a piece is ever looked at. */
const PLACES = [0.06943184420297371, 0.33000947820757187, 0.6699905217924281, 0.9305681557970262];

/** Coefficients of the cubic through (PLACES[i], values[i]), by divided differences. */
function cubicThrough(values: readonly number[]): [number, number, number, number] {
  const [p0, p1, p2, p3] = PLACES;
  const d01 = (values[1] - values[0]) / (p1 - p0);
  const d12 = (values[2] - values[1]) / (p2 - p1);
  const d23 = (values[3] - values[2]) / (p3 - p2);
  const d012 = (d12 - d01) / (p2 - p0);
  const d123 = (d23 - d12) / (p3 - p1);
  const d = (d123 - d012) / (p3 - p0);
  // v0 + d01 (x−p0) + d012 (x−p0)(x−p1) + d (x−p0)(x−p1)(x−p2), multiplied out
  return [
    values[0] - d01 * p0 + d012 * p0 * p1 - d * p0 * p1 * p2,
    d01 - d012 * (p0 + p1) + d * (p0 * p1 + p0 * p2 + p1 * p2),
    d012 - d * (p0 + p1 + p2),
    d,
  ];
}

export class Pieces {
  /** Ends of the pieces, °C, rising; constant beyond the first and the last. */
  readonly ends: Float64Array;
  /** Integral from the first end to each end. */
  readonly sums: Float64Array;
  private readonly cubic: Float64Array; // four a piece, over the fraction of the piece
  /** Value and integral at the temperature last read. */
  value = 0;
  integral = 0;

  constructor(ends: readonly number[], property: (temperature: number) => number) {
    const count = ends.length - 1;
    this.ends = Float64Array.from(ends);
    this.sums = new Float64Array(count + 1);
    this.cubic = new Float64Array(4 * count);
    for (let i = 0; i < count; i++) {
      const width = ends[i + 1] - ends[i];
      const cubic = cubicThrough(PLACES.map((place) => property(ends[i] + place * width)));
      this.cubic.set(cubic, 4 * i);
      this.sums[i + 1] = this.sums[i] + width * (cubic[0] + cubic[1] / 2 + cubic[2] / 3 + cubic[3] / 4);
    }
  }

  read(temperature: number): void {
    const { ends } = this;
    const last = ends.length - 1;
    if (temperature <= ends[0]) {
      this.value = this.cubic[0];
      this.integral = this.value * (temperature - ends[0]);
    } else if (temperature >= ends[last]) {
      const [a, b, c, d] = this.cubic.subarray(4 * (last - 1), 4 * last);
      this.value = a + b + c + d;
      this.integral = this.sums[last] + this.value * (temperature - ends[last]);
    } else this.readIn(pieceOf(ends, temperature), temperature);
  }

  private readIn(piece: number, temperature: number): void {
    const { ends, cubic } = this;
    const from = 4 * piece;
    const width = ends[piece + 1] - ends[piece];
    const u = (temperature - ends[piece]) / width;
    this.value = cubic[from] + u * (cubic[from + 1] + u * (cubic[from + 2] + u * cubic[from + 3]));
    const sum = cubic[from] + u * (cubic[from + 1] / 2 + u * (cubic[from + 2] / 3 + (u * cubic[from + 3]) / 4));
    this.integral = this.sums[piece] + width * u * sum;
  }

  /** The temperature at which the integral, which must rise, has a value. */
  inverse(integral: number): number {
    const { ends, sums } = this;
    const last = ends.length - 1;
    if (integral <= 0) return ends[0] + integral / this.cubic[0];
    if (integral >= sums[last]) {
      this.read(ends[last]);
      return ends[last] + (integral - sums[last]) / this.value;
    }
    const piece = pieceOf(sums, integral);
    let [low, high] = [ends[piece], ends[piece + 1]];
    let temperature = low + ((high - low) * (integral - sums[piece])) / (sums[piece + 1] - sums[piece]);
    for (let i = 0; i < 60; i++) {
      this.readIn(piece, temperature);
      const over = this.integral - integral;
      if (over > 0) high = temperature;
      else low = temperature;
      let next = temperature - over / this.value;
      if (!(next >= low && next <= high)) next = 0.5 * (low + high);
      if (Math.abs(next - temperature) <= 1e-14 * (Math.abs(next) + 1)) return next;
      temperature = next;
    }
    return temperature;
  }
}

/** Index of the piece between two rising numbers that holds a value. */
function pieceOf(ends: Float64Array, value: number): number {
  let low = 0;
  let high = ends.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (ends[middle] <= value) low = middle;
    else high = middle;
  }
  return low;
}
