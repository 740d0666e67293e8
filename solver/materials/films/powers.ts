/**
 * Roots by arithmetic alone. Math.cbrt and powers with fractions differ between engines in the last digits, and a plan has the same
 * digits on all of them; +, −, ×, / and √ do not.
 */

const bits = new DataView(new ArrayBuffer(8));

/** The n-th root of x ≥ 0: by square roots, cube roots and what is left of n. */
export function root(x: number, n: number): number {
  let value = x;
  let left = n;
  for (; left % 2 === 0; left /= 2) value = Math.sqrt(value);
  for (; left % 3 === 0; left /= 3) value = newtonRoot(value, 3);
  return left === 1 ? value : newtonRoot(value, left);
}

/** By Newton's method from a power of two above the root, at most one factor 2 away. */
function newtonRoot(x: number, n: number): number {
  if (!(x > 0) || x === Infinity) return x;
  bits.setFloat64(0, x);
  const exponent = ((bits.getUint16(0) >> 4) & 0x7ff) - 1023;
  let value = 2 ** Math.ceil((exponent + 1) / n);
  // From above, Newton's method falls until rounding stops it.
  for (;;) {
    const next = value - (value - x / whole(value, n - 1)) / n;
    if (!(next < value)) return value;
    value = next;
  }
}

/** x to a whole power. */
export function whole(x: number, power: number): number {
  let value = 1;
  for (let base = x, left = power; left > 0; left >>= 1, base *= base) if (left & 1) value *= base;
  return value;
}
