/** Ticks of a value axis: steps of 1, 2 and 5 times a power of ten. */

export interface ValueTicks {
  ticks: number[];
  step: number;
}

/** The smallest step of 1, 2 or 5 times a power of ten that is at least `size`; 1 for a size that is not positive. */
export function roundStep(size: number): number {
  if (!(size > 0) || !Number.isFinite(size)) return 1;
  const power = 10 ** Math.floor(Math.log10(size));
  // A hair of slack, so that a size that is a step already stays one.
  for (const factor of [1, 2, 5]) if (factor * power >= size * (1 - 1e-9)) return factor * power;
  return 10 * power;
}

/** Round values between `low` and `high`, both included, at most `most` of them (at least 2 steps are aimed at). */
export function valueTicks(low: number, high: number, most: number): ValueTicks {
  const step = roundStep((high - low) / Math.max(1, most - 1));
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  const ticks: number[] = [];
  for (let k = first; k <= last; k++) ticks.push(tidy(k * step));
  return { ticks, step };
}

/** The range widened to whole steps, so that the axis ends on ticks; a range without length gets one step either way. */
export function roundRange(low: number, high: number, most: number): [number, number] {
  if (!(high > low)) {
    const half = roundStep(Math.max(1, Math.abs(low) * 0.1));
    return [tidy(low - half), tidy(low + half)];
  }
  const step = roundStep((high - low) / Math.max(1, most - 1));
  return [tidy(Math.floor(low / step + 1e-9) * step), tidy(Math.ceil(high / step - 1e-9) * step)];
}

/** Rounds to the nearest multiple of a step. */
export const roundTo = (value: number, step: number): number => tidy(Math.round(value / step) * step);

/** Takes off the dust of binary fractions: 0.30000000000000004 is 0.3. */
const tidy = (value: number): number => Number(value.toPrecision(12)) + 0;
