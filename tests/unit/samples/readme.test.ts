import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readProject } from '../../../solver/model';
import { solve } from '../../../solver/planning';

const readme = readFileSync(new URL('../../../README.md', import.meta.url), 'utf8');

describe('the example file in README.md', () => {
  it('is a plan that runs and meets its requirement', () => {
    const example = /```json\n([\s\S]*?)```/.exec(readme)?.[1] ?? '';
    const read = readProject(example);
    if (read.kind !== 'project') throw new Error(JSON.stringify(read));
    const { outcome, answers } = solve(read.project);
    expect(outcome.reason).toBe('finished');
    expect(answers.map((answer) => answer.verdict)).toEqual(['met']);
  });
});
