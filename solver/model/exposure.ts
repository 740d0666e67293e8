import { z } from 'zod';
import { tableSchema } from './curve';
import { expressionSchema } from './expressionText';
import { ABSOLUTE_ZERO_C, quantity } from './fields';
import { coefficientBounds, plainScheduleSchema, rampSchema, temperatureScheduleSchema } from './schedule';

/** Variables of a film coefficient's expression: temperature of the face, time since the start of the stage and of the cycle. */
export const FILM_VARIABLES = ['Ts', 't', 'clock'] as const;

/**
 * Published correlations for the film coefficient, each with the length it is written in: height of a plate or cylinder, side
 * of a plate (area over perimeter, for plates facing up or down), diameter, or length along the flow.
 */
export const CORRELATIONS = [
  'naturalVerticalPlate',
  'naturalPlateUp',
  'naturalPlateDown',
  'naturalHorizontalCylinder',
  'forcedPlate',
  'forcedCylinder',
] as const;
export type CorrelationName = (typeof CORRELATIONS)[number];

export const correlationSchema = z.strictObject({
  correlation: z.enum(CORRELATIONS, { error: `must be one of ${CORRELATIONS.join(', ')}` }),
  fluid: z.enum(['air', 'water'], { error: 'must be "air" or "water"' }),
  length: quantity('m', { above: 0 }, 'height, area over perimeter, diameter, or length along the flow'),
  velocity: quantity('m/s', { above: 0 }, 'of the free stream; for the forced correlations').optional(),
});
export type Correlation = z.infer<typeof correlationSchema>;

export const coefficientSchema = z.union([
  quantity('W/(m²·K)', coefficientBounds),
  rampSchema('W/(m²·K)', coefficientBounds),
  tableSchema('°C', { above: ABSOLUTE_ZERO_C }, 'W/(m²·K)', coefficientBounds),
  z.strictObject({ expression: expressionSchema(FILM_VARIABLES, 'W/(m²·K); Ts in °C, t and clock in s') }),
  correlationSchema,
]);
/**
 * A film coefficient: a constant, ramp/hold segments, a table over the temperature of the face (a quench curve), an expression
 * of Ts, t and clock, or a correlation.
 */
export type Coefficient = z.infer<typeof coefficientSchema>;

const emissivity = quantity('', { above: 0, atMost: 1 }, 'emissivity of the face, or of the exchange with the enclosure');

export const exposureSchema = z.discriminatedUnion(
  'kind',
  [
    z.strictObject({ kind: z.literal('insulated') }),
    z.strictObject({ kind: z.literal('temperature'), temperature: temperatureScheduleSchema }),
    z.strictObject({
      kind: z.literal('flux'),
      flux: plainScheduleSchema('W/m²').describe('heat flux, positive into the part, W/m²'),
    }),
    z.strictObject({
      kind: z.literal('film'),
      coefficient: coefficientSchema.describe('film coefficient, W/(m²·K)'),
      surroundings: temperatureScheduleSchema,
      /** Grey radiation beside the film, to an enclosure at the film's surroundings or at a temperature of its own. */
      radiation: z.strictObject({ emissivity, enclosure: temperatureScheduleSchema.optional() }).optional(),
    }),
    z.strictObject({ kind: z.literal('radiation'), emissivity, enclosure: temperatureScheduleSchema }),
  ],
  { error: 'must have a kind: "insulated", "temperature", "flux", "film" or "radiation"' },
);
/** What a face meets during a stage. */
export type Exposure = z.infer<typeof exposureSchema>;
export type ExposureKind = Exposure['kind'];
