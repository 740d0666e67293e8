/**
 * What a run gives back: plain data, so that it can cross a port.
 *
 * Times are cycle time in s, null if never; depths in m from the start face; temperatures in °C, differences in K.
 */
import type { FaceId } from './part';
import type { SchemeName } from './settings';

export const VERDICTS = ['met', 'thin', 'not-met', 'never-reached', 'cannot-be-judged'] as const;
/**
 * met; thin: met as computed, but the limit lies inside the 95 % interval; not-met (also when the interval reaches the
 * limit); never-reached; cannot-be-judged (the run ended before it could be).
 */
export type Verdict = (typeof VERDICTS)[number];

/** A piece of a requirement's bar on the time axis. */
export interface Span {
  from_s: number;
  to_s: number;
  /** counting: inside its window; holding: the condition holds; fulfilled: held long enough; violated: a limit is broken. */
  kind: 'counting' | 'holding' | 'fulfilled' | 'violated';
}

/** A requirement's verdict. Margin is positive when good: in K for limits, in s for "within" and "held for". */
export interface Answer {
  requirement: string;
  name: string;
  verdict: Verdict;
  /** true for met and thin, false for not-met and never-reached, null when it cannot be judged. */
  met: boolean | null;
  /** When it was met, or when it was worst; null if never. */
  time_s: number | null;
  stage: string | null;
  stage_time_s: number | null;
  /** The figure that decides: a temperature or difference at its closest or worst, or the longest time held. */
  value: number | null;
  limit: number;
  margin: number | null;
  /** Unit of value and limit. */
  unit: '°C' | 'K' | 's';
  margin_unit: 'K' | 's';
  /**
   * Numerical uncertainty, from grid and step: half the width of the 95 % interval of the margin, in `margin_unit`. Null
   * while it is not known yet, and where finer runs disagree on more than a number (a warning then says so).
   */
  uncertainty: number | null;
  /** The same of `value`, in `unit`. */
  value_uncertainty: number | null;
  /** The same of `time_s`, where it is the time of a crossing; null for times of extremes and of stage ends. */
  time_uncertainty_s: number | null;
  /** Depth of the point that decides, for the coldest or hottest point; null otherwise. */
  position_m: number | null;
  spans: Span[];
}

/** The answers that come unasked, from the dense field at every step; null where nothing changes. */
export interface FirstAnswers {
  /** Of the last stage that heats, or, if none heats, of the last one that changes. */
  slowest: Slowest | null;
  hottest: { position_m: number; layer: string; time_s: number; temperature_C: number } | null;
  largestDifference: LargestDifference | null;
  /** Largest difference within one piece of one material. */
  largestDifferenceInMaterial: (LargestDifference & { material: string }) | null;
}
/** The place last to close 95 % of its own change in a stage; time in cycle time, layer and stage by id. */
export interface Slowest {
  position_m: number;
  layer: string;
  stage: string;
  time_s: number;
}
export interface LargestDifference {
  value_K: number;
  time_s: number;
  /** Depths of the coldest and the hottest point. */
  between: [number, number];
}

/** History of a probe: every step, every extreme and every output row, double precision. A jump is two rows at one time. */
export interface ProbeHistory {
  probe: string;
  name: string;
  position_m: number;
  time_s: Float64Array;
  temperature_C: Float64Array;
}

/** Quantities over the whole field at every step and every output row, for the difference lane. */
export interface FieldHistory {
  time_s: Float64Array;
  coldest_C: Float64Array;
  hottest_C: Float64Array;
  /** Largest difference within one piece of one material, K. */
  withinMaterial_K: Float64Array;
}

/** Profiles for the animation: at most 600, at equal times plus stage edges and events, from dense output. */
export interface Frames {
  time_s: Float64Array;
  /** Depths, one per point; a contact, or any layer edge, has two points at one depth. */
  position_m: Float64Array;
  /** Index of the first point of every layer, and the number of points at the end. */
  layerStart: Int32Array;
  /** Row by row: temperature_C[frame * points + point]. */
  temperature_C: Float32Array;
  /** Heat flux into the part at the start and end face, W/m²: faceFlux_W_m2[frame * 2 + face]. */
  faceFlux_W_m2: Float32Array;
}

/** A stage that was begun, as it came out: its times, and the place in it that was last to close 95 % of its own change. */
export interface StageTimes {
  stage: string;
  name: string;
  start_s: number;
  end_s: number;
  /** null where nothing changes by 1 K or more. */
  slowest: Slowest | null;
}

export interface Energy {
  /** What heats are per: m² of a wall, m of a cylinder, or a whole sphere. */
  basis: 'J/m²' | 'J/m' | 'J';
  /** Heat through both faces, positive into the part. */
  in_J: number;
  byFace_J: Record<FaceId, number>;
  /** Heat given off inside, by sources and reactions. */
  generated_J: number;
  stored_J: number;
  /** |ΔE − ΣQ| / Σ|Q|; 0 if nothing is exchanged. */
  closure: number;
  /** Largest distance between carried heat and the temperatures, as a temperature. */
  lag_K: number;
}

export interface Stability {
  /** Largest stable step of the explicit scheme on this grid, 2/λmax rounded down 0.1 %. */
  explicit_limit_s: number;
  /** Largest step without overshoot: the smallest capacity over conductance of any volume. */
  no_overshoot_s: number;
  set_by: { layer: string; position_m: number };
}

/** Every way a run can end. `finished` alone is a success; see OUTCOMES in stepping for causes and remedies. */
export type OutcomeReason =
  | 'finished'
  | 'cancelled'
  | 'step-above-limit'
  | 'step-too-small'
  | 'not-converged'
  | 'not-finite'
  | 'too-many-steps'
  | 'invalid-project';

export interface Outcome {
  reason: OutcomeReason;
  /** How far it came, s. */
  reached_s: number;
  stage: string | null;
  /** What happened, where, and what to do: one or two plain sentences; null when finished. */
  message: string | null;
  /** For step-above-limit: what would do. */
  remedy?: { step_s: number; nodes: number | null };
}

export interface SolverFigures {
  scheme: SchemeName;
  /** Name of the method that took the steps. */
  method: string;
  steps: number;
  rejected: number;
  volumes: number;
  factorisations: number;
  kernels: 'typescript' | 'wasm';
  wall_s: number;
}

/** What the uncertainty of the answers was drawn from: runs on finer and coarser grids, steps or accuracies; one entry each. */
export type Refinement = {
  of: 'accuracy' | 'grid' | 'step';
  /** Runs compared, this one among them. */
  runs: number;
  /** Middle one of the orders of convergence observed; null where none was. */
  order: number | null;
}[];

export interface Warning {
  code: string;
  message: string;
  /** Place in the project document that it is about, if any. */
  place: string | null;
}

/** All that one case of a job gives back. */
export interface RunResult {
  outcome: Outcome;
  answers: Answer[];
  first: FirstAnswers;
  stages: StageTimes[];
  probes: ProbeHistory[];
  field: FieldHistory;
  frames: Frames;
  energy: Energy;
  stability: Stability | null;
  solver: SolverFigures;
  /** Null until the answers carry their uncertainty, and where it cannot be known. */
  refinement: Refinement | null;
  warnings: Warning[];
}
