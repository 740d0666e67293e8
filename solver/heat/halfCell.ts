import type { ThermalCurves } from '../materials';

/**
 * Conduction between a surface and the unknown behind it, half a cell away: the flux from the surface inwards is
 * inverseDistance (Θ(surface) − Θ(unknown)), exact whatever the conductivity does with temperature.
 */
export interface HalfCell {
  readonly curves: ThermalCurves;
  /** 1/m; on a round part per m² of the surface. */
  readonly inverseDistance: number;
}

/** Temperatures closer than this part of their size are one. */
const SAME = 4 * Number.EPSILON;
const MOST_ITERATIONS = 100;

/** A function that falls from one sign to the other. */
export interface Falling {
  value: number;
  slope: number;
}

/**
 * Where a function crosses zero from above, by Newton's method kept inside what the signs met so far leave; bisection where a step would
 * leave that. `lowest` and `highest` may be infinite. The function writes value and slope at a place.
 */
export function crossing(write: (at: number, out: Falling) => void, start: number, lowest: number, highest: number): number {
  const f: Falling = { value: 0, slope: 0 };
  let [low, high] = [lowest, highest];
  let at = Math.min(Math.max(start, low), high);
  for (let i = 0; i < MOST_ITERATIONS; i++) {
    write(at, f);
    if (f.value === 0) return at;
    if (f.value > 0) low = at;
    else high = at;
    let next = at - f.value / f.slope;
    // Written so that a step that is not a number is replaced too.
    if (!(next > low && next < high))
      next = low > -Infinity && high < Infinity ? (low + high) / 2 : at + Math.sign(f.value) * (1 + Math.abs(at));
    if (Math.abs(next - at) <= SAME * (1 + Math.abs(next))) return next;
    at = next;
  }
  return at;
}
