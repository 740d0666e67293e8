import { WallSystem } from '../heat';
import { largestEigenvalue } from '../linear';
import type { LaidCycle, Outcome, Project, Stability, Warning, Energy } from '../model';
import type { FieldPoints, Run, StepObserver } from './contract';
import { tooManySteps, wordFailure } from './endings';
import { makeScheme, type SchemeSettings } from './makeScheme';
import { prepare, type Prepared } from './prepare';
import { MOST_STEPS, refusalOf } from './refusal';
import { RunLoop, type Ending } from './runLoop';
import { startState, type Scheme } from './scheme';
import { wallLimit, type ExplicitLimit } from './stabilityLimit';
import { StepView } from './stepView';
import { depth, layerNamed, seconds } from './words';
import { warningsOf } from './warnings';

/** What heats are per: m² of a wall, m of a cylinder, or the whole sphere. */
const BASES = { wall: 'J/m²', cylinder: 'J/m', sphere: 'J' } as const;

/** Steps of the automatic scheme, rejected ones counted: it takes tens to thousands. */
const MOST_AUTOMATIC_STEPS = 500_000;

/**
 * A run of a checked plan; `observer` is shown every accepted step. Never throws for what a plan says: a plan that cannot be
 * run is a run whose first `advance` returns the outcome.
 */
export function createRun(project: Project, observer: StepObserver): Run {
  return new WallRun(prepare(project), observer);
}

class WallRun implements Run {
  readonly points: FieldPoints;
  readonly cycle: LaidCycle;
  readonly start: Float64Array;
  private readonly prepared: Prepared;
  private readonly settings: SchemeSettings;
  private readonly system: WallSystem;
  private readonly scheme: Scheme;
  private readonly loop: RunLoop;
  private readonly refusal: Outcome | null;
  private limit: ExplicitLimit | null | undefined;
  private ended = false;

  constructor(prepared: Prepared, observer: StepObserver) {
    const { layers, grid, cycle, points, settings, intervals } = prepared;
    const automatic = settings.scheme === 'automatic';
    this.prepared = prepared;
    this.settings = settings;
    this.points = points;
    this.cycle = cycle;
    this.system = new WallSystem(layers, grid, cycle, automatic ? 'fourthOrder' : 'plain');
    const state = startState(this.system);
    this.start = new Float64Array(this.system.points);
    this.system.report(state.unknowns, 0, this.start);
    this.scheme = makeScheme(settings, this.system, state, cycle.end);
    const view = new StepView(this.system, state, this.scheme, this.system.faceArea);
    const shown = {
      interval: () => view.startFrom(this.loop.time),
      step: (from: number, to: number, { stage }: { stage: number }) => {
        view.show(from, to, stage);
        observer(view);
      },
    };
    const mostSteps = automatic ? MOST_AUTOMATIC_STEPS : MOST_STEPS;
    this.loop = new RunLoop(this.system, state, this.scheme, intervals, shown, mostSteps);
    this.refusal = refusalOf(prepared, () => this.explicitLimit());
  }

  get time(): number {
    return this.loop.time;
  }

  advance(): Outcome | null {
    if (this.ended) throw new Error('the run has ended; it cannot advance');
    const outcome = this.refusal ?? this.outcomeOf(this.loop.advance());
    this.ended = outcome !== null;
    return outcome;
  }

  private outcomeOf(ending: Ending | null): Outcome | null {
    if (ending === null) return null;
    const { time } = this.loop;
    const stage = this.cycle.stages[this.stageIndex()].id;
    const words = ending.reason === 'finished' ? { message: null } : this.endingOf(ending);
    return { reason: ending.reason, reached_s: time, stage, ...words };
  }

  /** Index of the stage that the run is in, or ended in. */
  private stageIndex(): number {
    const { stages } = this.cycle;
    const next = stages.findIndex((stage) => this.loop.time < stage.end);
    return next < 0 ? stages.length - 1 : next;
  }

  private endingOf(ending: Exclude<Ending, { reason: 'finished' }>): Pick<Outcome, 'message' | 'remedy'> {
    const { loop, prepared, system } = this;
    const when = `at ${seconds(loop.time)}, in stage ${this.cycle.stages[this.stageIndex()].name}`;
    if (!('row' in ending)) return { message: tooManySteps(when, loop.steps + loop.rejected) };
    const place = system.placeOf(ending.row);
    const where = `${layerNamed(prepared.layers[place.layer].name)}, ${depth(place.depth)}`;
    return wordFailure(ending.reason, when, where, () => 2 / largestEigenvalue(system.evenOutRates()));
  }

  energy(): Energy {
    const { stored, through, closure, lag } = this.loop.audit.figures(this.loop.time);
    return {
      basis: BASES[this.prepared.grid.shape.kind],
      in_J: through[0] + through[1],
      byFace_J: { start: through[0], end: through[1] },
      generated_J: through.slice(2).reduce((sum, heat) => sum + heat, 0),
      stored_J: stored,
      closure,
      lag_K: lag,
    };
  }

  private explicitLimit(): ExplicitLimit | null {
    const { layers, grid, cycle, unusable } = this.prepared;
    if (this.limit === undefined) this.limit = unusable === null ? wallLimit(layers, grid, cycle) : null;
    return this.limit;
  }

  get stability(): Stability | null {
    const limit = this.explicitLimit();
    if (limit === null) return null;
    return {
      explicit_limit_s: limit.limit,
      no_overshoot_s: limit.noOvershoot,
      set_by: { layer: this.prepared.layers[limit.layer].name, position_m: limit.depth },
    };
  }

  figures(): ReturnType<Run['figures']> {
    const { steps, rejected } = this.loop;
    const { size, factorisations } = this.system;
    return { scheme: this.settings.scheme, method: this.scheme.method, steps, rejected, volumes: size, factorisations };
  }

  warnings(): Warning[] {
    return this.refusal === null ? warningsOf(this.prepared, () => this.explicitLimit(), this.energy()) : [];
  }
}
