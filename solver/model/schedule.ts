/**
 * Schedules: a quantity over the time of a stage.
 *
 * Their start value defaults to the last one reached before (by the same set-point, or by the same quantity of the same face's
 * own schedule in the stage before); after the last segment the value holds. A jump is a segment of duration 0. An expression
 * is written in t, the time since the start of the stage, and clock, the time since the start of the cycle, both in s.
 */
import { z } from 'zod';
import { expressionSchema } from './expressionText';
import { ABSOLUTE_ZERO_C, quantity, type Bounds } from './fields';

/** Variables of an expression of time. */
export const TIME_VARIABLES = ['t', 'clock'] as const;

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

export function rampSchema(unit: string, bounds: Bounds) {
  return z.strictObject({
    start: quantity(unit, bounds, 'value at the start of the stage; default: the last one reached before').optional(),
    segments: z.array(segmentSchema(unit, bounds)).max(200, { error: 'must have at most 200 segments' }),
  });
}

const expressionOfTime = (unit: string) =>
  z.strictObject({ expression: expressionSchema(TIME_VARIABLES, `${unit}; t and clock in s`) });

export const temperatureBounds: Bounds = { above: ABSOLUTE_ZERO_C };
export const coefficientBounds: Bounds = { atLeast: 0 };

/** The set-point's own course inside one stage, °C. */
export const setPointRampSchema = rampSchema('°C', temperatureBounds);
/** A temperature over stage time: a constant, the cycle's set-point (with an offset in K), ramp/hold segments, an expression. */
export const temperatureScheduleSchema = z.union([
  quantity('°C', temperatureBounds),
  z.strictObject({ follow: z.literal('setPoint'), offset: quantity('K', {}, 'added to the set-point').default(0) }),
  rampSchema('°C', temperatureBounds),
  expressionOfTime('°C'),
]);
/** A flux or a source over stage time. */
export const plainScheduleSchema = (unit: string) => z.union([quantity(unit), rampSchema(unit, {}), expressionOfTime(unit)]);

export type Segment = { to: number; rate: number } | { to: number; duration: number } | { hold: number };
export interface Ramp {
  start?: number | undefined;
  segments: Segment[];
}
export interface Expression {
  expression: string;
}
export type TemperatureSchedule = number | { follow: 'setPoint'; offset: number } | Ramp | Expression;
/** A constant, ramp/hold segments, or an expression of time. */
export type PlainSchedule = number | Ramp | Expression;
