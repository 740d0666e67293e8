/** Where the playhead's flag lies under the time axis, px. */
import { clamp } from '../draw';

/** Width of a letter in the flag, and its padding, px. */
const LETTER = 6.2;
const PADDING = 16;
/** How far it may stand out over the ends of the axis, px. */
const OVER = { start: 40, end: 24 };

/** The flag for a playhead at `x` on an axis of that width: its middle, kept in sight, and half its width. */
export function flagAt(x: number, width: number, text: string, event: string | null): { middle: number; half: number } {
  const letters = text.length + (event === null ? 0 : event.length + 1);
  const half = (PADDING + LETTER * letters) / 2;
  return { middle: clamp(x, half - OVER.start, width + OVER.end - half), half };
}
