/** A list of numbers in one Float64Array that grows. */
export class Growing {
  private numbers = new Float64Array(64);
  length = 0;

  push(number: number): void {
    if (this.length === this.numbers.length) {
      const larger = new Float64Array(2 * this.length);
      larger.set(this.numbers);
      this.numbers = larger;
    }
    this.numbers[this.length++] = number;
  }

  last(): number {
    return this.numbers[this.length - 1];
  }

  /** A copy of its own, exactly as long as the list. */
  toArray(): Float64Array {
    return this.numbers.slice(0, this.length);
  }
}
