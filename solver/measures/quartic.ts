/**
 * A quartic over the unit interval, its turning points and its crossings.
 *
 *   p(u) = c0 + c1 u + c2 u² + c3 u³ + c4 u⁴      u from 0 to 1
 *
 * Dense output is a polynomial of at most the fourth degree in the fraction of a step, so five values at equal distances tell
 * all of it. Roots are found between neighbouring turning points, where p is monotone and a change of sign is sure to hold one.
 */

/** Coefficients c0 to c4, or c0 to c3 of a derivative. */
export type Polynomial = readonly number[];

/** The quartic through values at u = 0, ¼, ½, ¾, 1 (Newton's forward differences, written out in powers of u). */
export function quarticThrough(v0: number, v1: number, v2: number, v3: number, v4: number): Polynomial {
  const first = v1 - v0;
  const second = v2 - 2 * v1 + v0;
  const third = v3 - 3 * v2 + 3 * v1 - v0;
  const fourth = v4 - 4 * v3 + 6 * v2 - 4 * v1 + v0;
  return [
    v0,
    4 * (first - second / 2 + third / 3 - fourth / 4),
    8 * (second - third + (11 / 12) * fourth),
    (32 / 3) * third - 16 * fourth,
    (32 / 3) * fourth,
  ];
}

/** p(u). */
export function valueOf(p: Polynomial, u: number): number {
  let value = 0;
  for (let i = p.length - 1; i >= 0; i--) value = value * u + p[i];
  return value;
}

const slopeOf = (p: Polynomial): Polynomial => p.slice(1).map((c, i) => c * (i + 1));

const NO_TURNS: readonly number[] = [];

/** Whether p surely only rises or only falls from 0 to 1: the Bernstein coefficients of its slope, which enclose it, have one sign. */
function isMonotone(p: Polynomial): boolean {
  const b0 = p[1];
  const b1 = b0 + (2 / 3) * p[2];
  const b2 = b0 + (4 / 3) * p[2] + p[3];
  const b3 = b0 + 2 * p[2] + 3 * p[3] + 4 * p[4];
  return (b0 >= 0 && b1 >= 0 && b2 >= 0 && b3 >= 0) || (b0 <= 0 && b1 <= 0 && b2 <= 0 && b3 <= 0);
}

/** Where p turns from rising to falling or back, strictly inside (0, 1), ascending. */
export function turnsOf(p: Polynomial): readonly number[] {
  if (isMonotone(p)) return NO_TURNS;
  const [, , c2, c3, c4] = p;
  const slope = slopeOf(p);
  const edges = [0, ...quadraticRoots(2 * c2, 6 * c3, 12 * c4).filter((u) => u > 0 && u < 1), 1];
  const turns: number[] = [];
  for (let i = 1; i < edges.length; i++) {
    const before = valueOf(slope, edges[i - 1]);
    const after = valueOf(slope, edges[i]);
    if (before * after < 0) turns.push(rootBetween(slope, edges[i - 1], edges[i]));
    else if (after === 0) turns.push(edges[i]); // a triple root, or a level inflection, which does no harm here
  }
  return turns.filter((u, i) => u > 0 && u < 1 && u !== turns[i - 1]);
}

/** Real roots of a + b u + c u², ascending; none for a constant. */
function quadraticRoots(a: number, b: number, c: number): number[] {
  if (c === 0) return b === 0 ? [] : [-a / b];
  const discriminant = b * b - 4 * a * c;
  if (discriminant < 0) return [];
  const q = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant));
  if (q === 0) return [0];
  const roots = [q / c, a / q];
  return roots[0] < roots[1] ? roots : roots.reverse();
}

/** Rounding of the position of a root, as a part of the unit interval. */
const ROOT_WIDTH = 1e-14;

/**
 * The root of p between `low` and `high`, at which its signs differ: Newton steps, bisected wherever one would leave the
 * bracket or fails to halve it. Where an end is a root itself, that end.
 */
export function rootBetween(p: Polynomial, low: number, high: number): number {
  const atLow = valueOf(p, low);
  if (atLow === 0) return low;
  if (valueOf(p, high) === 0) return high;
  const slope = slopeOf(p);
  const rising = atLow < 0;
  let u = 0.5 * (low + high);
  let width = high - low;
  for (let i = 0; i < 100 && high - low > ROOT_WIDTH; i++) {
    const value = valueOf(p, u);
    if (value === 0) return u;
    if (value < 0 === rising) low = u;
    else high = u;
    const newton = u - value / valueOf(slope, u);
    const good = newton > low && newton < high && Math.abs(newton - u) < 0.5 * width;
    const next = good ? newton : 0.5 * (low + high);
    width = Math.abs(next - u);
    if (good && width < ROOT_WIDTH) return next;
    u = next;
  }
  return u;
}
