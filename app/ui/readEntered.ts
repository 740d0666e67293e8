/** What a field makes of the text in it: a number to enter, or what to say about it. */
import type { Entered } from '../commands';
import { formatQuantity, readQuantity, type QuantityKind, type UnitSystem } from '../../solver/model/quantities';

/** Bounds in the stored unit; `above` and `below` exclude the bound itself. */
export interface Bounds {
  above?: number;
  atLeast?: number;
  below?: number;
  atMost?: number;
}

/** A quantity that can be typed: what it is called, its kind and its bounds. */
export interface QuantitySpec {
  /** "Thickness": begins the sentence that refuses a number. */
  name: string;
  quantity: QuantityKind;
  bounds?: Bounds;
  /** A word for zero: "bonded" for a contact resistance of 0. */
  zero?: string;
}

export type FieldReading =
  | { state: 'value'; entered: Entered }
  | { state: 'partial'; hint: string }
  | { state: 'choice'; choices: { text: string; entered: Entered }[] }
  | { state: 'refused'; message: string };

export function readEntered(text: string, spec: QuantitySpec, system: UnitSystem): FieldReading {
  if (spec.zero !== undefined && text.trim().toLowerCase() === spec.zero) {
    return { state: 'value', entered: { value: 0, text: spec.zero } };
  }
  const reading = readQuantity(text, spec.quantity, system);
  switch (reading.kind) {
    case 'partial':
      return { state: 'partial', hint: reading.hint };
    case 'refused':
      return { state: 'refused', message: reading.message };
    case 'choice': {
      const choices = reading.choices.map(({ text: choice, value }) => ({ text: choice, entered: { value, text: choice } }));
      return { state: 'choice', choices };
    }
    case 'value': {
      const broken = brokenBound(reading.value, spec, system);
      if (broken !== null) return { state: 'refused', message: broken };
      const { value, echo } = reading;
      const typed = carriesItsUnit(text, value, spec.quantity) ? { typed: text.trim() } : {};
      return { state: 'value', entered: { value, text: echo, ...typed } };
    }
  }
}

/** The number as a field or a cell shows it. */
export function shownNumber(
  value: number | null,
  spec: QuantitySpec,
  system: UnitSystem,
): { number: string; unit: string; text: string } {
  if (value === null) return { number: '', unit: '', text: '' };
  if (value === 0 && spec.zero !== undefined) return { number: spec.zero, unit: '', text: spec.zero };
  return formatQuantity(value, spec.quantity, system);
}

/** "Thickness must be more than 0 mm, got −5 mm."; null when the value is within its bounds. */
export function brokenBound(value: number, { name, quantity, bounds = {} }: QuantitySpec, system: UnitSystem): string | null {
  const { above, atLeast, below, atMost } = bounds;
  const written = (bound: number): string => formatQuantity(bound, quantity, system).text;
  const must = (rule: string, bound: number): string => `${name} must be ${rule} ${written(bound)}, got ${written(value)}.`;
  if (above !== undefined && value <= above) return must('more than', above);
  if (atLeast !== undefined && value < atLeast) return must('at least', atLeast);
  if (below !== undefined && value >= below) return must('less than', below);
  if (atMost !== undefined && value > atMost) return must('at most', atMost);
  return null;
}

/** Whether a text reads the same in either system of units; only then may it stand for the number later on. */
function carriesItsUnit(text: string, value: number, quantity: QuantityKind): boolean {
  return (['SI', 'US'] as const).every((system) => {
    const reading = readQuantity(text, quantity, system);
    return reading.kind === 'value' && reading.value === value;
  });
}
