/**
 * The run loop: it owns time. It walks from edge to edge of the cycle, asks the scheme for steps in between, books each in the
 * audit and shows it, and gives up with a reason when a step cannot be taken or there are too many.
 */
import type { HeatSystem } from '../heat';
import { Audit } from './audit';
import type { CycleInterval } from './intervals';
import type { FailedStep, HeatState, Scheme } from './scheme';

export type Ending =
  { readonly reason: 'finished' } | { readonly reason: 'too-many-steps' } | { readonly reason: FailedStep; readonly row: number };

/** Told of every accepted step, and before it where the state may have jumped at the start of an interval. */
export interface LoopObserver {
  interval(interval: CycleInterval): void;
  step(from: number, to: number, interval: CycleInterval): void;
}

export class RunLoop {
  readonly audit: Audit;
  time = 0;
  steps = 0;
  rejected = 0;
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly scheme: Scheme;
  private readonly intervals: readonly CycleInterval[];
  private readonly observer: LoopObserver;
  private readonly mostSteps: number;
  private at = -1;
  private ending: Ending | null = null;

  constructor(
    system: HeatSystem,
    state: HeatState,
    scheme: Scheme,
    intervals: readonly CycleInterval[],
    observer: LoopObserver,
    mostSteps: number,
  ) {
    this.system = system;
    this.state = state;
    this.scheme = scheme;
    this.intervals = intervals;
    this.observer = observer;
    this.mostSteps = mostSteps;
    this.audit = new Audit(system, state);
  }

  /** One accepted step; how the run ended, with its last step or instead of one, or null. */
  advance(): Ending | null {
    if (this.ending !== null) throw new Error('the run has ended; it cannot advance');
    if (this.at < 0 || this.time >= this.intervals[this.at].to) this.enterNext();
    this.ending = this.takeStep();
    return this.ending;
  }

  private enterNext(): void {
    if (this.at >= 0) this.scheme.leave(this.time);
    const interval = this.intervals[++this.at];
    this.system.enter(interval, this.state.unknowns, this.state.stored, this.state.through);
    this.scheme.begin(this.time, interval.jumped);
    this.observer.interval(interval);
  }

  private takeStep(): Ending | null {
    const interval = this.intervals[this.at];
    for (;;) {
      if (this.steps + this.rejected >= this.mostSteps) return { reason: 'too-many-steps' };
      const left = interval.to - this.time;
      const length = this.scheme.propose(left);
      const attempt = this.scheme.attempt(this.time, length);
      if (attempt.kind === 'failed') return { reason: attempt.reason, row: attempt.row };
      if (attempt.kind === 'rejected') {
        this.rejected++;
        continue;
      }
      this.steps++;
      const from = this.time;
      // The edge itself, not what adding up lengths makes of it.
      this.time = length >= left * (1 - 1e-9) ? interval.to : from + length;
      this.audit.book(this.time);
      this.observer.step(from, this.time, interval);
      const done = this.time >= interval.to && this.at === this.intervals.length - 1;
      return done ? { reason: 'finished' } : null;
    }
  }
}
