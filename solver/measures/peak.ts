/**
 * The extreme of a profile between its points.
 *
 *   v(x) = straight line between two neighbours + κ/2 (x − a)(x − b)        a, b their places
 *
 * κ is the second derivative of the parabola through the interval and its neighbour on one side, or on the other: whichever is
 * smaller in size, and 0 where they differ in sign or one is missing (the first and last interval of a layer). On a smooth
 * profile that is the parabola through an extreme and its neighbours to third order; ahead of a steep front, where that
 * parabola would invent an extreme tens of kelvin beyond any point, it adds nothing. (Choosing the smaller of two slopes: the
 * minmod limiter, common practice for steep fronts.) It also passes over from one interval to the next without a jump.
 */

/** An extreme: its place and its value. */
export interface Peak {
  position: number;
  value: number;
}

/**
 * Highest (`sign` 1) or lowest (`sign` −1) value beside point `top`, the extreme among the points `first` to `last` (both
 * included). Written into `out`.
 */
export function peakBeside(
  position: ArrayLike<number>,
  value: ArrayLike<number>,
  first: number,
  last: number,
  top: number,
  sign: 1 | -1,
  out: Peak,
): void {
  out.position = position[top];
  out.value = value[top];
  for (let i = Math.max(top - 1, first + 1); i <= Math.min(top, last - 2); i++) {
    const [a, b] = [position[i], position[i + 1]];
    const curvature = smaller(secondDerivative(position, value, i), secondDerivative(position, value, i + 1));
    if (curvature * sign >= 0) continue;
    const slope = (value[i + 1] - value[i]) / (b - a);
    const turn = 0.5 * (a + b) - slope / curvature;
    if (turn <= a || turn >= b) continue;
    const height = value[i] + slope * (turn - a) + 0.5 * curvature * (turn - a) * (turn - b);
    if ((height - out.value) * sign > 0) {
      out.position = turn;
      out.value = height;
    }
  }
}

/** Second derivative of the parabola through point `i` and its two neighbours. */
function secondDerivative(x: ArrayLike<number>, v: ArrayLike<number>, i: number): number {
  const after = (v[i + 1] - v[i]) / (x[i + 1] - x[i]);
  const before = (v[i] - v[i - 1]) / (x[i] - x[i - 1]);
  return (2 * (after - before)) / (x[i + 1] - x[i - 1]);
}

const smaller = (a: number, b: number): number => (a * b <= 0 ? 0 : Math.abs(a) < Math.abs(b) ? a : b);
