/** Times at which tables have their rows and the animation its frames. */
import type { Project } from './project';
import type { LaidCycle } from './timing';

/** Rows of a table where no interval is asked for. */
const EQUAL_ROWS = 200;
/** More rows than this are not kept, whatever interval is asked for. */
const MAX_ROWS = 20000;
/** Times closer than this part of the cycle are one. */
const SAME_TIME = 1e-9;

/** Times of the rows of exported tables: every `output.interval`, or 200 equal parts of the cycle; and every stage edge. */
export function rowTimes(project: Pick<Project, 'output'>, cycle: LaidCycle): Float64Array {
  const interval = Math.max(project.output.interval ?? cycle.end / EQUAL_ROWS, cycle.end / MAX_ROWS);
  const count = Math.floor((cycle.end / interval) * (1 + SAME_TIME));
  return withEdges(
    Array.from({ length: count + 1 }, (_, i) => i * interval),
    cycle,
  );
}

/** `parts` equal parts of the cycle, and every stage edge. */
export const equalTimes = (cycle: LaidCycle, parts: number): Float64Array =>
  withEdges(
    Array.from({ length: parts + 1 }, (_, i) => (i / parts) * cycle.end),
    cycle,
  );

/** Ascending, each once; where a time lies on a stage edge the edge's own number is kept. */
function withEdges(times: number[], cycle: LaidCycle): Float64Array {
  const edges = [0, ...cycle.stages.map((stage) => stage.end)];
  const between = times.filter((time) => edges.every((edge) => Math.abs(time - edge) > SAME_TIME * cycle.end));
  return Float64Array.from([...edges, ...between].filter((time) => time <= cycle.end)).sort();
}
