import { z } from 'zod';
import { id, name, quantity, temperature } from './fields';

export const MAX_LAYERS = 30;

export const layerSchema = z.strictObject({
  id: id('id of the layer'),
  name,
  material: id('id of a material of this project'),
  thickness: quantity('m', { above: 0 }),
  /** Thermal resistance between this layer and the next; 0 is perfect contact. Ignored on the last layer. */
  contact: quantity('m²·K/W', { atLeast: 0 }, 'contact resistance to the next layer; 0 is perfect contact').default(0),
});
export type Layer = z.infer<typeof layerSchema>;

const faceSchema = z.strictObject({ name });

/** A plane wall: layers from the start face to the end face; depth is counted from the start face. */
export const partSchema = z.strictObject({
  kind: z.literal('wall', { error: 'must be "wall"' }),
  layers: z
    .array(layerSchema, { error: 'must be a list of layers' })
    .min(1, { error: 'must have at least one layer' })
    .max(MAX_LAYERS, { error: `must have at most ${MAX_LAYERS} layers` }),
  faces: z.strictObject({ start: faceSchema, end: faceSchema }),
});
export type Part = z.infer<typeof partSchema>;

/** The two faces of a layered part. */
export type FaceId = 'start' | 'end';
export const FACES: readonly FaceId[] = ['start', 'end'];

export const initialSchema = z.union([
  z.strictObject({ temperature: temperature('the whole part') }),
  z.strictObject({ layers: z.array(z.strictObject({ layer: id('id of a layer'), temperature: temperature() })) }),
]);
/** The state at the start: one temperature for the whole part, or one for each layer. */
export type Initial = z.infer<typeof initialSchema>;
