/** Properties and exposures that are no plain number, in words and as text to be typed or pasted. */
import { readExpression, type Coefficient, type CorrelationName, type Curve, type Table } from '../../solver/model';
import {
  displayUnit,
  formatQuantity,
  fromDisplay,
  toDisplay,
  type QuantityKind,
  type UnitSystem,
} from '../../solver/model/quantities';

export const CORRELATION_WORDS: Record<CorrelationName, string> = {
  naturalVerticalPlate: 'natural, vertical plate',
  naturalPlateUp: 'natural, plate: hot face up',
  naturalPlateDown: 'natural, plate: hot face down',
  naturalHorizontalCylinder: 'natural, horizontal cylinder',
  forcedPlate: 'forced, along a plate',
  forcedCylinder: 'forced, across a cylinder',
};

/** "table, 6 points, 20 to 900 °C". */
export function tableInWords({ table }: Table, system: UnitSystem, x: QuantityKind = 'temperature'): string {
  const count = table.length === 1 ? '1 point' : `${table.length} points`;
  const [first, last] = [table[0][0], table[table.length - 1][0]].map((value) => formatQuantity(value, x, system));
  return table.length === 1 ? `table, ${count}` : `table, ${count}, ${first.number} to ${last.text}`;
}

/** A property over temperature, or a film coefficient, that is no plain number; empty for a number. */
export function curveInWords(curve: Curve | Coefficient, system: UnitSystem): string {
  if (typeof curve === 'number') return '';
  if ('table' in curve) return tableInWords(curve, system);
  if ('expression' in curve) return curve.expression;
  if ('correlation' in curve) return `${CORRELATION_WORDS[curve.correlation]}, ${curve.fluid}`;
  return curve.segments.length === 1 ? '1 segment' : `${curve.segments.length} segments`;
}

/** Why a text is no expression of these variables: "Does not know ..."; null when it is one. */
export function expressionRefusal(text: string, variables: readonly string[]): string | null {
  const read = readExpression(text, variables);
  if (read.kind === 'expression') return text.length > 300 ? 'An expression has at most 300 characters.' : null;
  return `The expression ${read.message}.`;
}

const tidy = (value: number): string => String(Number(value.toPrecision(10)));

/** Points as two columns in the units on screen, a row each. */
export const tableText = (points: readonly [number, number][], x: QuantityKind, y: QuantityKind, system: UnitSystem): string =>
  points.map(([at, value]) => `${tidy(toDisplay(at, x, system))}\t${tidy(toDisplay(value, y, system))}`).join('\n');

export interface TableLimits {
  least: number;
  most: number;
  /** Lowest number of the first column, and whether it may be that number itself; of the second likewise; stored units. */
  x: { bound: number; open: boolean };
  y: { bound: number; open: boolean };
}

export type ReadTable = { kind: 'table'; points: [number, number][] } | { kind: 'refused'; message: string };

/** Reads two columns of numbers in the units on screen; says which row keeps them from being a table. */
export function readTable(text: string, x: QuantityKind, y: QuantityKind, system: UnitSystem, limits: TableLimits): ReadTable {
  const refused = (message: string): ReadTable => ({ kind: 'refused', message });
  const rows = text
    .split(/\r?\n/)
    .map((row) => row.trim())
    .filter((row) => row !== '');
  if (rows.length < limits.least)
    return refused(`A table needs at least ${limits.least === 1 ? 'one row' : `${limits.least} rows`}.`);
  if (rows.length > limits.most) return refused(`A table has at most ${limits.most} rows, got ${rows.length}.`);
  const points: [number, number][] = [];
  for (const [index, row] of rows.entries()) {
    const cells = row.replaceAll('−', '-').split(/,?[\t; ]+/);
    const numbers = cells.map((cell) => (cell === '' ? Number.NaN : Number(cell)));
    if (numbers.length !== 2 || !numbers.every(Number.isFinite)) {
      return refused(`Row ${index + 1}, “${row}”, is not two numbers.`);
    }
    const point: [number, number] = [fromDisplay(numbers[0], x, system), fromDisplay(numbers[1], y, system)];
    const low = lowest(point[0], limits.x, x, system) ?? lowest(point[1], limits.y, y, system);
    if (low !== null) return refused(`Row ${index + 1}: ${low}`);
    if (index > 0 && point[0] <= points[index - 1][0]) {
      return refused(`Row ${index + 1}: the first number must be more than the one before it.`);
    }
    points.push(point);
  }
  return { kind: 'table', points };
}

function lowest(value: number, { bound, open }: TableLimits['x'], kind: QuantityKind, system: UnitSystem): string | null {
  if (open ? value > bound : value >= bound) return null;
  const written = formatQuantity(bound, kind, system).text;
  return `${formatQuantity(value, kind, system).text} must be ${open ? 'more than' : 'at least'} ${written}.`;
}

/** "°C, W/m·K": the heads of the two columns. */
export const tableHeads = (x: QuantityKind, y: QuantityKind, system: UnitSystem): string =>
  [x, y].map((kind) => displayUnit(kind, system) || 'number').join(', ');
