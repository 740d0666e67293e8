/** The cycle: a row of stages; each has an exposure for every face, perhaps heat sources inside, and an end. */
import { z } from 'zod';
import { exposureSchema } from './exposure';
import { expressionSchema } from './expressionText';
import { id, name, quantity } from './fields';
import { plainScheduleSchema, setPointRampSchema, temperatureBounds } from './schedule';

/** Variables of a source's expression: temperature and depth of the point, time since the start of the stage and of the cycle. */
export const SOURCE_VARIABLES = ['T', 'x', 't', 'clock'] as const;

export const sourceSchema = z.strictObject({
  layer: id('id of the layer heated'),
  power: z
    .union([
      plainScheduleSchema('W/m³').options[0],
      plainScheduleSchema('W/m³').options[1],
      z.strictObject({ expression: expressionSchema(SOURCE_VARIABLES, 'W/m³; T in °C, x in m, t and clock in s') }),
    ])
    .describe('volumetric heat source, W/m³'),
});
/** Heat given off inside a layer during a stage. */
export type Source = z.infer<typeof sourceSchema>;

export const stageEndSchema = z.union([
  z.strictObject({ after: quantity('s', { above: 0 }, 'length of the stage') }),
  z.strictObject({ whenScheduleDone: z.literal(true) }),
]);
/** A stage ends after a time, or at target: when the last segment of every schedule in it is done. */
export type StageEnd = z.infer<typeof stageEndSchema>;

export const stageSchema = z.strictObject({
  id: id('id of the stage'),
  name,
  end: stageEndSchema,
  /** Course of the set-point in this stage; absent: it holds the last value reached. */
  setPoint: setPointRampSchema.optional(),
  exposures: z.strictObject({
    /** A solid cylinder or sphere has no start face: leave it out there. */
    start: exposureSchema.default({ kind: 'insulated' }),
    end: exposureSchema,
  }),
  /** Heat sources inside the layers in this stage. */
  sources: z.array(sourceSchema).max(30, { error: 'must have at most 30 sources' }).optional(),
});
export type Stage = z.infer<typeof stageSchema>;

export const MAX_STAGES = 100;

export const cycleSchema = z.strictObject({
  /** The set-point that exposures can follow. */
  setPoint: z.strictObject({ name, start: quantity('°C', temperatureBounds, 'value at the start of the cycle') }),
  stages: z
    .array(stageSchema, { error: 'must be a list of stages' })
    .min(1, { error: 'must have at least one stage' })
    .max(MAX_STAGES, { error: `must have at most ${MAX_STAGES} stages` }),
});
export type Cycle = z.infer<typeof cycleSchema>;
