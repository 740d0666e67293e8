/** Where to write in a plot so that no curve runs through the words. */
import type { Box } from './labels';

export interface TextPlace {
  x: number;
  /** Baseline. */
  y: number;
  anchor: 'start' | 'end';
}

/** The curves of a plot as pixels: columns across, heights of every curve in each (NaN where there is none). */
export interface DrawnCurves {
  columns: readonly number[];
  curves: readonly (readonly number[])[];
  /** Lower edge of the plot, px; the upper one is 0. */
  bottom: number;
  /** Words that are there already. */
  taken?: readonly Box[];
}

interface TextSize {
  width: number;
  height: number;
}

/** Space between a text and its line or point, and between a text and the line's end, px. */
const LIFT = 4;
const INSET = 4;
const BESIDE = 8;
/** From the middle of a text to a curve: further away than this is no better, the text stays where it belongs, px. */
const CLEAR = 9;

/** The box that a text at a place fills. */
export const boxOf = ({ x, y, anchor }: TextPlace, { width, height }: TextSize): Box => ({
  x: anchor === 'end' ? x - width : x,
  y: y - height + 3,
  width,
  height,
});

/** Distance from the middle of a text to the nearest curve, px; negative on other words, or out of the plot. */
function clearance(place: TextPlace, size: TextSize, { columns, curves, bottom, taken = [] }: DrawnCurves): number {
  const box = boxOf(place, size);
  const middle = box.y + box.height / 2;
  const right = columns[columns.length - 1] ?? Infinity;
  if (box.y < -1 || box.y + box.height > bottom || box.x < 0 || box.x + box.width > right) return -2;
  if (taken.some((other) => overlaps(box, other))) return -1;
  let least = CLEAR;
  columns.forEach((column, i) => {
    if (column < box.x - 6 || column > box.x + box.width + 6) return;
    for (const curve of curves) if (Number.isFinite(curve[i])) least = Math.min(least, Math.abs(curve[i] - middle));
  });
  return least;
}

const overlaps = (a: Box, b: Box): boolean =>
  a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;

/** The first of the places that is clearer than all before it. */
function clearest(places: readonly TextPlace[], size: TextSize, drawn: DrawnCurves): TextPlace {
  return places.reduce((a, b) => (clearance(b, size, drawn) > clearance(a, size, drawn) + 1 ? b : a));
}

/** A text on a straight line: at the end, and on the side, where the curves are furthest. */
export function placeLineLabel(line: { from: number; to: number; y: number }, size: TextSize, drawn: DrawnCurves): TextPlace {
  const along = (share: number): number => line.from + share * (line.to - line.from);
  const starts = [
    { x: line.to - INSET, anchor: 'end' as const },
    { x: line.from + INSET, anchor: 'start' as const },
    // In the middle of a line that is long enough for it to be clear whose words they are.
    ...(line.to - line.from > 4 * size.width
      ? [0.75, 0.5, 0.25].map((share) => ({ x: along(share), anchor: 'start' as const }))
      : []),
  ];
  const places = starts.flatMap(({ x, anchor }): TextPlace[] => {
    return [
      { x, y: line.y - LIFT, anchor },
      { x, y: line.y + LIFT + size.height - 3, anchor },
    ];
  });
  return clearest(places, size, drawn);
}

/** A curve nearer than this to the middle of a text runs through it, px. */
const THROUGH = 5;

/**
 * A text beside a peak (`up`) or a trough, right or left of it and a line further off where that is clearer; null where a
 * curve would run through it everywhere. `beyond` is the height of a line that it must not lie on, `right` the right edge.
 */
export function placePeakLabel(
  peak: { x: number; y: number; up: boolean; beyond: number; right: number },
  size: TextSize,
  drawn: DrawnCurves,
): TextPlace | null {
  const near = peak.up ? Math.min(peak.y - 3, peak.beyond - LIFT) : Math.max(peak.y + 11, peak.beyond + LIFT + size.height - 3);
  const further = near + (peak.up ? -size.height : size.height);
  const places = [near, further].flatMap((height): TextPlace[] => {
    const y = Math.max(size.height - 3, height);
    const both: TextPlace[] = [];
    if (peak.x + BESIDE + size.width <= peak.right) both.push({ x: peak.x + BESIDE, y, anchor: 'start' });
    if (peak.x - BESIDE - size.width >= 0) both.push({ x: peak.x - BESIDE, y, anchor: 'end' });
    return both;
  });
  if (places.length === 0) return null;
  const best = clearest(places, size, drawn);
  return clearance(best, size, drawn) < THROUGH ? null : best;
}

/** Width of a text in the chart type, near enough to keep things apart, px. */
export const textWidth = (text: string, size = 10.5): number => text.length * size * 0.52 + 2;
