/** How a film coefficient and the radiation beside it are given, and each as the next. */
import type { Coefficient, Exposure } from '../../solver/model';
import { GREY } from '../commands';

export type FilmKind = 'constant' | 'ramps' | 'table' | 'expression' | 'correlation';

export const FILM_KINDS: readonly { value: FilmKind; label: string }[] = [
  { value: 'constant', label: 'constant' },
  { value: 'ramps', label: 'own ramps' },
  { value: 'table', label: 'table over face temperature' },
  { value: 'expression', label: 'expression of Ts and t' },
  { value: 'correlation', label: 'published correlation' },
];

export const FILM_HINTS: Record<FilmKind, string> = {
  constant: 'Its number stands in the table above.',
  ramps: 'Its segments stand below.',
  table: 'A quench curve: straight between its points, constant beyond.',
  expression: 'In W/(m²·K); Ts is the temperature of the face in °C, t and clock are stage and cycle time in s.',
  correlation: 'From the temperatures of face and surroundings; the run warns where it leaves its range.',
};

export function filmKind(coefficient: Coefficient): FilmKind {
  if (typeof coefficient === 'number') return 'constant';
  if ('segments' in coefficient) return 'ramps';
  if ('table' in coefficient) return 'table';
  return 'expression' in coefficient ? 'expression' : 'correlation';
}

/** A coefficient of another kind, near `now`, W/(m²·K). */
export function filmOfKind(kind: FilmKind, now: number): Coefficient {
  switch (kind) {
    case 'constant':
      return now;
    case 'ramps':
      return { start: now, segments: [] };
    case 'table':
      return {
        table: [
          [20, now],
          [1000, now],
        ],
      };
    case 'expression':
      return { expression: String(now) };
    case 'correlation':
      return { correlation: 'naturalVerticalPlate', fluid: 'air', length: 1 };
  }
}

/** Which length a correlation is written in. */
export const LENGTH_WORDS = {
  naturalVerticalPlate: 'Height of the plate',
  naturalPlateUp: 'Area over perimeter',
  naturalPlateDown: 'Area over perimeter',
  naturalHorizontalCylinder: 'Diameter',
  forcedPlate: 'Length along the flow',
  forcedCylinder: 'Diameter',
} as const;

/** A correlation by its name; forced ones need a velocity, natural ones have none. */
export function correlationNamed(
  name: keyof typeof LENGTH_WORDS,
  before: { fluid: 'air' | 'water'; length: number; velocity?: number },
): Coefficient {
  const { fluid, length, velocity } = before;
  return name.startsWith('forced')
    ? { correlation: name, fluid, length, velocity: velocity ?? 1 }
    : { correlation: name, fluid, length };
}

export type BesideKind = 'none' | 'surroundings' | 'enclosure';
export const BESIDE_KINDS: readonly { value: BesideKind; label: string }[] = [
  { value: 'none', label: 'none' },
  { value: 'surroundings', label: 'to the surroundings' },
  { value: 'enclosure', label: 'to an enclosure of its own' },
];

type Film = Extract<Exposure, { kind: 'film' }>;

export const besideKind = ({ radiation }: Film): BesideKind =>
  radiation === undefined ? 'none' : radiation.enclosure === undefined ? 'surroundings' : 'enclosure';

/** Radiation beside a film of another kind; an enclosure begins at the temperature of the surroundings, °C. */
export function besideOfKind(kind: BesideKind, film: Film, outside: number): Film['radiation'] | null {
  const emissivity = film.radiation?.emissivity ?? GREY;
  if (kind === 'none') return null;
  return kind === 'surroundings' ? { emissivity } : { emissivity, enclosure: outside };
}
