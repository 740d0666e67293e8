/**
 * The JSON Schemas (draft 2020-12) that are shipped beside this file, made from the schemas that the program itself checks by.
 * `npm run schema` writes them anew.
 */
import { z } from 'zod';
import { projectSchema } from '../project';
import { reportSchema } from '../report';

/** Texts of the schema files by their names. */
export function schemaFiles(): Record<'plan.schema.json' | 'run-report.schema.json', string> {
  return {
    // As a person may write it: what has a default may be left out.
    'plan.schema.json': textOf(z.toJSONSchema(projectSchema, { target: 'draft-2020-12', io: 'input' })),
    'run-report.schema.json': textOf(z.toJSONSchema(reportSchema, { target: 'draft-2020-12', io: 'output' })),
  };
}

const textOf = (schema: object): string => `${JSON.stringify(schema, null, 2)}\n`;
