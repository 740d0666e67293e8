/**
 * Min-max decimation: at most four points a pixel column, so that no peak is lost however many steps a run took.
 */
import { indexAt, type History } from './history';

/** Points to draw: the same picture as the whole history on an axis of so many columns. */
export interface Points {
  time: number[];
  value: number[];
}

/**
 * Keeps, for each of `columns` equal columns between `from` and `to`, the first, lowest, highest and last point, in order of
 * time, and one point beyond either end so that the line runs on to the edge. Short histories come back whole.
 */
export function decimate(history: History, from: number, to: number, columns: number): Points {
  const { time, value } = history;
  const points: Points = { time: [], value: [] };
  if (time.length === 0 || !(to > from) || columns < 1) return points;
  const first = Math.max(0, indexAt(time, from));
  const last = Math.min(time.length - 1, indexAt(time, to) + 1);
  const keep = (i: number): void => {
    points.time.push(time[i]);
    points.value.push(value[i]);
  };
  if (last - first + 1 <= 4 * columns) {
    for (let i = first; i <= last; i++) keep(i);
    return points;
  }
  const columnOf = (i: number): number => Math.floor(((time[i] - from) / (to - from)) * columns);
  for (let start = first; start <= last;) {
    let lowest = start;
    let highest = start;
    let end = start;
    const column = columnOf(start);
    while (end + 1 <= last && columnOf(end + 1) === column) {
      end++;
      if (value[end] < value[lowest]) lowest = end;
      if (value[end] > value[highest]) highest = end;
    }
    for (const i of new Set([start, Math.min(lowest, highest), Math.max(lowest, highest), end])) keep(i);
    start = end + 1;
  }
  return points;
}
