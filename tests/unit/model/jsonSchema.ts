/** A small reader of JSON Schema, draft 2020-12, for the keywords that our schemas use; an unknown keyword is an error. */
type Schema = Record<string, unknown>;

const notes = new Set(['$schema', '$defs', 'description', 'default']);

const typeTests: Record<string, (value: unknown) => boolean> = {
  object: (value) => typeof value === 'object' && value !== null && !Array.isArray(value),
  array: Array.isArray,
  string: (value) => typeof value === 'string',
  number: (value) => typeof value === 'number',
  integer: Number.isInteger,
  boolean: (value) => typeof value === 'boolean',
  null: (value) => value === null,
};

/** Whether the value obeys the schema. Throws for a keyword that it does not know: then it could not tell. */
export function acceptsBySchema(schema: Schema, value: unknown, root: Schema = schema): boolean {
  return Object.entries(schema).every(([keyword, rule]) => notes.has(keyword) || obeys(keyword, rule, schema, value, root));
}

function obeys(keyword: string, rule: unknown, schema: Schema, value: unknown, root: Schema): boolean {
  const accepts = (sub: unknown, item: unknown): boolean => sub === true || acceptsBySchema(sub as Schema, item, root);
  const isNumber = typeof value === 'number';
  const entries = typeTests.object(value) ? Object.entries(value as object) : [];
  switch (keyword) {
    case 'type':
      return [rule].flat().some((type) => typeTests[type as string](value));
    case 'const':
      return value === rule;
    case 'enum':
      return (rule as unknown[]).includes(value);
    case 'anyOf':
      return (rule as Schema[]).some((sub) => accepts(sub, value));
    case 'oneOf':
      return (rule as Schema[]).filter((sub) => accepts(sub, value)).length === 1;
    case 'allOf':
      return (rule as Schema[]).every((sub) => accepts(sub, value));
    case '$ref':
      return accepts(resolve(rule as string, root), value);
    case 'minimum':
      return !isNumber || value >= (rule as number);
    case 'maximum':
      return !isNumber || value <= (rule as number);
    case 'exclusiveMinimum':
      return !isNumber || value > (rule as number);
    case 'exclusiveMaximum':
      return !isNumber || value < (rule as number);
    case 'minLength':
      return typeof value !== 'string' || value.length >= (rule as number);
    case 'maxLength':
      return typeof value !== 'string' || value.length <= (rule as number);
    case 'minItems':
      return !Array.isArray(value) || value.length >= (rule as number);
    case 'maxItems':
      return !Array.isArray(value) || value.length <= (rule as number);
    case 'items':
      return !Array.isArray(value) || value.slice(prefixLength(schema)).every((item) => rule !== false && accepts(rule, item));
    case 'prefixItems':
      return (
        !Array.isArray(value) || (rule as Schema[]).every((sub, index) => index >= value.length || accepts(sub, value[index]))
      );
    case 'required':
      return !typeTests.object(value) || (rule as string[]).every((key) => key in (value as object));
    case 'properties':
      return entries.every(([key, item]) => !(key in (rule as object)) || accepts((rule as Schema)[key], item));
    case 'propertyNames':
      return entries.every(([key]) => accepts(rule, key));
    case 'additionalProperties': {
      const more = entries.filter(([key]) => !(key in ((schema['properties'] ?? {}) as object)));
      return more.every(([, item]) => rule !== false && accepts(rule, item));
    }
    default:
      throw new Error(`the keyword ${keyword} is not known here`);
  }
}

const prefixLength = (schema: Schema): number => ((schema['prefixItems'] ?? []) as unknown[]).length;

const resolve = (reference: string, root: Schema): Schema =>
  reference
    .replace(/^#\/?/, '')
    .split('/')
    .filter((key) => key !== '')
    .reduce((schema, key) => schema[key] as Schema, root);
