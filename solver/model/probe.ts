import { z } from 'zod';
import { id, name, quantity } from './fields';

const fraction = quantity('', { atLeast: 0, atMost: 1 }, 'part of the way, 0 to 1');

export const placeSchema = z.union([
  z.strictObject({ depth: quantity('m', { atLeast: 0 }, 'from the start face') }),
  z.strictObject({ fraction, layer: id('id of a layer; absent: the whole part').optional() }),
  z.strictObject({ face: z.enum(['start', 'end'], { error: 'must be "start" or "end"' }) }),
  z.strictObject({
    interface: id('id of the layer before the interface'),
    side: z.enum(['before', 'after'], { error: 'must be "before" or "after"' }),
  }),
]);
/** Where a probe sits: a depth, a fraction of the part or of a layer, a face, or one side of an interface. */
export type Place = z.infer<typeof placeSchema>;

export const probeSchema = z.strictObject({ id: id('id of the probe'), name, at: placeSchema });
/** A point whose history is kept. */
export type Probe = z.infer<typeof probeSchema>;
