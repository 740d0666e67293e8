/** Heights of the lanes, top to bottom, from the room there is. */

export type LaneName = 'cycle' | 'temperature' | 'difference' | 'requirements';
export const LANES: readonly LaneName[] = ['cycle', 'temperature', 'difference', 'requirements'];

export interface LaneHeights extends Record<LaneName, number> {
  /** All lanes together, px. */
  total: number;
}

/** Shares of the height, in percent: at ease, and in a short window or with many series. */
const AT_EASE: Record<LaneName, number> = { cycle: 22, temperature: 32, difference: 21, requirements: 25 };
const CROWDED: Record<LaneName, number> = { cycle: 20, temperature: 38, difference: 19, requirements: 23 };
/** Below this a window is short, px. */
const SHORT = 250;
const MANY_SERIES = 6;
/** A lane closed to its title, px. */
export const CLOSED = 20;
/** Below this a lane shows nothing that can be read, px. */
const LEAST = 34;

export interface LaneNeeds {
  series: number;
  closed: ReadonlySet<LaneName>;
  /** Height that shows every requirement; the lane gets no more than that. */
  requirements: number;
}

/** Shares the room (px) among the open lanes; what one does not need goes to the temperatures. */
export function laneHeights(room: number, { series, closed, requirements }: LaneNeeds): LaneHeights {
  const shares = room < SHORT || series >= MANY_SERIES ? CROWDED : AT_EASE;
  const open = LANES.filter((lane) => !closed.has(lane));
  const free = Math.max(0, room - CLOSED * (LANES.length - open.length));
  const sum = open.reduce((total, lane) => total + shares[lane], 0);
  const heights = { cycle: CLOSED, temperature: CLOSED, difference: CLOSED, requirements: CLOSED };
  for (const lane of open) heights[lane] = Math.max(LEAST, Math.floor((free * shares[lane]) / sum));
  if (open.includes('requirements')) heights.requirements = Math.max(LEAST, Math.min(heights.requirements, requirements));
  const widest = (['temperature', 'difference', 'cycle', 'requirements'] as const).find((lane) => open.includes(lane));
  const spare = room - LANES.reduce((total, lane) => total + heights[lane], 0);
  if (widest !== undefined && spare > 0) heights[widest] += spare;
  return { ...heights, total: LANES.reduce((total, lane) => total + heights[lane], 0) };
}
