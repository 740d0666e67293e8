/** Paths of an SVG from arrays of pixels. A point that is not a finite number breaks the line. */

const round = (value: number): string => String(Math.round(value * 100) / 100);

/** A line through the points; empty for none. */
export function linePath(x: ArrayLike<number>, y: ArrayLike<number>, from = 0, to = x.length): string {
  let path = '';
  let pen = 'M';
  for (let i = from; i < to; i++) {
    if (!Number.isFinite(x[i]) || !Number.isFinite(y[i])) {
      pen = 'M';
      continue;
    }
    path += `${pen}${round(x[i])} ${round(y[i])}`;
    pen = 'L';
  }
  return path;
}

/** The area between two lines over the same x. */
export function areaPath(
  x: ArrayLike<number>,
  upper: ArrayLike<number>,
  lower: ArrayLike<number>,
  from = 0,
  to = x.length,
): string {
  const edge = linePath(x, upper, from, to);
  if (edge === '') return '';
  let back = '';
  for (let i = to - 1; i >= from; i--) back += `L${round(x[i])} ${round(lower[i])}`;
  return `${edge}${back}Z`;
}
