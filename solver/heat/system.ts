/**
 * What a scheme knows of a body: balances of heat, whatever its shape.
 *
 *   d/dt S(u) = F(u, t)        one row per unknown: S [J] heat stored, F [W] heat flowing in, both per m² of a wall, per m of a
 *                             cylinder, or of a whole sphere
 *
 * u holds the unknowns: the temperature of every node first, then whatever else the body carries (lumped bodies and readings
 * beside it, states of a reaction inside its nodes). How such rows couple is the body's own affair: `solve` may condense
 * extras node by node and solve companions as a border, and no scheme notices.
 *
 * A body promises:
 * 1. The heat rows of F sum to the tracked heats: whatever flows between rows cancels to rounding. That makes every scheme's audit
 *    close by construction.
 * 2. `evaluate` and `linearise` leave S, F and their derivatives at (u, time) in the arrays named here, which are used again.
 * 3. Inside an interval every schedule is straight, and its value at the ends is taken from inside.
 * 4. `solve` is direct and accurate to rounding.
 * 5. A row whose temperature is held has no balance of its own: its F is zero, because the heat that holds it answers whatever
 *    flows, and what its unknown does is known beforehand. Its row in `factorise` is a unit row, its change stands in
 *    `heldChanges`, and `hold` books what its own storage took. All other duties hold for it as they stand.
 */

import type { SymmetricTridiagonal } from '../linear';

/** A stretch of cycle time with no stage edge, jump or kink strictly inside, s. */
export interface Interval {
  readonly stage: number;
  readonly from: number;
  readonly to: number;
}

export interface HeatSystem {
  /** Number of unknowns, and of rows; the first `heatRows` of them store heat, the others something of their own. */
  readonly size: number;
  readonly heatRows: number;
  /** Number of tracked heats: what enters the body through each face or from each source. */
  readonly heats: number;
  /** Whether S and F are linear in u. */
  readonly linear: boolean;

  /** After `evaluate`: S(u), F(u, t), and the rate q of every tracked heat, W. */
  readonly storage: Float64Array;
  readonly inflow: Float64Array;
  readonly rates: Float64Array;
  /** After `linearise`: ∂F/∂t and ∂q/∂t by every scheduled term, and the sum of each row of dS/du. */
  readonly inflowSlope: Float64Array;
  readonly rateSlopes: Float64Array;
  readonly rowCapacity: Float64Array;
  /** Matrices factorised so far. */
  readonly factorisations: number;

  /** Unknowns at the start, before any exposure acts. */
  initial(): Float64Array;
  /**
   * Takes up the exposures of an interval; all calls after it speak of times inside. Where a held temperature jumps, the
   * unknown jumps at once, and the heat that takes came through its heat.
   */
  enter(interval: Interval, u: Float64Array, stored: Float64Array, through: Float64Array): void;
  evaluate(u: Float64Array, time: number): void;
  linearise(u: Float64Array, time: number): void;

  /** Factorises a dS/du − b dF/du of the last `linearise`; does nothing if that very matrix is factorised already. */
  factorise(a: number, b: number): void;
  /** Solves by the matrix factorised last; the solution takes the place of the right-hand side. */
  solve(rightHandSide: Float64Array): void;
  /** out = dS/du × x */
  capacityTimes(x: Float64Array, out: Float64Array): void;
  /** ∂q/∂u × x of one tracked heat. */
  rateTimes(heat: number, x: Float64Array): number;

  /**
   * The rates at which the heat rows of the last `linearise` even out, −dF/du over dS/du, in symmetric form; held rows have none.
   * With plain storage only, where dS/du is diagonal. The matrix is used again.
   */
  evenOutRates(): SymmetricTridiagonal;

  /** Rows that are held in this interval. */
  readonly heldRows: readonly number[];
  /**
   * Writes the change of every held unknown into its row of a right-hand side: to its temperature at `time`, and for
   * `ahead` (s) further at the rate at which that changes.
   */
  heldChanges(u: Float64Array, time: number, ahead: number, rightHandSide: Float64Array): void;
  /** Sets held unknowns to their value at `time`; what their rows then store more than `stored` came through their heats. */
  hold(u: Float64Array, time: number, stored: Float64Array, through: Float64Array): void;

  /** Largest change of temperature, K, that a change x of unknowns u means, and its row. The object is used again. */
  largestChange(u: ArrayLike<number>, x: ArrayLike<number>): { kelvin: number; row: number };
  /** Number of points of the reported field; `report` writes the temperatures there. */
  readonly points: number;
  report(u: Float64Array, time: number, out: Float64Array): void;
  /** Unknown that a point reports as it is, or −1 where it takes `report` to know. */
  readonly pointUnknown: Int32Array;
  /** Flux of a tracked heat by the law of its exposure; null where it does not follow from temperatures. W per basis. */
  rateAt(heat: number, u: (row: number) => number, time: number): number | null;
}
