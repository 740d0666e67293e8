/**
 * What stepping promises to the rooms above it.
 *
 * A run takes one step at a time and owns time; whoever watches it sees every accepted step through `Step`, knows nothing of
 * the scheme or of the unknowns behind it, and may not change anything.
 */
import type { FieldPoints } from '../grid';
import type { Energy, FaceId, LaidCycle, Outcome, SchemeName, Stability, Warning } from '../model';

export type { FieldPoints };

/** One accepted step. Valid only while the observer runs: its arrays are used again by the next step. */
export interface Step {
  /** Cycle time at both ends, s. No stage edge and no kink of a schedule lies strictly inside. */
  readonly from: number;
  readonly to: number;
  /** Index of the stage that the step lies in. */
  readonly stage: number;
  /**
   * Temperatures at the field's points at both ends, °C. `before` is the last step's `after`, except that a face may jump
   * where its exposure does: a face held at a temperature, or a face of a grid of cells, which has no heat of its own.
   */
  readonly before: Float64Array;
  readonly after: Float64Array;
  /**
   * Temperatures at all points at `fraction` (0 to 1) of the step, by the scheme's own dense output, °C: a polynomial of at
   * most the fourth degree in the fraction at every point, so that five values of a step tell all of it. (Nearly so at the
   * face of a grid of cells while its film coefficient changes, and where a point takes up latent heat.)
   */
  at(fraction: number, out: Float64Array): void;
  /** sum of weights[i] × temperature of points[i], at `fraction` of the step, °C. */
  combinationAt(points: ArrayLike<number>, weights: ArrayLike<number>, fraction: number): number;
  /**
   * Heat flux into the part at a face, W/m²: by the exposure's law from the temperatures of the dense output; where a
   * temperature is held, the rate of the heat that the scheme sent through the face.
   */
  faceFluxAt(face: FaceId, fraction: number): number;
}

export type StepObserver = (step: Step) => void;

/**
 * One run of one plan, made by `createRun(project, observer)` of this folder.
 *
 * A plan that is refused (an explicit step above its limit, more steps than anyone would wait for) is a run as well: its
 * first `advance` returns the outcome, its stability says why, and no step was taken.
 */
export interface Run {
  readonly points: FieldPoints;
  readonly cycle: LaidCycle;
  /** Temperatures at the points at time 0, before any exposure acts, °C. */
  readonly start: Float64Array;
  /** Cycle time reached, s. */
  readonly time: number;
  /**
   * Takes one accepted step and shows it to the observer; the outcome when the run has ended, null while it goes on. The
   * outcome comes with the last step or instead of one. Throws when the run has ended before.
   */
  advance(): Outcome | null;
  energy(): Energy;
  /** Null where the part has no such limit. Computed when first asked for. */
  readonly stability: Stability | null;
  figures(): { scheme: SchemeName; method: string; steps: number; rejected: number; volumes: number; factorisations: number };
  warnings(): Warning[];
}
