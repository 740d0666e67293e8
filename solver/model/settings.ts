import { z } from 'zod';
import { quantity } from './fields';

const count = (meaning: string) =>
  z
    .int({ error: 'must be a whole number' })
    .min(2, { error: 'must be at least 2' })
    .max(100000, { error: 'must be at most 100000' })
    .describe(meaning);

const counts = (meaning: string) => z.union([count(meaning), z.array(count(meaning))]);

export const gridSchema = z.union([
  z.literal('automatic'),
  z.strictObject({ nodes: counts('nodes in each layer, both ends included: one number for all layers, or one a layer') }),
  z.strictObject({ cells: counts('equal cells in each layer: one number for all layers, or one a layer') }),
]);
/** The grid: from the accuracy; or nodes on faces and layer edges; or equal cells with nodes at their centres. */
export type GridSetting = z.infer<typeof gridSchema>;

export const settingsSchema = z.strictObject({
  scheme: z.enum(['automatic', 'explicit', 'implicit', 'crankNicolson'], {
    error: 'must be "automatic", "explicit", "implicit" or "crankNicolson"',
  }),
  accuracy: quantity('K', { above: 0, atMost: 100 }, 'wanted accuracy of the automatic scheme').default(0.1),
  /** Step of the schemes of the textbooks; the automatic scheme chooses its own. */
  step: quantity('s', { above: 0 }, 'step of the explicit, implicit and Crank–Nicolson schemes').optional(),
  dampedSteps: z
    .int({ error: 'must be a whole number' })
    .min(0, { error: 'must be at least 0' })
    .max(100, { error: 'must be at most 100' })
    .default(4)
    .describe('half steps of backward Euler after every jump in Crank–Nicolson; 0 is plain Crank–Nicolson'),
  grid: gridSchema.default('automatic'),
});
export type Settings = z.infer<typeof settingsSchema>;
export type SchemeName = Settings['scheme'];

export const outputSchema = z.strictObject({
  interval: quantity('s', { above: 0 }, 'time between the rows of exported tables; default: 200 equal rows').optional(),
});
