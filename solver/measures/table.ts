/** Rows of a history in the making: a time, s, and some values beside it. */

/** Up to so many rows every step is kept. */
const MANY = 20000;

export class Table {
  private readonly columns: Column[];
  private readonly spacing: number;
  /** A row left out because it is close to the one before; kept in hand in case it is the last. */
  private waiting: readonly number[] | null = null;

  /**
   * `values`: how many stand beside the time. Beyond MANY rows, those of plain steps are left out where they are closer than
   * 1/MANY of the cycle (`end`, s) to the row before: a run of millions of steps has a history of tens of thousands of rows.
   */
  constructor(values: number, end: number) {
    this.columns = Array.from({ length: values + 1 }, () => new Column());
    this.spacing = end / MANY;
  }

  /** Adds a row: time first. `plain`: the end of a step, and nothing more. */
  add(row: readonly number[], plain: boolean): void {
    const [times] = this.columns;
    if (plain && times.length >= MANY && row[0] - times.last() < this.spacing) {
      this.waiting = row;
      return;
    }
    if (!plain && this.waiting !== null) this.push(this.waiting);
    this.waiting = null;
    this.push(row);
  }

  get empty(): boolean {
    return this.columns[0].length === 0;
  }

  /** The last value given of a column; column 0 is time. */
  last(column: number): number {
    return this.waiting?.[column] ?? this.columns[column].last();
  }

  /** A column in an array of its own. */
  column(index: number): Float64Array {
    return this.columns[index].toArray(this.waiting === null ? [] : [this.waiting[index]]);
  }

  private push(row: readonly number[]): void {
    this.columns.forEach((column, i) => column.push(row[i]));
  }
}

/** A list of numbers in one Float64Array that grows. */
class Column {
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

  toArray(more: readonly number[]): Float64Array {
    const all = new Float64Array(this.length + more.length);
    all.set(this.numbers.subarray(0, this.length));
    all.set(more, this.length);
    return all;
  }
}
