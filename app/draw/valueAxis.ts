/** A value axis in the units on screen: round ticks there, a scale in the stored units. */
import { fromDisplay, toDisplay, type QuantityKind, type UnitSystem } from '../../solver/model/quantities';
import { linearScale, type Scale } from './scale';
import { roundRange, roundStep, roundTo } from './ticks';

export interface ValueTick {
  /** In the stored unit. */
  value: number;
  label: string;
}

export interface ValueAxis {
  /** From stored values to pixels. */
  scale: Scale;
  ticks: ValueTick[];
}

/** Room a tick label needs, px. */
const TICK_GAP = 20;
/** The axis ends on multiples of a small step: about so many of them fill it. */
const SMALL_STEPS = 10;
/** How many small steps a tick may stand apart, by the leading digit of the small step: ticks by 1, 2, 3, 4, 5 or 10. */
const STRIDES: Record<number, readonly number[]> = { 1: [1, 2, 3, 5, 10, 20], 2: [1, 2, 5, 10], 5: [1, 2, 4, 6, 10, 20] };

/**
 * An axis over `low` to `high` (stored units), widened to round values of the unit on screen, from pixel `start` to `end`.
 */
export function valueAxis(
  low: number,
  high: number,
  start: number,
  end: number,
  kind: QuantityKind,
  system: UnitSystem,
): ValueAxis {
  const most = Math.max(2, Math.floor(Math.abs(end - start) / TICK_GAP) + 1);
  const [from, to] = roundRange(toDisplay(low, kind, system), toDisplay(high, kind, system), SMALL_STEPS);
  const stored = (shown: number): number => fromDisplay(shown, kind, system);
  return {
    scale: linearScale(stored(from), stored(to), start, end),
    ticks: ticksBetween(from, to, most).map((tick) => ({ value: stored(tick), label: numberText(tick) })),
  };
}

/** As many multiples of a round step between the ends as `most` allows; a step that meets the upper end is preferred. */
function ticksBetween(from: number, to: number, most: number): number[] {
  const small = roundStep((to - from) / SMALL_STEPS);
  const leading = Number(small.toExponential(0)[0]);
  const choices = (STRIDES[leading] ?? [1, 2, 5, 10]).map((stride) => {
    const step = stride * small;
    const ticks: number[] = [];
    for (let k = Math.ceil(from / step - 1e-9); k * step <= to + 1e-9 * step; k++) ticks.push(roundTo(k * step, small));
    return ticks;
  });
  const fitting = choices.filter((ticks) => ticks.length <= most);
  const meets = (ticks: number[]): boolean => ticks[ticks.length - 1] >= to;
  return fitting.reduce<number[]>((best, ticks) => {
    if (ticks.length !== best.length) return ticks.length > best.length ? ticks : best;
    return meets(ticks) && !meets(best) ? ticks : best;
  }, []);
}

/** A tick's number with a true minus sign. */
const numberText = (value: number): string => String(value).replace('-', '−');
