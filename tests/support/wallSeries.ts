/**
 * Plane wall of half thickness L, insulated in the middle, that a fluid cools or heats on its face from t = 0 on:
 *
 *   θ(x, Fo) = Σ C exp(−ζ² Fo) cos(ζ x/L),   ζ tan ζ = Bi,   C = 4 sin ζ / (2 ζ + sin 2ζ)
 *   mean θ   = Σ C exp(−ζ² Fo) sin ζ / ζ
 *
 * θ = (T − Ta)/(Ti − Ta), Bi = h L/k, Fo = α t/L². H. S. Carslaw and J. C. Jaeger, Conduction of Heat in Solids, 2nd ed.,
 * chapter III (slab with radiation, that is a linear film, at its surface); from memory, and checked against tabulated values.
 */

/** Root number n (from 0) of ζ tan ζ = Bi. */
export function wallRoot(biot: number, n: number): number {
  let low = n * Math.PI;
  let high = low + Math.PI / 2;
  // ζ sin ζ − Bi cos ζ has one sign change in there and no pole.
  const sign = n % 2 === 0 ? 1 : -1;
  for (let i = 0; i < 80; i++) {
    const middle = (low + high) / 2;
    if (sign * (middle * Math.sin(middle) - biot * Math.cos(middle)) < 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

export const wallCoefficient = (root: number): number => (4 * Math.sin(root)) / (2 * root + Math.sin(2 * root));

/** θ at x/L from the middle. */
export const wallTheta = (biot: number, fourier: number, place: number): number =>
  seriesOver(biot, fourier, (root) => Math.cos(root * place));

/** Mean of θ over the wall. */
export const wallMeanTheta = (biot: number, fourier: number): number =>
  seriesOver(biot, fourier, (root) => Math.sin(root) / root);

function seriesOver(biot: number, fourier: number, shape: (root: number) => number): number {
  let sum = 0;
  for (let n = 0; n < 400; n++) {
    const root = wallRoot(biot, n);
    const decay = Math.exp(-root * root * fourier);
    sum += wallCoefficient(root) * decay * shape(root);
    if (decay < 1e-16) break;
  }
  return sum;
}
