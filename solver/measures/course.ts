/**
 * A scalar over one step: a probe's temperature, the coldest point, a difference. Continuous, made of quartic pieces, and
 * broken at every turning point into stretches in which it is monotone, so that no crossing and no touch is missed.
 */
import { quarticThrough, rootBetween, turnsOf, valueOf, type Polynomial } from './quartic';

/** A quartic over the fractions `from` to `to` of a step. */
export interface Piece {
  readonly from: number;
  readonly to: number;
  readonly shape: Polynomial;
}

/** A value and the fraction of the step at which it is taken. */
export interface Sample {
  fraction: number;
  value: number;
}

/** A part of a step, in fractions of it. */
export interface Stretch {
  from: number;
  to: number;
}

/** Which side of a limit a condition asks for; the limit itself counts. */
export interface Condition {
  readonly sense: 'atLeast' | 'atMost';
  readonly limit: number;
}

/** What counts as equal to a limit, K: rounding, far below anything physical. */
export const EQUAL_K = 1e-9;

/** How far a value lies on the good side of a condition, K; rounding beside the limit is 0. */
export function beyond({ sense, limit }: Condition, value: number): number {
  const distance = sense === 'atLeast' ? value - limit : limit - value;
  return Math.abs(distance) <= EQUAL_K ? 0 : distance;
}

export const holdsAt = (condition: Condition, value: number): boolean => beyond(condition, value) >= 0;

export class Course {
  readonly pieces: readonly Piece[];
  private known: readonly Sample[] | null = null;

  /** Pieces in order, from 0 to 1 without gaps. */
  constructor(pieces: readonly Piece[]) {
    this.pieces = pieces;
  }

  /** Through values at the fractions 0, ¼, ½, ¾, 1. */
  static through(v0: number, v1: number, v2: number, v3: number, v4: number): Course {
    return new Course([{ from: 0, to: 1, shape: quarticThrough(v0, v1, v2, v3, v4) }]);
  }

  at(fraction: number): number {
    return valueIn(this.pieceAt(fraction), fraction);
  }

  /** Values at both ends, at the joints of pieces and at every turning point: between neighbours the course is monotone. */
  samples(): readonly Sample[] {
    this.known ??= this.findSamples();
    return this.known;
  }

  private findSamples(): readonly Sample[] {
    const { pieces } = this;
    const end = { fraction: 1, value: valueIn(pieces[pieces.length - 1], 1) };
    // Nearly every step of a long run: one monotone piece.
    const turns = pieces.map(({ shape }) => turnsOf(shape));
    if (pieces.length === 1 && turns[0].length === 0) return [{ fraction: 0, value: valueIn(pieces[0], 0) }, end];
    const samples = pieces.flatMap((piece, i) =>
      [0, ...turns[i]].map((u) => {
        const fraction = piece.from + u * (piece.to - piece.from);
        return { fraction, value: valueIn(piece, fraction) };
      }),
    );
    return [...samples, end];
  }

  /** The same for a part of the step. */
  samplesIn({ from, to }: Stretch): readonly Sample[] {
    if (from === 0 && to === 1) return this.samples();
    const inside = this.samples().filter(({ fraction }) => fraction > from && fraction < to);
    const ends = from === to ? [from] : [from, to];
    const [first, last] = ends.map((fraction) => ({ fraction, value: this.at(fraction) }));
    return last === undefined ? [first] : [first, ...inside, last];
  }

  /** Whether it only rises or only falls. */
  get monotone(): boolean {
    const steps = this.samples().map(({ value }, i, all) => (i === 0 ? 0 : value - all[i - 1].value));
    return steps.every((step) => step >= 0) || steps.every((step) => step <= 0);
  }

  /**
   * Two values that it surely stays between: twice the range of its values at the eighths beyond them (a quartic stays within
   * 0.61 of its range at the quarters).
   */
  bounds(): [low: number, high: number] {
    let [low, high] = [Infinity, -Infinity];
    for (let eighth = 0; eighth <= 8; eighth++) {
      const value = this.at(eighth / 8);
      if (value < low) low = value;
      if (value > high) high = value;
    }
    return [low - 2 * (high - low), high + 2 * (high - low)];
  }

  /** The stretches of `within` in which the condition holds, in order; a touch is one of no length. */
  holds(condition: Condition, within: Stretch): Stretch[] {
    const samples = this.samplesIn(within);
    const stretches: Stretch[] = [];
    const add = (from: number, to: number): void => {
      const last = stretches.at(-1);
      if (last !== undefined && last.to === from) last.to = to;
      else stretches.push({ from, to });
    };
    if (samples.length === 1 && holdsAt(condition, samples[0].value)) add(samples[0].fraction, samples[0].fraction);
    for (let i = 1; i < samples.length; i++) {
      const [a, b] = [samples[i - 1], samples[i]];
      const [before, after] = [holdsAt(condition, a.value), holdsAt(condition, b.value)];
      if (before && after) add(a.fraction, b.fraction);
      else if (before) add(a.fraction, this.crossing(condition.limit, a.fraction, b.fraction));
      else if (after) add(this.crossing(condition.limit, a.fraction, b.fraction), b.fraction);
    }
    return stretches;
  }

  /** Where the course, monotone from `from` to `to` and inside one piece, crosses a level that lies between its ends. */
  private crossing(level: number, from: number, to: number): number {
    const piece = this.pieceAt(0.5 * (from + to));
    const shifted = [piece.shape[0] - level, ...piece.shape.slice(1)];
    const scale = piece.to - piece.from;
    const [low, high] = [(from - piece.from) / scale, (to - piece.from) / scale];
    const [atLow, atHigh] = [valueOf(shifted, low), valueOf(shifted, high)];
    // An end that equals the level up to rounding is the crossing.
    if (atLow * atHigh > 0) return Math.abs(atLow) < Math.abs(atHigh) ? from : to;
    return Math.min(to, Math.max(from, piece.from + scale * rootBetween(shifted, low, high)));
  }

  private pieceAt(fraction: number): Piece {
    const { pieces } = this;
    let i = 0;
    while (i < pieces.length - 1 && fraction >= pieces[i].to) i++;
    return pieces[i];
  }
}

const valueIn = (piece: Piece, fraction: number): number =>
  valueOf(piece.shape, (fraction - piece.from) / (piece.to - piece.from));
