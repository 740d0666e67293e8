/** How steep what a requirement looks at was where it crossed its limit: a kelvin there is worth so many seconds. */
import type { Answer, Requirement, RunResult } from '../../model';

/** Least slope at the crossings that an answer rests on, K/s; infinite where it rests on none. */
export function slopeOf(answer: Answer, requirement: Requirement, result: RunResult): number {
  const times = requirement.must.kind === 'heldFor' ? endsOfHolds(answer) : answer.time_s === null ? [] : [answer.time_s];
  const { time, value } = seriesOf(requirement, result);
  return Math.min(...times.map((at) => slopeAt(time, value, at)));
}

/** Times at which holds begin and end; those that its window cuts off are no crossings. */
function endsOfHolds({ spans }: Answer): number[] {
  const [window, ...held] = spans;
  const ends = held.flatMap(({ from_s, to_s }) => [from_s, to_s]);
  // Where one span follows another the hold goes on.
  return ends.filter((time) => time !== window.from_s && time !== window.to_s && ends.filter((end) => end === time).length === 1);
}

interface Series {
  time: Float64Array;
  value: ArrayLike<number>;
}

function seriesOf({ of }: Requirement, { probes, field }: RunResult): Series {
  if ('probe' in of) {
    const history = probes.find(({ probe }) => probe === of.probe);
    return { time: history?.time_s ?? new Float64Array(0), value: history?.temperature_C ?? [] };
  }
  const { time_s: time, coldest_C, hottest_C, withinMaterial_K } = field;
  if ('point' in of) return { time, value: of.point === 'coldest' ? coldest_C : hottest_C };
  return { time, value: of.difference === 'material' ? withinMaterial_K : hottest_C.map((hot, i) => hot - coldest_C[i]) };
}

/** Of the piece of the history that a time lies in; infinite at a jump and where there is no history. */
function slopeAt(time: Float64Array, value: ArrayLike<number>, at: number): number {
  let next = time.findIndex((later) => later >= at);
  if (next < 0) next = time.length - 1;
  if (next < 1) next = 1;
  if (next >= time.length) return Infinity;
  const slope = Math.abs(value[next] - value[next - 1]) / (time[next] - time[next - 1]);
  return Number.isNaN(slope) ? Infinity : slope;
}
