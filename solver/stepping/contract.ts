/**
 * What stepping promises to the rooms above it.
 *
 * A run takes one step at a time and owns time; whoever watches it sees every accepted step through `Step`, knows nothing of
 * the scheme or of the unknowns behind it, and may not change anything.
 */
import type { Energy, FaceId, LaidCycle, Outcome, SchemeName, Stability, Warning } from '../model';

/**
 * The points at which a field is reported, layer by layer from the start face to the end face.
 *
 * Every layer has a point at both its edges, so any interface has two points at one depth: equal temperatures where the
 * layers are bonded, different ones across a contact. Face points carry true face temperatures.
 */
export interface FieldPoints {
  /** Depth of each point, m. */
  readonly position: Float64Array;
  /** First point of every layer, and the number of points at the end: layers + 1 entries. */
  readonly layerStart: Int32Array;
}

/** One accepted step. Valid only while the observer runs: its arrays are used again by the next step. */
export interface Step {
  /** Cycle time at both ends, s. No stage edge and no kink of a schedule lies strictly inside. */
  readonly from: number;
  readonly to: number;
  /** Index of the stage that the step lies in. */
  readonly stage: number;
  /** Temperatures at the field's points at both ends, °C. */
  readonly before: Float64Array;
  readonly after: Float64Array;
  /**
   * Temperatures at all points at `fraction` (0 to 1) of the step, by the scheme's own dense output, °C: a polynomial of at
   * most the fourth degree in the fraction at every point, so that five values of a step tell all of it.
   */
  at(fraction: number, out: Float64Array): void;
  /** sum of weights[i] × temperature of points[i], at `fraction` of the step, °C. */
  combinationAt(points: ArrayLike<number>, weights: ArrayLike<number>, fraction: number): number;
  /** Heat flux into the part at a face, W/m². */
  faceFluxAt(face: FaceId, fraction: number): number;
}

export type StepObserver = (step: Step) => void;

/** One run of one plan. */
export interface Run {
  readonly points: FieldPoints;
  readonly cycle: LaidCycle;
  /** Temperatures at the points at time 0, °C. */
  readonly start: Float64Array;
  /** Cycle time reached, s. */
  readonly time: number;
  /** Takes one accepted step and shows it to the observer; the outcome when the run has ended, null while it goes on. */
  advance(): Outcome | null;
  energy(): Energy;
  readonly stability: Stability | null;
  figures(): { scheme: SchemeName; method: string; steps: number; rejected: number; volumes: number; factorisations: number };
  warnings(): Warning[];
}
