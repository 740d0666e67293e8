import { z } from 'zod';
import { readExpression } from './expressions';

/** An expression in the variables named; checked by the reader that also evaluates it. */
export function expressionSchema(variables: readonly string[], meaning: string) {
  return z
    .string({ error: 'must be a text' })
    .max(300, { error: 'must be at most 300 characters' })
    .superRefine((text, context) => {
      const read = readExpression(text, variables);
      if (read.kind === 'refused') context.addIssue({ code: 'custom', message: read.message });
    })
    .describe(meaning);
}
