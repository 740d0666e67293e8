import type { Counts, Requirement, Rule, Subject } from '../../solver/model';
import type { Project } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { changeById, enterAt, indexOfId, insertAfter, moveItem, writeAt } from './edit';
import { freeName, newId } from './ids';

/** Ways to begin: each is a whole requirement whose numbers are then changed. */
export type RequirementStart = 'reachAndHold' | 'reach' | 'neverAbove' | 'neverBelow' | 'difference';

const HALF_HOUR = 1800;

const STARTS: Record<RequirementStart, { name: string; of: Subject; must(near: number): Rule }> = {
  reachAndHold: {
    name: 'Coldest point held',
    of: { point: 'coldest' },
    must: (near) => ({ kind: 'heldFor', sense: 'atLeast', limit: near, duration: HALF_HOUR }),
  },
  reach: {
    name: 'Coldest point reached',
    of: { point: 'coldest' },
    must: (near) => ({ kind: 'reaches', sense: 'atLeast', limit: near }),
  },
  neverAbove: { name: 'Never above', of: { point: 'hottest' }, must: (near) => ({ kind: 'staysBelow', limit: near }) },
  neverBelow: { name: 'Never below', of: { point: 'coldest' }, must: (near) => ({ kind: 'staysAbove', limit: near }) },
  difference: {
    name: 'Difference within one material',
    of: { difference: 'material' },
    must: () => ({ kind: 'staysBelow', limit: 50 }),
  },
};

/** A requirement to begin with; `near` is the temperature that it starts from, °C. */
export function startRequirement(project: Project, start: RequirementStart, near: number): Requirement {
  const { name, of, must } = STARTS[start];
  return {
    id: newId('requirement'),
    name: freeName(project.requirements, name),
    of,
    must: must(near),
    counts: { kind: 'cycle' },
  };
}

export const addRequirement = (requirement: Requirement, after = Number.MAX_SAFE_INTEGER): Command => ({
  name: `Add requirement ${called(requirement, 'requirement')}`,
  apply: (project) => ({ ...project, requirements: insertAfter(project.requirements, after, requirement) }),
});

export const duplicateRequirement = (project: Project, requirement: Requirement): Command => ({
  ...addRequirement(
    { ...requirement, id: newId('requirement'), name: freeName(project.requirements, requirement.name) },
    indexOfId(project.requirements, requirement.id),
  ),
  name: `Duplicate requirement ${called(requirement, 'requirement')}`,
});

export const removeRequirement = (requirement: Requirement): Command => ({
  name: `Remove requirement ${called(requirement, 'requirement')}`,
  apply: (project) => ({ ...project, requirements: project.requirements.filter((item) => item.id !== requirement.id) }),
});

export const moveRequirement = (requirement: Requirement, by: number): Command => ({
  name: `Move requirement ${called(requirement, 'requirement')}`,
  apply: (project) =>
    writeAt(project, ['requirements'], moveItem(project.requirements, indexOfId(project.requirements, requirement.id), by)),
});

function change(project: Project, requirement: Requirement, make: (item: Requirement) => Requirement): Project {
  return writeAt(project, ['requirements'], changeById(project.requirements, requirement.id, make));
}

export const renameRequirement = (requirement: Requirement, name: string): Command => ({
  name: `Name of ${called(requirement, 'requirement')} to ${name}`,
  apply: (project) => change(project, requirement, (item) => ({ ...item, name })),
});

/** A difference is limited in K, a point in °C; going from one to the other puts a limit that makes sense there. */
export const setSubject = (requirement: Requirement, of: Subject, near: number): Command => ({
  name: `Subject of ${called(requirement, 'requirement')}`,
  apply: (project) =>
    change(project, requirement, (item) => {
      const swaps = 'difference' in of !== 'difference' in item.of;
      const must = swaps ? { ...item.must, limit: 'difference' in of ? 50 : near } : item.must;
      return { ...item, of, must };
    }),
});

/** Another kind of rule; limit, sense and duration stay where the new kind has them. */
export const setRuleKind = (requirement: Requirement, kind: Rule['kind'], sense: 'atLeast' | 'atMost' = 'atLeast'): Command => ({
  name: `Rule of ${called(requirement, 'requirement')}`,
  apply: (project) =>
    change(project, requirement, (item) => {
      const { limit } = item.must;
      const duration = 'duration' in item.must ? item.must.duration : HALF_HOUR;
      const must: Rule =
        kind === 'reaches' ? { kind, sense, limit } : kind === 'heldFor' ? { kind, sense, limit, duration } : { kind, limit };
      return { ...item, must };
    }),
});

export const setLimit = (requirement: Requirement, entered: Entered): Command => ({
  name: `Limit of ${called(requirement, 'requirement')} to ${entered.text}`,
  apply: (project) => enter(project, requirement, ['must', 'limit'], entered),
});

/** How long it must hold, for a rule that has a duration. */
export const setHoldTime = (requirement: Requirement, entered: Entered): Command => ({
  name: `Hold of ${called(requirement, 'requirement')} to ${entered.text}`,
  apply: (project) => enter(project, requirement, ['must', 'duration'], entered),
});

export const setCounts = (requirement: Requirement, counts: Counts): Command => ({
  name: `Where ${called(requirement, 'requirement')} counts`,
  apply: (project) => change(project, requirement, (item) => ({ ...item, counts })),
});

/** The time of a requirement that counts within one. */
export const setWithinTime = (requirement: Requirement, entered: Entered): Command => ({
  name: `Time for ${called(requirement, 'requirement')} to ${entered.text}`,
  apply: (project) => enter(project, requirement, ['counts', 'time'], entered),
});

function enter(project: Project, requirement: Requirement, key: [string, string], entered: Entered): Project {
  const index = indexOfId(project.requirements, requirement.id);
  const record = project.requirements[index] as unknown as Record<string, object> | undefined;
  if (record === undefined || !(key[1] in record[key[0]])) return project;
  return enterAt(project, ['requirements', index, ...key], entered);
}
