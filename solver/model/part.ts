import { z } from 'zod';
import { id, name, quantity } from './fields';

export const MAX_LAYERS = 30;

const emissivity = quantity('', { above: 0, atMost: 1 }, 'emissivity');

/** Between two layers: a resistance, or a gas gap that conducts and across which its walls radiate. */
export const contactSchema = z.union([
  quantity('m²·K/W', { atLeast: 0 }, 'contact resistance to the next layer; 0 is perfect contact'),
  z.strictObject({
    gap: quantity('m', { above: 0 }, 'width of a gap filled with still air'),
    emissivities: z.tuple([emissivity, emissivity]).describe('of this layer and of the next one, facing each other'),
  }),
]);
/** Thermal resistance, m²·K/W (0: perfect contact), or a gap of still air between two grey walls. */
export type Contact = z.infer<typeof contactSchema>;

export const layerSchema = z.strictObject({
  id: id('id of the layer'),
  name,
  material: id('id of a material of this project'),
  thickness: quantity('m', { above: 0 }),
  /** What lies between this layer and the next. Ignored on the last layer. */
  contact: contactSchema.default(0),
});
export type Layer = z.infer<typeof layerSchema>;

const faceSchema = z.strictObject({ name });

/**
 * A layered part: layers from the start face to the end face; depth is counted from the start face. On a cylinder and a
 * sphere the start face is the inner one, at `innerRadius`; a solid one (0) has only the end face, and depth is the radius.
 */
export const partSchema = z.strictObject({
  kind: z.enum(['wall', 'cylinder', 'sphere'], { error: 'must be "wall", "cylinder" or "sphere"' }),
  innerRadius: quantity('m', { atLeast: 0 }, 'radius of the bore of a cylinder or sphere; 0: solid').default(0),
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

/** A solid cylinder or sphere: its start is a centre, not a face. */
export const isSolid = (part: Pick<Part, 'kind' | 'innerRadius'>): boolean => part.kind !== 'wall' && part.innerRadius === 0;
/** The faces that a part really has. */
export const facesOf = (part: Pick<Part, 'kind' | 'innerRadius'>): readonly FaceId[] => (isSolid(part) ? ['end'] : FACES);
