/** A document before and after each migration, by the version it starts from. A migration without its pair fails the tests. */
import type { Migration, PlainDocument } from '../../solver/model/migrations';

export interface Pair {
  before: PlainDocument;
  after: PlainDocument;
}

/** Of the program's own migrations; there is none yet. */
export const pairs: Readonly<Record<number, Pair>> = {};

/** Versions whose migration has no pair, or does not lead from its `before` to its `after`; empty when all is well. */
export function unproven(list: readonly Migration[], given: Readonly<Record<number, Pair>>): number[] {
  return list
    .filter(({ from, up }) => {
      const pair = given[from];
      if (pair === undefined) return true;
      const became = { ...up(structuredClone(pair.before)), version: from + 1 };
      return JSON.stringify(sorted(became)) !== JSON.stringify(sorted(pair.after));
    })
    .map(({ from }) => from);
}

/** The same value with keys in order, so that two documents can be compared as text. */
function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (typeof value !== 'object' || value === null) return value;
  const entries = Object.entries(value).map(([key, item]) => [key, sorted(item)] as const);
  return Object.fromEntries(entries.sort(([a], [b]) => (a < b ? -1 : 1)));
}
