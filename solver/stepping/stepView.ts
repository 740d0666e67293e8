import type { HeatSystem } from '../heat';
import type { FaceId } from '../model';
import type { Step } from './contract';
import type { HeatState, Scheme } from './scheme';

/** What an observer sees of the scheme's last step. */
export class StepView implements Step {
  from = 0;
  to = 0;
  stage = 0;
  before: Float64Array;
  after: Float64Array;
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly scheme: Scheme;
  private readonly faceArea: readonly [number, number];
  /** Unknowns and field at a fraction, where points are not plain unknowns. */
  private readonly unknowns: Float64Array;
  private readonly field: Float64Array;
  private fieldFraction = NaN;

  /** `faceArea`: of the start and the end face, m² per basis. */
  constructor(system: HeatSystem, state: HeatState, scheme: Scheme, faceArea: readonly [number, number]) {
    this.faceArea = faceArea;
    this.system = system;
    this.state = state;
    this.scheme = scheme;
    this.before = new Float64Array(system.points);
    this.after = new Float64Array(system.points);
    this.unknowns = new Float64Array(system.size);
    this.field = new Float64Array(system.points);
  }

  /** Takes the state at the start of an interval as the start of the next step. */
  startFrom(time: number): void {
    this.system.report(this.state.unknowns, time, this.after);
  }

  /** Shows the step that the scheme took last. */
  show(from: number, to: number, stage: number): void {
    this.from = from;
    this.to = to;
    this.stage = stage;
    this.fieldFraction = NaN;
    [this.before, this.after] = [this.after, this.before];
    this.system.report(this.state.unknowns, to, this.after);
  }

  at(fraction: number, out: Float64Array): void {
    for (let row = 0; row < this.unknowns.length; row++) this.unknowns[row] = this.scheme.unknownAt(row, fraction);
    this.system.report(this.unknowns, this.timeAt(fraction), out);
  }

  combinationAt(points: ArrayLike<number>, weights: ArrayLike<number>, fraction: number): number {
    const { pointUnknown } = this.system;
    let sum = 0;
    for (let i = 0; i < points.length; i++) {
      const row = pointUnknown[points[i]];
      sum += weights[i] * (row >= 0 ? this.scheme.unknownAt(row, fraction) : this.fieldAt(fraction)[points[i]]);
    }
    return sum;
  }

  faceFluxAt(face: FaceId, fraction: number): number {
    const heat = face === 'start' ? 0 : 1;
    const byLaw = this.system.rateAt(heat, (row) => this.scheme.unknownAt(row, fraction), this.timeAt(fraction));
    const area = this.faceArea[heat];
    // A centre has no area, and nothing flows through it.
    return area > 0 ? (byLaw ?? this.scheme.heatRateAt(heat, fraction)) / area : 0;
  }

  private timeAt(fraction: number): number {
    return this.from + fraction * (this.to - this.from);
  }

  private fieldAt(fraction: number): Float64Array {
    if (fraction !== this.fieldFraction) {
      this.at(fraction, this.field);
      this.fieldFraction = fraction;
    }
    return this.field;
  }
}
