import { z } from 'zod';
import { exposureSchema } from './exposure';
import { id, quantity, temperature } from './fields';

export const initialSchema = z.union([
  z.strictObject({ temperature: temperature('the whole part') }),
  z.strictObject({ layers: z.array(z.strictObject({ layer: id('id of a layer'), temperature: temperature() })) }),
  z.strictObject({
    profile: z
      .array(z.tuple([quantity('m', { atLeast: 0 }), temperature()]))
      .min(2, { error: 'must have at least two points' })
      .max(200, { error: 'must have at most 200 points' })
      .superRefine((points, context) => {
        points.forEach((point, index) => {
          if (index > 0 && !(point[0] > points[index - 1][0])) {
            context.addIssue({ code: 'custom', path: [index, 0], message: 'must be deeper than the one before it' });
          }
        });
      })
      .describe('points [depth in m, temperature in °C], straight between them, constant beyond'),
  }),
  z.strictObject({
    steady: z
      .strictObject({ start: exposureSchema.default({ kind: 'insulated' }), end: exposureSchema })
      .describe('the steady state under these exposures, their schedules at their first value'),
  }),
]);
/** The state at the start: one temperature, one for each layer, a profile over depth, or a steady state. */
export type Initial = z.infer<typeof initialSchema>;
