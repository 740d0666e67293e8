/** Where a letter rides on its curve: where the curve is far from all others, and the letter from all other letters. */
import { clamp } from './scale';
import type { Box } from './labels';

export interface LetterPlace {
  /** Column, as handed in. */
  column: number;
  x: number;
  y: number;
}

/** Radius of a letter's disc with some air, px. */
const RADIUS = 9;
/** Distance from other curves beyond which more is no better, px. */
const ENOUGH = 24;
/** How much a place of its own along the axis counts against distance from other curves. */
const OWN_PLACE = 0.5;

/**
 * One place a curve, or null where the curve has no value to sit on. `x` holds the pixels of the columns, `curves` the
 * pixels of every curve in each column (NaN where there is none); letters keep clear of `others` (heights of straight lines)
 * and of the boxes in `avoid` where they can.
 */
export function placeLetters(
  x: readonly number[],
  curves: readonly (readonly number[])[],
  others: readonly number[] = [],
  avoid: readonly Box[] = [],
): (LetterPlace | null)[] {
  const placed: LetterPlace[] = [];
  const first = x.length > 0 ? x[0] : 0;
  const width = x.length > 0 ? x[x.length - 1] - first : 0;

  const crowded = (at: number, y: number): boolean =>
    placed.some((other) => Math.abs(other.x - at) < 2 * RADIUS && Math.abs(other.y - y) < 2 * RADIUS) ||
    avoid.some(
      (box) => at > box.x - RADIUS && at < box.x + box.width + RADIUS && y > box.y - RADIUS && y < box.y + box.height + RADIUS,
    );

  return curves.map((curve, index) => {
    // Letters would pile up in the one best column; each prefers a place of its own along the axis.
    const wish = first + (width * (index + 1)) / (curves.length + 1);
    let best: LetterPlace | null = null;
    let bestScore = -Infinity;
    for (let column = 0; column < x.length; column++) {
      const y = curve[column];
      if (!Number.isFinite(y)) continue;
      let clear = ENOUGH;
      curves.forEach((other, k) => {
        if (k !== index && Number.isFinite(other[column])) clear = Math.min(clear, Math.abs(other[column] - y));
      });
      for (const line of others) clear = Math.min(clear, 2 * Math.abs(line - y));
      const edge = clamp(Math.min(x[column] - first, first + width - x[column]) / (4 * RADIUS), 0, 1);
      const away = (OWN_PLACE * ENOUGH * Math.abs(x[column] - wish)) / (width || 1);
      const score = clear + ENOUGH * edge - away - (crowded(x[column], y) ? 4 * ENOUGH : 0);
      if (score > bestScore) {
        bestScore = score;
        best = { column, x: x[column], y };
      }
    }
    if (best !== null) placed.push(best);
    return best;
  });
}
