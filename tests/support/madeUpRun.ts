/** Made-up runs: analytic fields seen through steps, so that measures can be tested without a solver. */
import { layCycle, type Project } from '../../solver/model';
import { createMeasures, type Measured } from '../../solver/measures';
import type { FieldPoints, Step } from '../../solver/stepping';

/**
 * Temperature, °C, at a depth (m) and a cycle time (s). `point` is the index of the point, for the two sides of a contact;
 * `stage` the index of the stage, for a jump at its edge.
 */
export type FieldFunction = (depth: number, time: number, point: number, stage: number) => number;

/** Equally spaced points, so many a layer, both edges included. */
export function equalPoints(thickness: readonly number[], count: number | readonly number[]): FieldPoints {
  const position: number[] = [];
  const layerStart = [0];
  let edge = 0;
  thickness.forEach((length, layer) => {
    const points = typeof count === 'number' ? count : count[layer];
    for (let i = 0; i < points; i++) position.push(edge + (length * i) / (points - 1));
    edge += length;
    layerStart.push(position.length);
  });
  return { position: Float64Array.from(position), layerStart: Int32Array.from(layerStart) };
}

const NODES = [0, 0.25, 0.5, 0.75, 1];

/** A step whose dense output is, at every point, the quartic through five values of the field at equal times. */
export function madeUpStep(points: FieldPoints, field: FieldFunction, from: number, to: number, stage = 0): Step {
  const rows = NODES.map((u) => Float64Array.from(points.position, (x, i) => field(x, from + u * (to - from), i, stage)));
  const weights = (fraction: number): number[] =>
    NODES.map((node) => NODES.reduce((w, other) => (other === node ? w : (w * (fraction - other)) / (node - other)), 1));
  const at = (fraction: number, out: Float64Array): void => {
    const w = weights(fraction);
    out.forEach((_, i) => (out[i] = rows.reduce((sum, row, k) => sum + w[k] * row[i], 0)));
  };
  return {
    from,
    to,
    stage,
    before: rows[0],
    after: rows[4],
    at,
    combinationAt(chosen, factors, fraction) {
      const profile = new Float64Array(points.position.length);
      at(fraction, profile);
      return Array.from(chosen).reduce((sum, point, i) => sum + factors[i] * profile[point], 0);
    },
    faceFluxAt: (face, fraction) => (face === 'start' ? 1 : -1) * (from + fraction * (to - from)),
  };
}

export interface Play {
  /** So many equal steps a stage (default 20), or the ends of all steps. */
  steps?: number | readonly number[];
  /** Cycle time at which the run stops. */
  until?: number;
  points?: FieldPoints;
}

/** What measures make of a field over the cycle of a project, stage edges never inside a step. */
export function playField(project: Project, field: FieldFunction, play: Play = {}): Measured {
  const cycle = layCycle(project);
  const points =
    play.points ??
    equalPoints(
      project.part.layers.map(({ thickness }) => thickness),
      11,
    );
  const start = Float64Array.from(points.position, (x, i) => field(x, 0, i, 0));
  const measures = createMeasures(project, { points, cycle, start });
  const steps = play.steps ?? 20;
  let from = 0;
  cycle.stages.forEach((stage, index) => {
    const ends =
      typeof steps === 'number'
        ? Array.from({ length: steps }, (_, i) => stage.start + ((stage.end - stage.start) * (i + 1)) / steps)
        : steps.filter((time) => time > stage.start && time <= stage.end);
    if (ends.at(-1) !== stage.end) ends.push(stage.end);
    else ends[ends.length - 1] = stage.end;
    for (const to of ends) {
      if (to > (play.until ?? Infinity)) return;
      measures.observe(madeUpStep(points, field, from, to, index));
      from = to;
    }
  });
  return measures.measured();
}
