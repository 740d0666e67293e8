/** The stored references: what the independent solver says of every random plan. */
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { randomDocument } from './plans';
import type { Extrapolated } from './reference';

export const FILE = new URL('./references.json', import.meta.url);
/** Plans whose references are stored. */
export const PLANS = 300;

export interface StoredPlan {
  seed: number;
  /** Of the plan's document: a generator that has changed asks for new references. */
  digest: string;
  answers: Extrapolated[];
}

export interface Stored {
  plans: StoredPlan[];
  /** Seeds that gave no plan fit for reference, and why. */
  left: { seed: number; digest: string; why: string }[];
}

export const readStored = (): Stored => JSON.parse(readFileSync(FILE, 'utf8'));

export const digestOf = (seed: number): string =>
  createHash('sha256')
    .update(JSON.stringify(randomDocument(seed)))
    .digest('hex')
    .slice(0, 16);

/** One line a plan, numbers with ten figures. */
export function textOf({ plans, left }: Stored): string {
  const line = (item: object): string =>
    JSON.stringify(item, (_, value) => (typeof value === 'number' ? Number(value.toPrecision(10)) : value));
  const list = (items: readonly object[]): string => items.map((item) => `    ${line(item)}`).join(',\n');
  return `{\n  "plans": [\n${list(plans)}\n  ],\n  "left": [\n${list(left)}\n  ]\n}\n`;
}
