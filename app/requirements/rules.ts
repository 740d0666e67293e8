/** Rules, subjects and counting windows as choices of a list. */
import { subjectInWords } from '../ui';
import type { Counts, Project, Requirement, Rule, Subject } from '../../solver/model';

export type RuleChoice =
  'reaches atLeast' | 'reaches atMost' | 'staysBelow' | 'staysAbove' | 'heldFor atLeast' | 'heldFor atMost';

export const RULE_CHOICES: readonly { value: RuleChoice; label: string }[] = [
  { value: 'reaches atLeast', label: 'reaches at least' },
  { value: 'reaches atMost', label: 'comes down to at most' },
  { value: 'staysBelow', label: 'never goes above' },
  { value: 'staysAbove', label: 'never goes below' },
  { value: 'heldFor atLeast', label: 'is held at or above' },
  { value: 'heldFor atMost', label: 'is held at or below' },
];

export const ruleChoice = ({ must }: Requirement): RuleChoice =>
  must.kind === 'reaches' || must.kind === 'heldFor' ? `${must.kind} ${must.sense}` : must.kind;

export function ruleOfChoice(choice: string): { kind: Rule['kind']; sense: 'atLeast' | 'atMost' } {
  const [kind, sense] = choice.split(' ');
  return { kind: kind as Rule['kind'], sense: sense === 'atMost' ? 'atMost' : 'atLeast' };
}

export const subjectChoice = (of: Subject): string =>
  'probe' in of ? `probe ${of.probe}` : 'point' in of ? `point ${of.point}` : `difference ${of.difference}`;

export function subjectOfChoice(choice: string): Subject {
  const [kind, ...rest] = choice.split(' ');
  const which = rest.join(' ');
  if (kind === 'probe') return { probe: which };
  return kind === 'point' ? { point: which as 'coldest' | 'hottest' } : { difference: which as 'part' | 'material' };
}

export function subjectChoices(project: Project): { value: string; label: string }[] {
  const subjects: Subject[] = [
    { point: 'coldest' },
    { point: 'hottest' },
    ...project.probes.map((probe) => ({ probe: probe.id })),
    { difference: 'part' },
    { difference: 'material' },
  ];
  return subjects.map((of) => ({ value: subjectChoice(of), label: subjectInWords(of, project) }));
}

export const COUNTS_CHOICES: readonly { value: Counts['kind']; label: string }[] = [
  { value: 'cycle', label: 'in the whole cycle' },
  { value: 'stage', label: 'in one stage' },
  { value: 'stageEnd', label: 'at the end of a stage' },
  { value: 'within', label: 'within a time' },
];

/** Another place to count that keeps the stage and the time where both have them. */
export function countsOfKind(kind: Counts['kind'], before: Counts, stage: string): Counts {
  const known =
    before.kind === 'stage' || before.kind === 'stageEnd' ? before.stage : before.kind === 'within' ? before.from : undefined;
  switch (kind) {
    case 'cycle':
      return { kind };
    case 'stage':
    case 'stageEnd':
      return { kind, stage: known ?? stage };
    case 'within':
      return known === undefined ? { kind, time: 3600 } : { kind, time: 3600, from: known };
  }
}
