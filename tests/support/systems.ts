/** Bodies for tests of schemes and of balances: a wall with sources in it, and a single decaying mode. */
import { gridOf, temperatureRange, wallLayers } from '../../solver/grid';
import { WallSystem, type HeatSystem, type Interval, type StorageKind } from '../../solver/heat';
import { layCycle, type LaidCycle, type Project } from '../../solver/model';
import { startState, type HeatState } from '../../solver/stepping';

/** A laid cycle's first stage as one interval. */
export const wholeStage = (cycle: LaidCycle): Interval => ({ stage: 0, from: cycle.stages[0].start, to: cycle.stages[0].end });

/** The balances of a plan at the start of its first stage, and their state. */
export function systemOf(project: Project, storage: StorageKind): { system: WallSystem; state: HeatState } {
  const cycle = layCycle(project);
  const layers = wallLayers(project);
  const { kind, innerRadius } = project.part;
  const grid = gridOf(project.settings, layers, cycle, temperatureRange(layers, cycle), { kind, innerRadius });
  const system = new WallSystem(layers, grid, cycle, storage);
  const state = startState(system);
  system.enter(wholeStage(cycle), state.unknowns, state.stored, state.through);
  return { system, state };
}

/**
 * Steady temperatures of a linear wall with a source of its own: 0 = F(u) + C g, where g is the source at every unknown, W/m³,
 * spread over the rows as the wall spreads its heat (C = dS/du at ρ c = 1).
 */
export function steadyWithSource(system: WallSystem, { unknowns: u }: HeatState, sourceAt: ArrayLike<number>): Float64Array {
  const source = new Float64Array(system.size);
  const rightHandSide = new Float64Array(system.size);
  system.evaluate(u, 0);
  system.linearise(u, 0);
  system.capacityTimes(Float64Array.from(sourceAt), source);
  for (let row = 0; row < system.size; row++) rightHandSide[row] = system.inflow[row] + source[row];
  system.heldChanges(u, 0, 0, rightHandSide);
  system.factorise(0, 1);
  system.solve(rightHandSide);
  return u.map((value, row) => value + rightHandSide[row]);
}

/** One unknown that decays by itself: du/dt = −rate u, from `initial`. The mode of a body whose shape is exact. */
export class DecayingMode implements HeatSystem {
  readonly size = 1;
  readonly heatRows = 1;
  readonly heats = 1;
  readonly linear = true;
  readonly points = 1;
  readonly pointUnknown = Int32Array.of(0);
  readonly storage = new Float64Array(1);
  readonly inflow = new Float64Array(1);
  readonly rates = new Float64Array(1);
  readonly inflowSlope = new Float64Array(1);
  readonly rateSlopes = new Float64Array(1);
  readonly rowCapacity = Float64Array.of(1);
  readonly heldRows: readonly number[] = [];
  factorisations = 0;
  private readonly rate: number;
  private readonly amplitude: number;
  private shifted = 1;

  constructor(rate: number, initial: number) {
    this.rate = rate;
    this.amplitude = initial;
  }

  initial(): Float64Array {
    return Float64Array.of(this.amplitude);
  }
  enter(): void {}
  evaluate(u: Float64Array): void {
    this.storage[0] = u[0];
    this.inflow[0] = this.rates[0] = -this.rate * u[0];
  }
  linearise(): void {}
  factorise(a: number, b: number): void {
    this.factorisations++;
    this.shifted = a + b * this.rate;
  }
  solve(rightHandSide: Float64Array): void {
    rightHandSide[0] /= this.shifted;
  }
  capacityTimes(x: Float64Array, out: Float64Array): void {
    out[0] = x[0];
  }
  rateTimes(_heat: number, x: Float64Array): number {
    return -this.rate * x[0];
  }
  evenOutRates() {
    return { diagonal: Float64Array.of(this.rate), beside: new Float64Array(0) };
  }
  heldChanges(): void {}
  hold(): void {}
  largestChange(_u: ArrayLike<number>, x: ArrayLike<number>): { kelvin: number; row: number } {
    return { kelvin: Math.abs(x[0]), row: 0 };
  }
  report(u: Float64Array, _time: number, out: Float64Array): void {
    out[0] = u[0];
  }
  rateAt(_heat: number, u: (row: number) => number): number {
    return -this.rate * u(0);
  }
}
