/**
 * A requirement: what is looked at (`of`), the rule it must obey (`must`), and where in the cycle it counts (`counts`).
 */
import { z } from 'zod';
import { id, name, quantity, ABSOLUTE_ZERO_C } from './fields';

export const subjectSchema = z.union([
  z.strictObject({ probe: id('id of a probe') }),
  z.strictObject({ point: z.enum(['coldest', 'hottest'], { error: 'must be "coldest" or "hottest"' }) }),
  z.strictObject({ difference: z.enum(['part', 'material'], { error: 'must be "part" or "material"' }) }),
]);
/**
 * What a requirement speaks of: a probe; the coldest or hottest point of the part at each instant; or the largest
 * difference at each instant, in the whole part or within one material (neighbouring layers of it count as one piece).
 */
export type Subject = z.infer<typeof subjectSchema>;

const limit = quantity('', { above: ABSOLUTE_ZERO_C }, 'limit: °C, or K for a difference');
const sense = z.enum(['atLeast', 'atMost'], { error: 'must be "atLeast" or "atMost"' });

export const ruleSchema = z.discriminatedUnion(
  'kind',
  [
    z.strictObject({ kind: z.literal('reaches'), sense, limit }),
    z.strictObject({ kind: z.literal('staysBelow'), limit }),
    z.strictObject({ kind: z.literal('staysAbove'), limit }),
    z.strictObject({ kind: z.literal('heldFor'), sense, limit, duration: quantity('s', { above: 0 }) }),
  ],
  { error: 'must have a kind: "reaches", "staysBelow", "staysAbove" or "heldFor"' },
);
export type Rule = z.infer<typeof ruleSchema>;

export const countsSchema = z.discriminatedUnion(
  'kind',
  [
    z.strictObject({ kind: z.literal('cycle') }),
    z.strictObject({ kind: z.literal('stage'), stage: id('id of a stage') }),
    z.strictObject({
      kind: z.literal('within'),
      time: quantity('s', { above: 0 }),
      from: id('id of the stage whose start the time runs from; absent: the start of the cycle').optional(),
    }),
    z.strictObject({ kind: z.literal('stageEnd'), stage: id('id of a stage') }),
  ],
  { error: 'must have a kind: "cycle", "stage", "within" or "stageEnd"' },
);
/** Where a requirement counts: anywhere in the cycle, throughout one stage, within a time, or at a stage's end. */
export type Counts = z.infer<typeof countsSchema>;

export const requirementSchema = z.strictObject({
  id: id('id of the requirement'),
  name,
  of: subjectSchema,
  must: ruleSchema,
  counts: countsSchema,
});
export type Requirement = z.infer<typeof requirementSchema>;
