import { z } from 'zod';
import { curveSchema } from './curve';
import { id, name, quantity, temperature } from './fields';

const latentSchema = z
  .strictObject({
    heat: quantity('J/kg', { above: 0 }, 'latent heat, taken up when warming'),
    from: temperature('where the change begins on warming'),
    to: temperature('where it is complete; equal to `from`: a change at one temperature'),
  })
  .describe('latent heat over a range of temperature, or at a point');
/** Latent heat, spread evenly over `from` to `to`; all of it at one temperature where the two are equal. */
export type Latent = z.infer<typeof latentSchema>;

const arrhenius = {
  factor: quantity('1/s', { above: 0 }, 'pre-exponential factor'),
  activationEnergy: quantity('J/mol', { atLeast: 0 }),
};
const degree = quantity('', { atLeast: 0, below: 1 }, 'degree of reaction at the start, 0 to 1');

const reactionSchema = z.discriminatedUnion(
  'kind',
  [
    /** dα/dt = A exp(−E/RT) (1 − α)^n */
    z.strictObject({
      kind: z.literal('nthOrder'),
      heat: quantity('J/kg', {}, 'heat given off by the whole reaction'),
      ...arrhenius,
      order: quantity('', { above: 0, atMost: 6 }, 'n'),
      initial: degree.default(0),
    }),
    /** dα/dt = (k1 + k2 α^m) (1 − α)^n, k = A exp(−E/RT) */
    z.strictObject({
      kind: z.literal('autocatalytic'),
      heat: quantity('J/kg', {}, 'heat given off by the whole reaction'),
      first: z.strictObject({ ...arrhenius, factor: quantity('1/s', { atLeast: 0 }, 'pre-exponential factor; 0: no such path') }),
      second: z.strictObject(arrhenius),
      m: quantity('', { above: 0, atMost: 6 }),
      n: quantity('', { above: 0, atMost: 6 }),
      initial: degree.default(0),
    }),
    /** α = αu exp(−(τ/te)^β), dte/dt = exp(E/R (1/Tr − 1/T)): equivalent age te (Freiesleben Hansen and Pedersen 1977). */
    z.strictObject({
      kind: z.literal('hydration'),
      heat: quantity('J/kg', { above: 0 }, 'heat of complete hydration, per kg of the material'),
      ultimate: quantity('', { above: 0, atMost: 1 }, 'αu, degree of hydration reached in the end'),
      time: quantity('s', { above: 0 }, 'τ'),
      slope: quantity('', { above: 0, atMost: 5 }, 'β'),
      activationEnergy: quantity('J/mol', { atLeast: 0 }),
      reference: temperature('Tr, where age counts as it is').default(20),
      age: quantity('s', { above: 0 }, 'equivalent age at the start').default(3600),
    }),
  ],
  { error: 'must have a kind: "nthOrder", "autocatalytic" or "hydration"' },
);
/** A reaction that gives off heat, advanced with the heat equation. */
export type Reaction = z.infer<typeof reactionSchema>;

/** A material: its properties over temperature, and what happens in it. */
export const materialSchema = z
  .strictObject({
    id: id('id of the material'),
    name,
    conductivity: curveSchema('W/(m·K)', { above: 0 }, 'thermal conductivity'),
    density: curveSchema('kg/m³', { above: 0 }, 'density'),
    heatCapacity: curveSchema('J/(kg·K)', { above: 0 }, 'specific heat capacity, without latent heat'),
    latent: z.array(latentSchema).max(4, { error: 'must have at most 4 changes' }).optional(),
    reaction: reactionSchema.optional(),
    /** Where the numbers come from: a data sheet, a standard, 'from memory'. */
    source: z.string().max(500).optional(),
  })
  .describe('a material');

export type Material = z.infer<typeof materialSchema>;
