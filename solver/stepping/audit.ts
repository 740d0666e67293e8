/** The energy audit of a run: stored = what came in, at every step, and how far temperatures lag behind the carried heat. */
import type { HeatSystem } from '../heat';
import type { HeatState } from './scheme';

const sumOf = (values: Float64Array): number => values.reduce((sum, value) => sum + value, 0);

export class Audit {
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly storedAtStart: Float64Array;
  private readonly counted: Float64Array;
  private exchanged = 0;
  private largestLag = 0;

  constructor(system: HeatSystem, state: HeatState) {
    this.system = system;
    this.state = state;
    this.storedAtStart = Float64Array.from(this.heatStored());
    this.counted = new Float64Array(system.heats);
  }

  /**
   * Books a step that ended at `time`. A body that is linear in its unknowns lags by rounding only; it is looked at when
   * asked for.
   */
  book(time: number): void {
    const { through } = this.state;
    for (let heat = 0; heat < through.length; heat++) {
      this.exchanged += Math.abs(through[heat] - this.counted[heat]);
      this.counted[heat] = through[heat];
    }
    if (!this.system.linear) this.largestLag = this.lagUpTo(time);
  }

  private heatStored(): Float64Array {
    return this.state.stored.subarray(0, this.system.heatRows);
  }

  /** The largest lag noted so far or found at `time`. Looking changes nothing: how often a run was asked leaves no trace in it. */
  private lagUpTo(time: number): number {
    const { system, state } = this;
    let largest = this.largestLag;
    system.evaluate(state.unknowns, time);
    for (let row = 0; row < system.heatRows; row++) {
      const lag = Math.abs((state.stored[row] - system.storage[row]) / system.rowCapacity[row]);
      if (lag > largest) largest = lag;
    }
    return largest;
  }

  /**
   * `stored` and `through` in J per basis since the start. Closure: |ΔE − ΣQ| / Σ|Q|, the last sum over all tracked heats and
   * steps, so that a cycle that gives back what it took has one too; 0 if nothing was exchanged. A millionth of the heat that
   * moved inside is added to it: of less exchange than that, ΔE is rounding. `lag` in K, the largest so far.
   */
  figures(time: number): { stored: number; through: Float64Array; closure: number; lag: number } {
    const { state, exchanged, storedAtStart } = this;
    const changes = this.heatStored().map((value, row) => value - storedAtStart[row]);
    const stored = sumOf(changes);
    const moved = sumOf(changes.map(Math.abs));
    const closure = exchanged > 0 ? Math.abs(stored - sumOf(state.through)) / (exchanged + 1e-6 * moved) : 0;
    return { stored, through: Float64Array.from(state.through), closure, lag: this.lagUpTo(time) };
  }
}
