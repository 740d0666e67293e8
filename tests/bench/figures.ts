/** A figure of a bench as a line of JSON. */

export interface Figure {
  bench: string;
  host: string;
  unit: 'ms';
  /** What it must stay under. */
  limit: number;
}

/** The value below which a part of the sorted values lies, by the nearest rank. */
export function quantile(values: readonly number[], part: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.max(0, Math.ceil(part * sorted.length) - 1)];
}

const rounded = (value: number): number => Math.round(value * 10) / 10;

export function report(figure: Figure, values: readonly number[], more: object = {}): void {
  const [median, p95, least, most] = [
    quantile(values, 0.5),
    quantile(values, 0.95),
    quantile(values, 0),
    quantile(values, 1),
  ].map(rounded);
  console.log(JSON.stringify({ ...figure, runs: values.length, median, p95, least, most, ...more }));
}
