import { evaluatorOf, FILM_VARIABLES, type LaidCoefficient } from '../../model';
import { CorrelationFilm } from './correlations';

/** A film coefficient over the face's own temperature, that of the surroundings (°C) and cycle time (s), W/(m²·K). */
export type FilmLaw = (surface: number, surroundings: number, time: number) => number;

/** The law of a coefficient that is not a course over time alone. A coefficient below 0 counts as 0. */
export function filmLaw(coefficient: Exclude<LaidCoefficient, { kind: 'course' }>): FilmLaw {
  switch (coefficient.kind) {
    case 'table':
      return (surface) => tableAt(coefficient.table, surface);
    case 'correlation': {
      const film = new CorrelationFilm(coefficient);
      return (surface, surroundings) => film.coefficient(surface, surroundings);
    }
    case 'expression': {
      const evaluate = evaluatorOf(coefficient.expression, FILM_VARIABLES);
      return (surface, _surroundings, time) => {
        const value = evaluate([surface, time - coefficient.stageStart, time]);
        return value < 0 ? 0 : value;
      };
    }
  }
}

/** Value of a table: straight between its points, constant beyond. */
export function tableAt(table: readonly (readonly [number, number])[], x: number): number {
  const i = pieceOf(table, x);
  if (i < 0) return table[0][1];
  if (i === table.length - 1) return table[i][1];
  return table[i][1] + (x - table[i][0]) * slopeOf(table, i);
}

/** Slope of a table at x; at a point, that of the piece after it. */
export function tableSlopeAt(table: readonly (readonly [number, number])[], x: number): number {
  const i = pieceOf(table, x);
  return i < 0 || i === table.length - 1 ? 0 : slopeOf(table, i);
}

const slopeOf = (table: readonly (readonly [number, number])[], i: number): number =>
  (table[i + 1][1] - table[i][1]) / (table[i + 1][0] - table[i][0]);

/** Index of the last point at or before x; −1 before the first. */
function pieceOf(table: readonly (readonly [number, number])[], x: number): number {
  let low = -1;
  let high = table.length;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (table[middle][0] <= x) low = middle;
    else high = middle;
  }
  return low;
}
