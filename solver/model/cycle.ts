/**
 * The cycle: a row of stages; each has an exposure for every face and an end.
 *
 * Schedules run in stage time. Their start value defaults to the last one reached before (by the same set-point, or by the
 * same quantity of the same face's own schedule in the stage before); after the last segment the value holds. A jump is a
 * segment of duration 0.
 */
import { z } from 'zod';
import { id, name, quantity, ABSOLUTE_ZERO_C, type Bounds } from './fields';

const duration = quantity('s', { atLeast: 0 });

function segmentSchema(unit: string, bounds: Bounds) {
  const to = quantity(unit, bounds, 'value reached');
  return z.union([
    z.strictObject({
      to,
      rate: quantity(
        `${unit === '°C' ? 'K' : unit}/s`,
        { above: 0 },
        'size of the slope; its sign follows from the value reached',
      ),
    }),
    z.strictObject({ to, duration }),
    z.strictObject({ hold: duration.describe('time at the value reached, s') }),
  ]);
}

function rampSchema(unit: string, bounds: Bounds) {
  return z.strictObject({
    start: quantity(unit, bounds, 'value at the start of the stage; default: the last one reached before').optional(),
    segments: z.array(segmentSchema(unit, bounds)).max(200, { error: 'must have at most 200 segments' }),
  });
}

const temperatureBounds: Bounds = { above: ABSOLUTE_ZERO_C };
const coefficientBounds: Bounds = { atLeast: 0 };

/** The set-point's own course inside one stage, °C. */
export const setPointRampSchema = rampSchema('°C', temperatureBounds);
/** A temperature over stage time: a constant, the cycle's set-point (with an offset in K), or ramp/hold segments. */
export const temperatureScheduleSchema = z.union([
  quantity('°C', temperatureBounds),
  z.strictObject({ follow: z.literal('setPoint'), offset: quantity('K', {}, 'added to the set-point').default(0) }),
  rampSchema('°C', temperatureBounds),
]);
export const fluxScheduleSchema = z.union([quantity('W/m²'), rampSchema('W/m²', {})]);
export const coefficientScheduleSchema = z.union([
  quantity('W/(m²·K)', coefficientBounds),
  rampSchema('W/(m²·K)', coefficientBounds),
]);

export type Segment = { to: number; rate: number } | { to: number; duration: number } | { hold: number };
export interface Ramp {
  start?: number | undefined;
  segments: Segment[];
}
export type TemperatureSchedule = number | { follow: 'setPoint'; offset: number } | Ramp;
/** A constant, or ramp/hold segments. */
export type PlainSchedule = number | Ramp;

export const exposureSchema = z.discriminatedUnion(
  'kind',
  [
    z.strictObject({ kind: z.literal('insulated') }),
    z.strictObject({ kind: z.literal('temperature'), temperature: temperatureScheduleSchema }),
    z.strictObject({ kind: z.literal('flux'), flux: fluxScheduleSchema.describe('heat flux, positive into the part, W/m²') }),
    z.strictObject({
      kind: z.literal('film'),
      coefficient: coefficientScheduleSchema.describe('film coefficient, W/(m²·K)'),
      surroundings: temperatureScheduleSchema,
    }),
  ],
  { error: 'must have a kind: "insulated", "temperature", "flux" or "film"' },
);
/** What a face meets during a stage. */
export type Exposure = z.infer<typeof exposureSchema>;
export type ExposureKind = Exposure['kind'];

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
  exposures: z.strictObject({ start: exposureSchema, end: exposureSchema }),
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
