import { z } from 'zod';
import { id, name, quantity } from './fields';

/** A material with constant properties. */
export const materialSchema = z
  .strictObject({
    id: id('id of the material'),
    name,
    conductivity: quantity('W/(m·K)', { above: 0 }, 'thermal conductivity'),
    density: quantity('kg/m³', { above: 0 }),
    heatCapacity: quantity('J/(kg·K)', { above: 0 }, 'specific heat capacity'),
    /** Where the numbers come from: a data sheet, a standard, 'from memory'. */
    source: z.string().max(500).optional(),
  })
  .describe('a material with constant properties');

export type Material = z.infer<typeof materialSchema>;
