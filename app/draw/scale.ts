/** A linear scale with its inverse. */
export interface Scale {
  /** Domain: the values at both ends. */
  readonly from: number;
  readonly to: number;
  /** Range: the pixels at both ends; `start` may be more than `end` for an axis that points up. */
  readonly start: number;
  readonly end: number;
  /** Pixel of a value; values outside the domain lie outside the range. */
  at(value: number): number;
  /** Value at a pixel: the inverse of `at`. */
  valueAt(pixel: number): number;
}

/** A scale from values to pixels. A domain without length puts everything in the middle of the range. */
export function linearScale(from: number, to: number, start: number, end: number): Scale {
  const slope = to === from ? 0 : (end - start) / (to - from);
  return {
    from,
    to,
    start,
    end,
    at: (value) => (slope === 0 ? (start + end) / 2 : start + (value - from) * slope),
    valueAt: (pixel) => (slope === 0 ? from : from + (pixel - start) / slope),
  };
}

export const clamp = (value: number, low: number, high: number): number => Math.min(high, Math.max(low, value));
