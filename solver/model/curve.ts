/**
 * A property as a curve over temperature: a constant, a table, or an expression.
 *
 * A table is straight between its points and constant beyond the first and the last one. An expression is written in T, °C.
 */
import { z } from 'zod';
import { expressionSchema } from './expressionText';
import { ABSOLUTE_ZERO_C, quantity, type Bounds } from './fields';

export const MAX_POINTS = 200;

/** Points [x, value] with x rising; `x` and `value` name the units. */
export function tableSchema(x: string, xBounds: Bounds, unit: string, bounds: Bounds) {
  return z.strictObject({
    table: z
      .array(z.tuple([quantity(x, xBounds), quantity(unit, bounds)]))
      .min(1, { error: 'must have at least one point' })
      .max(MAX_POINTS, { error: `must have at most ${MAX_POINTS} points` })
      .superRefine((points, context) => {
        points.forEach((point, index) => {
          if (index > 0 && !(point[0] > points[index - 1][0])) {
            context.addIssue({ code: 'custom', path: [index, 0], message: 'must be more than the one before it' });
          }
        });
      })
      .describe(`points [${x}, ${unit}], the first number rising; straight between them, constant beyond`),
  });
}

/** A property over temperature. */
export function curveSchema(unit: string, bounds: Bounds, meaning: string) {
  return z
    .union([
      quantity(unit, bounds),
      tableSchema('°C', { above: ABSOLUTE_ZERO_C }, unit, bounds),
      z.strictObject({ expression: expressionSchema(['T'], `${unit}; T in °C`) }),
    ])
    .describe(`${meaning}, ${unit}: a number, a table over °C, or an expression of T`);
}

export type Table = { table: [number, number][] };
export type Curve = number | Table | { expression: string };
