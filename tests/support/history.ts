/** What a run says at given depths and times, read from the dense output of its steps. */
import { stencilAt, type FieldPoints } from '../../solver/grid';
import type { Energy, FaceId, Project } from '../../solver/model';
import { checkProject } from '../../solver/model';
import { createRun, type Run } from '../../solver/stepping';

/** A depth from the start face, m; at an edge of layers also the index of the layer it is read in. */
export type Depth = number | { depth: number; layer: number };

/** Temperature at a depth, °C. */
export type Profile = (at: Depth) => number;

export interface Solved {
  /** Profile at each time asked for, in their order. */
  profiles: Profile[];
  /** Flux into the part at each time, W/m². */
  flux: Record<FaceId, number>[];
  /** At the end. */
  energy: Energy;
  run: Run;
}

/** Most that the heat stored may differ from the heat that came in, in parts of all heat exchanged. */
const CLOSURE = 1e-9;

/** Runs a plan to its end and keeps what was asked for. Throws where the plan or the run fails, or heat is lost on the way. */
export function solved(project: Project, times: number[]): Solved {
  const checked = checkProject(project);
  if (checked.kind !== 'project') throw new Error(`the plan has a problem: ${JSON.stringify(checked)}`);
  const fields: Float64Array[] = [];
  const flux: Record<FaceId, number>[] = [];
  const order = times.map((_, i) => i).sort((a, b) => times[a] - times[b]);
  let next = 0;
  const run: Run = createRun(checked.project, (step) => {
    while (next < order.length && times[order[next]] <= step.to) {
      const fraction = (times[order[next]] - step.from) / (step.to - step.from);
      const field = new Float64Array(run.points.position.length);
      step.at(Math.max(0, fraction), field);
      fields[order[next]] = field;
      flux[order[next]] = { start: step.faceFluxAt('start', fraction), end: step.faceFluxAt('end', fraction) };
      next++;
    }
  });
  const outcome = toTheEnd(run);
  if (outcome.reason !== 'finished') throw new Error(`the run ended with ${outcome.reason}: ${outcome.message}`);
  if (next < order.length) throw new Error(`the cycle ends before ${times[order[next]]} s`);
  const energy = run.energy();
  if (!(energy.closure <= CLOSURE)) throw new Error(`heat is not kept: closure ${energy.closure}`);
  return { profiles: fields.map((field) => profileOf(run.points, field)), flux, energy, run };
}

/** Takes steps until the run says how it ended. */
export function toTheEnd(run: Run) {
  for (;;) {
    const outcome = run.advance();
    if (outcome !== null) return outcome;
  }
}

function profileOf(points: FieldPoints, field: Float64Array): Profile {
  return (at) => {
    const stencil = typeof at === 'number' ? stencilAt(points, at) : stencilAt(points, at.depth, at.layer);
    return stencil.points.reduce((sum, point, i) => sum + stencil.weights[i] * field[point], 0);
  };
}

/** Temperatures, °C: a row for every time, a column for every depth. */
export function temperaturesAt(project: Project, depths: Depth[], times: number[]): number[][] {
  return solved(project, times).profiles.map((profile) => depths.map(profile));
}

/** Depth where a profile that rises from `from` to `to` passes a temperature, m. */
export function depthWhere(profile: Profile, temperature: number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (profile(middle) < temperature) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
