/** The project document: one JSON document holds the whole plan. SI base units and °C as plain numbers. */
import { z } from 'zod';
import { cycleSchema } from './cycle';
import { materialSchema } from './material';
import { initialSchema } from './initial';
import { partSchema } from './part';
import { probeSchema } from './probe';
import { requirementSchema } from './requirement';
import { outputSchema, settingsSchema } from './settings';

export const FORMAT = 'soakwright-plan';
export const VERSION = 2;

export const projectSchema = z
  .strictObject({
    format: z.literal(FORMAT, { error: `must be "${FORMAT}"` }),
    version: z.literal(VERSION, { error: `must be ${VERSION}` }),
    title: z.string({ error: 'must be a text' }).max(200, { error: 'must be at most 200 characters' }),
    notes: z.string({ error: 'must be a text' }).max(20000, { error: 'must be at most 20000 characters' }).default(''),
    materials: z
      .array(materialSchema, { error: 'must be a list of materials' })
      .max(200, { error: 'must have at most 200 materials' }),
    part: partSchema,
    initial: initialSchema,
    cycle: cycleSchema,
    probes: z.array(probeSchema, { error: 'must be a list of probes' }).max(40, { error: 'must have at most 40 probes' }),
    requirements: z
      .array(requirementSchema, { error: 'must be a list of requirements' })
      .max(60, { error: 'must have at most 60 requirements' }),
    settings: settingsSchema,
    output: outputSchema.default({}),
    /** What the person typed, by path of the number it stands for; dropped when the number changes. */
    typed: z.record(z.string(), z.string().max(60)).optional(),
  })
  .describe('Soakwright plan: SI base units and °C as plain numbers; differences in K, rates in K/s');

/** A checked project document. Treat as immutable: an edit makes a new one. */
export type Project = z.infer<typeof projectSchema>;
