/**
 * Roots by arithmetic alone. Math.cbrt and powers with fractions differ between engines in the last digits, and a plan has the same
 * digits on all of them; +, −, ×, / and √ do not.
 */

const bits = new DataView(new ArrayBuffer(8));

/** The n-th root of x ≥ 0, by Newton's method from a power of two at most one factor 2 away. */
export function root(x: number, n: number): number {
  if (!(x > 0) || x === Infinity) return x;
  bits.setFloat64(0, x);
  const exponent = ((bits.getUint16(0) >> 4) & 0x7ff) - 1023;
  let value = 2 ** Math.ceil(exponent / n + 1 / n);
  // From above, Newton's method falls until rounding stops it.
  for (let i = 0; i < 60; i++) {
    const next = value - (value - x / whole(value, n - 1)) / n;
    if (!(next < value)) break;
    value = next;
  }
  return value;
}

/** x to a whole power. */
export function whole(x: number, power: number): number {
  let value = 1;
  for (let i = 0; i < power; i++) value *= x;
  return value;
}
