/** Reproducible random numbers, from a seed and nothing else (mulberry32, public domain). */
export class Dice {
  private state: number;

  constructor(seed: number) {
    this.state = seed >>> 0;
    // Neighbouring seeds begin alike: let them part.
    for (let i = 0; i < 8; i++) this.next();
  }

  /** At least 0, less than 1. */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = this.state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  between(low: number, high: number): number {
    return round(low + (high - low) * this.next());
  }

  /** Equally likely in every octave. */
  log(low: number, high: number): number {
    return round(low * (high / low) ** this.next());
  }

  /** A whole number from `low` to `high`, both included. */
  whole(low: number, high: number): number {
    return low + Math.floor((high - low + 1) * this.next());
  }

  chance(part: number): boolean {
    return this.next() < part;
  }

  pick<T>(list: readonly T[]): T {
    return list[Math.floor(this.next() * list.length)];
  }
}

/** Four figures, as a person would write. */
export const round = (value: number): number => Number(value.toPrecision(4));
