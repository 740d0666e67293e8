/** Histories: pairs of arrays, times never falling. */

export interface History {
  readonly time: ArrayLike<number>;
  readonly value: ArrayLike<number>;
}

/** Index of the last time at or before `time`; -1 before the first. */
export function indexAt(times: ArrayLike<number>, time: number): number {
  let low = 0;
  let high = times.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (times[middle] <= time) low = middle + 1;
    else high = middle;
  }
  return low - 1;
}

/** The value at a time, straight between points; null outside the history (a run that stopped knows nothing beyond). */
export function historyAt(history: History, time: number): number | null {
  const { time: t, value } = history;
  const i = indexAt(t, time);
  if (i < 0) return null;
  if (i === t.length - 1) return time > t[i] ? null : value[i];
  return value[i] + ((value[i + 1] - value[i]) * (time - t[i])) / (t[i + 1] - t[i]);
}

/** Times at which the history crosses a limit, straight between points; touching without crossing does not count. */
export function crossings(history: History, limit: number): number[] {
  const { time, value } = history;
  const times: number[] = [];
  for (let i = 1; i < time.length; i++) {
    const before = value[i - 1] - limit;
    const after = value[i] - limit;
    if ((before < 0 && after >= 0) || (before > 0 && after <= 0)) {
      times.push(time[i - 1] + ((time[i] - time[i - 1]) * before) / (before - after));
    }
  }
  return times;
}

/** Index of the largest value, the first of equals; -1 for an empty history. */
export function indexOfLargest(values: ArrayLike<number>): number {
  let best = -1;
  for (let i = 0; i < values.length; i++) if (best < 0 || values[i] > values[best]) best = i;
  return best;
}

/** Lowest and highest of several value lists; null when all are empty. Values that are not finite are left out. */
export function extent(lists: readonly ArrayLike<number>[]): [number, number] | null {
  let low = Infinity;
  let high = -Infinity;
  for (const list of lists) {
    for (let i = 0; i < list.length; i++) {
      if (!Number.isFinite(list[i])) continue;
      if (list[i] < low) low = list[i];
      if (list[i] > high) high = list[i];
    }
  }
  return low <= high ? [low, high] : null;
}
