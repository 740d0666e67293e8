/** Problems of a document in plain words, each with its place: "part.layers[1].thickness must be more than 0 m, got -0.004". */
import type { z } from 'zod';

export type Path = readonly (string | number)[];

export interface Problem {
  path: Path;
  /** What is wrong and what would be right, without the place. */
  message: string;
}

/** "part.layers[1].thickness"; the document itself is "the document". */
export function placeOf(path: Path): string {
  if (path.length === 0) return 'the document';
  return path.reduce<string>(
    (text, key) => (typeof key === 'number' ? `${text}[${key}]` : text === '' ? key : `${text}.${key}`),
    '',
  );
}

export const wordProblem = (problem: Problem): string => `${placeOf(problem.path)} ${problem.message}`;

type Issue = z.core.$ZodIssue;

/** All issues of a check as problems; a union speaks for the branch that was most likely meant. */
export function problemsOf(issues: readonly Issue[], input: unknown): Problem[] {
  return issues.flatMap((issue) => worded(issue, [], input));
}

function worded(issue: Issue, above: Path, input: unknown): Problem[] {
  const path = [...above, ...(issue.path as (string | number)[])];
  if (issue.code === 'invalid_union' && issue.errors.length > 0) return unionProblems(issue.errors, path, input, issue.message);
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({ path: [...path, key], message: 'is not a known key here' }));
  }
  return [{ path, message: issue.message + found(valueAt(input, path)) }];
}

function unionProblems(branches: readonly Issue[][], path: Path, input: unknown, message: string): Problem[] {
  const value = valueAt(input, path);
  if (value === undefined) return [{ path, message: 'is missing' }];
  // A number where a number is allowed, an object where an object is: the branch with the fewest complaints about the
  // shape is the one that was meant.
  const ranked = branches
    .map((issues) => ({ issues, score: issues.reduce((sum, issue) => sum + misfit(issue, value), 0) }))
    .sort((a, b) => a.score - b.score);
  const best = ranked[0];
  if (best === undefined || best.score >= 100) {
    return [{ path, message: `${message.startsWith('Invalid') ? 'has a form that is not known here' : message}${found(value)}` }];
  }
  return best.issues.flatMap((issue) => worded(issue, path, input));
}

function misfit(issue: Issue, value: unknown): number {
  if (issue.code === 'unrecognized_keys') return 10 * issue.keys.length;
  if (issue.path.length === 0 && (issue.code === 'invalid_type' || issue.code === 'invalid_value')) return 100;
  const child = valueAt(value, issue.path as (string | number)[]);
  return child === undefined ? 10 : 1;
}

export function valueAt(input: unknown, path: Path): unknown {
  let value = input;
  for (const key of path) {
    if (typeof value !== 'object' || value === null) return undefined;
    value = (value as Record<string | number, unknown>)[key];
  }
  return value;
}

function found(value: unknown): string {
  if (value === undefined) return '';
  if (value === null || typeof value === 'number' || typeof value === 'boolean') return `, got ${String(value)}`;
  if (typeof value === 'string') return `, got ${JSON.stringify(value.length > 40 ? `${value.slice(0, 40)}…` : value)}`;
  return '';
}
