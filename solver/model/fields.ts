/**
 * The building blocks of the schema: numbers that know their unit and their bounds.
 *
 * A rule is data that explains itself. The unit, the bounds and the meaning travel with the field into the JSON Schema,
 * the wording of problems and the form fields of the app.
 */
import { z } from 'zod';

// Must come before any object schema: zod otherwise probes for `new Function`, which a strict content policy reports.
z.config({ jitless: true });

/** Bounds of a number; `above` and `below` exclude the bound itself, `atLeast` and `atMost` include it. */
export interface Bounds {
  above?: number;
  atLeast?: number;
  below?: number;
  atMost?: number;
}

/** Absolute zero, °C: no temperature of a project lies at or below it. */
export const ABSOLUTE_ZERO_C = -273.15;

/** A finite number in `unit` within `bounds`; `meaning` becomes the description in the JSON Schema. */
export function quantity(unit: string, bounds: Bounds = {}, meaning?: string) {
  const named = unit === '' ? '' : ` ${unit}`;
  let field = z.number({
    error: (issue) =>
      issue.input === undefined ? `is missing: a number${inUnit(unit)} is expected` : `must be a finite number${inUnit(unit)}`,
  });
  if (bounds.above !== undefined) field = field.gt(bounds.above, { error: `must be more than ${bounds.above}${named}` });
  if (bounds.atLeast !== undefined) field = field.gte(bounds.atLeast, { error: `must be at least ${bounds.atLeast}${named}` });
  if (bounds.below !== undefined) field = field.lt(bounds.below, { error: `must be less than ${bounds.below}${named}` });
  if (bounds.atMost !== undefined) field = field.lte(bounds.atMost, { error: `must be at most ${bounds.atMost}${named}` });
  const description = [meaning, unit === '' ? undefined : unit].filter(Boolean).join(', ');
  return description === '' ? field : field.describe(description);
}

const inUnit = (unit: string): string => (unit === '' ? '' : ` in ${unit}`);

/** A temperature, °C. */
export const temperature = (meaning?: string) => quantity('°C', { above: ABSOLUTE_ZERO_C }, meaning);

/** A short identifier, unique in its list, made by the app and never reused. */
export const id = (of: string) =>
  z
    .string({ error: (issue) => (issue.input === undefined ? 'is missing: a short id is expected' : 'must be a text') })
    .min(1, { error: 'must not be empty' })
    .max(40, { error: 'must be at most 40 characters' })
    .describe(of);

/** A free name that people read. */
export const name = z
  .string({ error: (issue) => (issue.input === undefined ? 'is missing: a name is expected' : 'must be a text') })
  .max(200, { error: 'must be at most 200 characters' });
