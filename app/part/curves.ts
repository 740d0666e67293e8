/** A property as a number, a table or an expression, and each as the next; the numbers of reactions. */
import { evaluatorOf, type Curve, type Reaction } from '../../solver/model';
import type { QuantityKind } from '../../solver/model/quantities';

export type CurveKind = 'number' | 'table' | 'expression';

export const CURVE_KINDS: readonly { value: CurveKind; label: string }[] = [
  { value: 'number', label: 'constant' },
  { value: 'table', label: 'table over °C' },
  { value: 'expression', label: 'expression of T' },
];

export function kindOfCurve(curve: Curve): CurveKind {
  if (typeof curve === 'number') return 'number';
  return 'table' in curve ? 'table' : 'expression';
}

const ROOM_C = 20;
const HOT_C = 1000;

/** A curve of another kind that is as near as it can be; at 20 °C the same. */
export function curveOfKind(kind: CurveKind, curve: Curve): Curve {
  if (kindOfCurve(curve) === kind) return curve;
  const near = (celsius: number): number => Number(valueOf(curve, celsius).toPrecision(6));
  if (kind === 'number') return near(ROOM_C);
  if (kind === 'expression') return { expression: String(near(ROOM_C)) };
  return {
    table: [
      [ROOM_C, near(ROOM_C)],
      [HOT_C, near(HOT_C)],
    ],
  };
}

function valueOf(curve: Curve, celsius: number): number {
  if (typeof curve === 'number') return curve;
  if ('expression' in curve) {
    const value = evaluatorOf(curve.expression, ['T'])([celsius]);
    return Number.isFinite(value) && value > 0 ? value : 1;
  }
  const { table } = curve;
  const next = table.findIndex(([at]) => at >= celsius);
  if (next < 0) return table[table.length - 1][1];
  if (next === 0) return table[0][1];
  const [[x0, y0], [x1, y1]] = [table[next - 1], table[next]];
  return y0 + ((y1 - y0) * (celsius - x0)) / (x1 - x0);
}

export type ReactionKind = Reaction['kind'] | 'none';
export const REACTION_KINDS: readonly { value: ReactionKind; label: string }[] = [
  { value: 'none', label: 'none' },
  { value: 'nthOrder', label: 'n-th order cure' },
  { value: 'autocatalytic', label: 'autocatalytic cure' },
  { value: 'hydration', label: 'cement hydration' },
];

export const REACTION_HINTS: Record<ReactionKind, string> = {
  none: 'No heat is given off inside this material.',
  nthOrder: 'dα/dt = A exp(−E/RT) (1 − α)^n: a cure whose rate falls as it goes on.',
  autocatalytic: 'dα/dt = (k1 + k2 α^m) (1 − α)^n, k = A exp(−E/RT): a cure that its own product speeds up.',
  hydration: 'α = αu exp(−(τ/te)^β): cement by equivalent age te (Freiesleben Hansen and Pedersen 1977).',
};

/** A reaction to begin with: numbers to be replaced from a data sheet (from memory, of the usual size). */
export function reactionOfKind(kind: ReactionKind): Reaction | null {
  switch (kind) {
    case 'none':
      return null;
    case 'nthOrder':
      return { kind, heat: 300e3, factor: 1e5, activationEnergy: 60e3, order: 1, initial: 0 };
    case 'autocatalytic':
      return {
        kind,
        heat: 300e3,
        first: { factor: 0, activationEnergy: 60e3 },
        second: { factor: 1e5, activationEnergy: 60e3 },
        m: 0.5,
        n: 1.5,
        initial: 0.001,
      };
    case 'hydration':
      return { kind, heat: 60e3, ultimate: 0.8, time: 50400, slope: 0.9, activationEnergy: 40e3, reference: 20, age: 3600 };
  }
}

export interface ReactionNumber {
  path: string[];
  name: string;
  /** Kind where the unit can be chosen; else the number is in `unit`, as the document keeps it. */
  quantity: QuantityKind | null;
  unit: string;
  value: number;
}

const NUMBER_NAMES: Record<string, [name: string, unit: string, quantity?: QuantityKind]> = {
  heat: ['Heat of the whole reaction', 'J/kg', 'latentHeat'],
  factor: ['Factor A', '1/s'],
  activationEnergy: ['Activation energy E', 'J/mol'],
  order: ['Order n', ''],
  initial: ['Degree at the start', ''],
  m: ['Exponent m', ''],
  n: ['Exponent n', ''],
  ultimate: ['Degree in the end αu', ''],
  time: ['Time τ', 's', 'time'],
  slope: ['Slope β', ''],
  reference: ['Reference temperature', '°C', 'temperature'],
  age: ['Age at the start', 's', 'time'],
};

/** The numbers of a reaction, each with its name and unit. */
export function reactionNumbers(reaction: Reaction): ReactionNumber[] {
  const numbers = (tree: object, path: string[], prefix: string): ReactionNumber[] =>
    Object.entries(tree).flatMap(([key, value]: [string, unknown]) => {
      if (typeof value === 'object' && value !== null) return numbers(value, [...path, key], key === 'first' ? 'k1: ' : 'k2: ');
      if (typeof value !== 'number') return [];
      const [name, unit, quantity] = NUMBER_NAMES[key];
      return [{ path: [...path, key], name: `${prefix}${name}`, unit, quantity: quantity ?? null, value }];
    });
  return numbers(reaction, [], '');
}
