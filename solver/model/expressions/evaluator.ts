import { readExpression, type Compiled } from './expression';

/** Expressions met before, by their text and variables: a cycle names the same ones in every stage. */
const known = new Map<string, Compiled>();
const MOST_KNOWN = 500;

/** An expression in `variables` as a function of their values. Throws RangeError for a text that the reader refuses. */
export function evaluatorOf(text: string, variables: readonly string[]): Compiled {
  const key = `${variables.join()}: ${text}`;
  const before = known.get(key);
  if (before !== undefined) return before;
  const read = readExpression(text, variables);
  if (read.kind === 'refused') throw new RangeError(`${text} ${read.message}`);
  if (known.size >= MOST_KNOWN) known.clear();
  known.set(key, read.evaluate);
  return read.evaluate;
}
