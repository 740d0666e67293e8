/**
 * The way from one unknown to another of the next layer: with nodes the contact or gap alone, with cells half a cell, the
 * contact or gap (or nothing), and half a cell. Flux is the same all along:
 *
 *   q = g1 (Θ1(T1) − Θ1(a)) = across(a, b) = g2 (Θ2(b) − Θ2(T2))
 *
 * a and b temperatures of the two walls. q, and by T1 and T2, with G = g k at the wall and G' at the unknown:
 *
 *   dq (1 + across_a/G1 − across_b/G2) = across_a G1'/G1 dT1 + across_b G2'/G2 dT2
 */
import type { Across } from './gap';
import { crossing, type HalfCell } from './halfCell';

export class Junction {
  /** Whether q is straight in T1 and T2. */
  readonly constant: boolean;
  /** After `at`: q [W/m²] from the first unknown to the second, ∂q/∂T1, ∂q/∂T2, and the temperatures of both walls. */
  flux = 0;
  perFirst = 0;
  perSecond = 0;
  firstWall = 0;
  secondWall = 0;
  private readonly before: HalfCell | null;
  private readonly across: Across | null;
  private readonly after: HalfCell | null;

  /** `across` null is perfect contact, which only cells have a junction for: bonded nodes are one. */
  constructor(before: HalfCell | null, across: Across | null, after: HalfCell | null) {
    this.before = before;
    this.across = across;
    this.after = after;
    this.constant = [before?.curves, across, after?.curves].every((part) => part?.constant ?? true);
  }

  at(first: number, second: number): void {
    const { before, across, after } = this;
    if (before === null || after === null) {
      if (across === null) throw new Error('bonded nodes are one');
      across.at(first, second);
      this.flux = across.flux;
      this.perFirst = across.perFirst;
      this.perSecond = across.perSecond;
      this.firstWall = first;
      this.secondWall = second;
      return;
    }
    if (this.constant) this.inSeries(before, after, first, second);
    else if (across === null) this.bonded(before, after, first, second);
    else this.balance(before, across, after, first, second);
  }

  private inSeries(before: HalfCell, after: HalfCell, first: number, second: number): void {
    const own = resistanceOf(before, first);
    const next = resistanceOf(after, second);
    const between = this.across === null ? 0 : 1 / this.across.perFirst;
    this.perFirst = 1 / (own + between + next);
    this.perSecond = -this.perFirst;
    this.flux = this.perFirst * (first - second);
    this.firstWall = first - own * this.flux;
    this.secondWall = this.across === null ? this.firstWall : second + next * this.flux;
  }

  private bonded(before: HalfCell, after: HalfCell, first: number, second: number): void {
    const wall = crossing(
      (at, out) => {
        out.value = fluxInto(before, first, at) - fluxInto(after, at, second);
        out.slope = -conductance(before, at) - conductance(after, at);
      },
      (first + second) / 2,
      Math.min(first, second),
      Math.max(first, second),
    );
    this.firstWall = this.secondWall = wall;
    this.flux = fluxInto(before, first, wall);
    const [own, next] = [conductance(before, wall), conductance(after, wall)];
    const stiffness = 1 / own + 1 / next;
    this.perFirst = conductance(before, first) / own / stiffness;
    this.perSecond = -conductance(after, second) / next / stiffness;
  }

  /** The second wall answers the first one, whose balance is then solved: each crosses zero once. */
  private balance(before: HalfCell, across: Across, after: HalfCell, first: number, second: number): void {
    const [low, high] = [Math.min(first, second), Math.max(first, second)];
    const answer = (wall: number): number =>
      crossing(
        (at, out) => {
          across.at(wall, at);
          out.value = across.flux - fluxInto(after, at, second);
          out.slope = across.perSecond - conductance(after, at);
        },
        second,
        low,
        high,
      );
    const wall = crossing(
      (at, out) => {
        const other = answer(at);
        across.at(at, other);
        const next = conductance(after, other);
        out.value = fluxInto(before, first, at) - across.flux;
        out.slope = -conductance(before, at) - (across.perFirst * next) / (next - across.perSecond);
      },
      first,
      low,
      high,
    );
    this.firstWall = wall;
    this.secondWall = answer(wall);
    across.at(wall, this.secondWall);
    this.flux = across.flux;
    const [own, next] = [conductance(before, wall), conductance(after, this.secondWall)];
    const stiffness = 1 + across.perFirst / own - across.perSecond / next;
    this.perFirst = (across.perFirst * conductance(before, first)) / own / stiffness;
    this.perSecond = (across.perSecond * conductance(after, second)) / next / stiffness;
  }
}

const conductance = ({ curves, inverseDistance }: HalfCell, at: number): number => inverseDistance * curves.conductivity(at);
const resistanceOf = (half: HalfCell, at: number): number => 1 / conductance(half, at);
/** Flux through half a cell from the warmer side named first, W/m². */
const fluxInto = ({ curves, inverseDistance }: HalfCell, from: number, to: number): number =>
  inverseDistance * (curves.conductionIntegral(from) - curves.conductionIntegral(to));
